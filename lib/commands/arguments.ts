import { fail, type Result, succeed } from '../failures'
import { expectationOf } from '../units'
import type {
  ArgumentOption,
  ArgumentSpec,
  ArgumentValues,
  Command,
  CommandContext,
  PhrasePart,
} from './command'
import { readValues, unitHint } from './measures'
import { rank } from './rank'
import { choicesOf } from './tables'
import { fold } from './words'

/** A checked argument: the value that `run` gets, the text of its chip, and a word on its unit. */
export interface CheckedArgument {
  readonly value: string | number | boolean
  readonly shown: string
  readonly hint?: string
}

/** The options to pick from; undefined when the argument is typed freely. */
export function optionsOf(
  spec: ArgumentSpec,
  context: CommandContext,
  args: ArgumentValues,
): readonly ArgumentOption[] | undefined {
  if (spec.kind === 'choice') return spec.options(context, args)
  if (spec.kind === 'text') return undefined
  const named = spec.named(context, args)
  return named && choicesOf(context, named)
}

interface RankableOption extends ArgumentOption {
  readonly weight: number
  readonly id: string
  readonly also: readonly string[]
}

/** The options that fit what was typed, best first; all of them, in their own order, when nothing was. */
export function rankOptions(options: readonly ArgumentOption[], text: string, limit = 60) {
  if (text.trim() === '') return options.slice(0, limit)
  const rankable: RankableOption[] = options.map((option, index) => ({
    ...option,
    // Equal matches stay in the order that the table has.
    weight: -index / 1000,
    id: option.value,
    also: [option.value, ...(option.synonyms ?? []), ...(option.detail ? [option.detail] : [])],
  }))
  return rank(rankable, text, { limit }).map(({ entry }) => entry as ArgumentOption)
}

/** Checks one argument as typed or picked; the failure says what was expected. */
export function checkArgument(
  spec: ArgumentSpec,
  context: CommandContext,
  args: ArgumentValues,
  given: string | number | boolean,
): Result<CheckedArgument> {
  const text = String(given)
  const options = optionsOf(spec, context, args)
  if (options) return checkOption(spec, options, text)
  if (spec.kind === 'text') {
    const problem = spec.check(context, text, args)
    return problem === undefined
      ? succeed({ value: text.trim(), shown: text.trim() })
      : fail('invalid', problem)
  }
  if (spec.kind === 'choice') return fail('invalid', `Pick ${spec.label}`)
  const named = spec.named(context, args)
  if (!named) return fail('invalid', 'Pick a named input first')
  const read = readValues(context, named, text)
  if (!read.ok) return read
  const hint = unitHint(context, named, text)
  return succeed({ value: text.trim(), shown: text.trim(), ...(hint === undefined ? {} : { hint }) })
}

function checkOption(
  spec: ArgumentSpec,
  options: readonly ArgumentOption[],
  text: string,
): Result<CheckedArgument> {
  const wanted = fold(text)
  const same = (option: ArgumentOption) =>
    option.value === text ||
    [option.title, option.value, ...(option.synonyms ?? [])].some((word) => fold(word) === wanted)
  const option = options.find(({ value }) => value === text) ?? options.find(same)
  if (option) return succeed({ value: option.value, shown: option.title })
  const nearest = rankOptions(options, text, 1)[0]
  if (wanted === '' || !nearest) return fail('invalid', `Pick ${spec.label} from the list`)
  return fail('invalid', `No ${spec.label} is called ${text.trim()}; the nearest is ${nearest.title}`)
}

/** What to type, as a hint in the empty line. */
export function promptOf(spec: ArgumentSpec, context: CommandContext, args: ArgumentValues): string {
  if (spec.kind === 'text') return spec.example
  if (optionsOf(spec, context, args)) return spec.label
  const named = spec.kind === 'quantity' ? spec.named(context, args) : undefined
  return named ? expectationOf(named.quantity) : spec.label
}

/** The first argument that is missing or does not hold. */
export function nextArgument(
  command: Command,
  context: CommandContext,
  args: ArgumentValues,
): ArgumentSpec | undefined {
  return command.arguments?.find((spec) => {
    const given = args[spec.id]
    return given === undefined || !checkArgument(spec, context, args, given).ok
  })
}

/** The line with its arguments in place; arguments that the phrase leaves out follow it. */
export function phraseOf(command: Command): readonly PhrasePart[] {
  const phrase = command.phrase ?? [command.title]
  const placed = new Set(phrase.map((part) => (typeof part === 'string' ? '' : part.argument)))
  const rest = (command.arguments ?? []).filter((spec) => !placed.has(spec.id))
  return [...phrase, ...rest.map((spec) => ({ argument: spec.id }))]
}

/** The command said with the arguments it has: "Set frame width to 24'". Stops before the first that is missing. */
export function sayCommand(command: Command, context: CommandContext, args: ArgumentValues): string {
  const words: string[] = []
  for (const part of phraseOf(command)) {
    if (typeof part === 'string') {
      words.push(part)
      continue
    }
    const spec = command.arguments?.find(({ id }) => id === part.argument)
    const given = args[part.argument]
    if (!spec || given === undefined) {
      words.push('…')
      break
    }
    const checked = checkArgument(spec, context, args, given)
    words.push(checked.ok ? checked.value.shown : String(given))
  }
  return words.join(' ')
}
