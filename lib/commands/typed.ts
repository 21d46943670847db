import type { NamedValue } from '../workbook'
import { checkArgument, rankOptions, sayCommand } from './arguments'
import type { ArgumentSpec, ArgumentValues, Command, CommandContext } from './command'
import type { Entry } from './entries'
import { labelOf, namedInputs } from './inputs'
import { type Rankable, rank } from './rank'
import { readReference } from './references'
import { commandById, commandsFor } from './registry'
import { choicesOf } from './tables'
import { fold, wordsOf } from './words'

/**
 * Arguments typed in the line itself: `frame width 24'`, `cover roof triple`, `b7`. Each reading becomes an entry
 * with its arguments filled in and checked; what does not hold is said in `problem` and cannot run.
 */
export function typedEntries(
  context: CommandContext,
  query: string,
  inputs: readonly RankableInput[] = rankableInputs(context),
): readonly Entry[] {
  const text = query.trim()
  if (text === '') return []
  return [
    ...readCell(context, text),
    ...readCover(context, text),
    ...readSet(context, text, inputs),
    ...readAfterTitle(context, text),
  ]
}

function entry(context: CommandContext, command: Command, args: ArgumentValues, named: string): Entry {
  const available = command.when(context)
  let hint: string | undefined
  let problem: string | undefined
  for (const spec of command.arguments ?? []) {
    const given = args[spec.id]
    if (given === undefined) continue
    const checked = checkArgument(spec, context, args, given)
    if (checked.ok) hint = checked.value.hint ?? hint
    else problem = checked.failure.text
  }
  return {
    id: `typed:${command.id}:${named}`,
    kind: 'typed',
    title: sayCommand(command, context, args),
    command,
    args,
    available,
    ...(hint === undefined ? {} : { hint }),
    ...(problem === undefined ? {} : { problem }),
  }
}

function usable(context: CommandContext, id: string): Command | undefined {
  const command = commandById(id)
  return command && commandsFor(context).includes(command) ? command : undefined
}

const goWords = /^(?:go\s*to|goto|go|jump(?:\s+to)?|open|show|select)\s+/i

function readCell(context: CommandContext, text: string): readonly Entry[] {
  const command = usable(context, 'go-to-cell')
  if (!command) return []
  const cell = text.replace(goWords, '')
  const read = readReference(context.workbook, cell, context.selection.sheet)
  if (read === undefined) return []
  return [entry(context, command, { cell: /!/.test(cell) ? cell : cell.toUpperCase() }, 'cell')]
}

const setWords = /^(?:set|change|make|put|enter)\s+(?:the\s+)?/i
const valueStart = /^[-+−]?(?:[\d.,]*\d|[=$€£])|^[ru][-\s]?\d/i

export interface RankableInput extends Rankable {
  readonly named: NamedValue
}

export function rankableInputs(context: CommandContext): readonly RankableInput[] {
  return namedInputs(context).map((named) => ({
    id: named.name,
    title: labelOf(named),
    also: [named.name],
    named,
  }))
}

/** `[set] NAME [to] VALUE`: the value begins at a number, or is one of the choices that the named input takes. */
function readSet(context: CommandContext, text: string, inputs: readonly RankableInput[]): readonly Entry[] {
  const command = usable(context, 'set-input')
  if (!command) return []
  const asked = text.replace(setWords, '')
  const found: { entry: Entry; score: number }[] = []
  for (const { name, value } of splits(asked)) {
    for (const { entry: input, score } of rank(inputs, name, { limit: 3 })) {
      if (score < 40) continue
      const options = choicesOf(context, input.named)
      const given = options ? rankOptions(options, value, 1)[0]?.value : value
      if (given === undefined || !(options || valueStart.test(value))) continue
      const made = entry(context, command, { input: input.id, value: given }, input.id)
      found.push({ entry: made, score: score - (made.problem === undefined ? 0 : 30) })
    }
  }
  found.sort((a, b) => b.score - a.score)
  const seen = new Set<string>()
  return found
    .map((one) => one.entry)
    .filter(({ id }) => !seen.has(id) && seen.add(id))
    .slice(0, 3)
}

/** Every way to part the text into a name and a value, the name first. */
function splits(text: string): readonly { name: string; value: string }[] {
  const parted = /^(.+?)\s*(?:=|:(?!\d)|\s(?:to|is|as)\s)\s*(.+)$/i.exec(text)
  const gaps = [...text.matchAll(/\s+/g)]
  return [
    ...(parted ? [{ name: parted[1] ?? '', value: parted[2] ?? '' }] : []),
    ...gaps.map((gap) => ({ name: text.slice(0, gap.index), value: text.slice(gap.index + gap[0].length) })),
  ]
}

const coverWords = /^(?:re-?)?(?:cover|covering|clad|glaze|sheet)\b\s*/i

/** `cover [PART] [with] [COVERING]`; either may be missing and is then asked for. */
function readCover(context: CommandContext, text: string): readonly Entry[] {
  const command = usable(context, 'cover')
  const [part, covering] = command?.arguments ?? []
  if (!command || !part || !covering || !coverWords.test(text)) return []
  const rest = text.replace(coverWords, '').replace(/^(?:the\s+)/i, '')
  const words = rest.split(/\s+/).filter(Boolean)
  if (words.length === 0) return []
  const spoken = takeOption(part, context, {}, words)
  const left = (spoken?.rest ?? words).filter((word) => !/^(?:with|in|by|to)$/i.test(word)).join(' ')
  const parts: ArgumentValues = spoken ? { part: spoken.value } : {}
  if (left === '') return spoken ? [entry(context, command, parts, spoken.value)] : []
  return bestOptions(covering, context, parts, left).map((value) =>
    entry(context, command, { ...parts, covering: value }, `${spoken?.value ?? ''}:${value}`),
  )
}

function bestOptions(spec: ArgumentSpec, context: CommandContext, args: ArgumentValues, text: string) {
  if (spec.kind !== 'choice') return []
  return rankOptions(spec.options(context, args), text, 3).map(({ value }) => value)
}

/** The longest run of words at the beginning that is one of the options, exactly or as its first words. */
function takeOption(
  spec: ArgumentSpec,
  context: CommandContext,
  args: ArgumentValues,
  words: readonly string[],
): { value: string; rest: readonly string[] } | undefined {
  if (spec.kind !== 'choice') return undefined
  const options = spec.options(context, args)
  for (let count = Math.min(words.length, 4); count > 0; count--) {
    const said = wordsOf(fold(words.slice(0, count).join(' '))).join(' ')
    const option = options.find((one) =>
      [one.title, one.value, ...(one.synonyms ?? [])].some((name) => isCalled(name, said)),
    )
    if (option) return { value: option.value, rest: words.slice(count) }
  }
  return undefined
}

/** "sides" for "side", "end" for "ends": a last s makes no difference. */
function isCalled(name: string, said: string): boolean {
  const bare = (text: string) => wordsOf(fold(text)).join(' ').replace(/s$/, '')
  return bare(name) === said.replace(/s$/, '')
}

/** `rename sheet to Costs`, `new workbook Hill farm`: the rest after a command's title goes into its first argument. */
function readAfterTitle(context: CommandContext, text: string): readonly Entry[] {
  const folded = fold(text)
  const made: Entry[] = []
  for (const command of commandsFor(context)) {
    const [spec] = command.arguments ?? []
    if (!spec || command.id === 'set-input' || command.id === 'cover' || command.id === 'go-to-cell') continue
    const lead = leadOf(command, folded)
    if (lead === 0) continue
    const rest = text
      .slice(lead)
      .trim()
      .replace(/^(?:to|called|as|:)\s+/i, '')
    if (rest === '') continue
    if (spec.kind === 'text') made.push(entry(context, command, { [spec.id]: rest }, 'text'))
    for (const value of bestOptions(spec, context, {}, rest)) {
      made.push(entry(context, command, { [spec.id]: value }, value))
    }
  }
  return made
}

/** How many characters of the text are the command's title or a synonym, followed by more; 0 while one is being typed. */
function leadOf(command: Command, folded: string): number {
  const titles = [command.title, ...(command.synonyms ?? []), ...(goLeads[command.id] ?? [])]
  let longest = 0
  for (const title of titles) {
    const lead = fold(title).replace(/\s*…$/, '')
    if (lead.startsWith(folded)) return 0
    if (lead.length > longest && folded.startsWith(`${lead} `)) longest = lead.length
  }
  return longest
}

const goLeads: Readonly<Record<string, readonly string[]>> = {
  'go-to-sheet': ['go', 'go to', 'goto', 'sheet', 'go to sheet'],
  'go-to-name': ['go', 'go to', 'goto', 'name'],
  'open-workbook': ['open', 'open workbook', 'workbook'],
  'add-sheet': ['add sheet', 'new sheet', 'add a sheet'],
  'name-cells': ['name', 'name cells', 'name selection'],
  'set-digits': ['digits', 'decimals'],
  'set-kind': ['format', 'show as', 'format as'],
  'new-workbook': ['new workbook', 'new'],
}
