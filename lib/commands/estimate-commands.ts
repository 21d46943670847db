import type { NamedValue, Operation } from '../workbook'
import { all, hasInputs, mayChange, sheetIsOpen } from './availability'
import type { ArgumentOption, ArgumentValues, Command, CommandContext, Effect } from './command'
import { labelInSentence, labelOf, namedInputs, setArea } from './inputs'
import { readValues, showNamed } from './measures'
import { describeArea } from './references'
import { choicesOf } from './tables'

function givenInput({ workbook }: CommandContext, args: ArgumentValues): NamedValue | undefined {
  const named = workbook.names.get(String(args.input ?? ''))
  return named?.role === 'input' ? named : undefined
}

function inputOptions(context: CommandContext): readonly ArgumentOption[] {
  return namedInputs(context).map((named) => ({
    value: named.name,
    title: labelInSentence(named),
    detail: showNamed(context, named),
    synonyms: [labelOf(named), named.name.replaceAll('_', ' ')],
  }))
}

const setInput: Command = {
  id: 'set-input',
  title: 'Set a named input to …',
  phrase: ['Set', { argument: 'input' }, 'to', { argument: 'value' }],
  synonyms: ['change', 'make', 'enter', 'value', 'input'],
  group: 'Estimate',
  keys: ['Alt+Shift+S'],
  when: all(mayChange, hasInputs),
  arguments: [
    { kind: 'choice', id: 'input', label: 'a named input', options: inputOptions },
    { kind: 'quantity', id: 'value', label: 'a value', named: givenInput },
  ],
  says: (context, args) => {
    const named = givenInput(context, args)
    if (!named) return 'Sets one of the named inputs.'
    return `Sets ${describeArea(context.workbook, named.area)}, now ${showNamed(context, named)}.`
  },
  run: (context, args) => {
    const named = givenInput(context, args)
    if (!named) return refused('That input is no longer there')
    return setNamed(context, [named], args.value ?? '', `Set ${labelInSentence(named)}`)
  },
}

/** Sets every one of `inputs` to what was typed or picked; refused whole when one of them may not be set. */
function setNamed(
  context: CommandContext,
  inputs: readonly NamedValue[],
  given: string | number | boolean,
  label: string,
): Effect {
  const operations: Operation[] = []
  for (const named of inputs) {
    const open = sheetIsOpen(context, named.area.sheet)
    if (open !== true) return refused(open)
    const options = choicesOf(context, named)
    if (options) {
      const picked = options.find((option) => option.value === String(given))
      if (!picked) return refused(`${labelOf(named)} takes one of: ${few(options)}`)
      operations.push(setArea(named.area, [ofKind(named, picked.value)]))
      continue
    }
    const read = typeof given === 'string' ? readValues(context, named, given) : undefined
    if (read && !read.ok) return refused(read.failure.text)
    operations.push(setArea(named.area, read?.value ?? [given]))
  }
  return { kind: 'operations', label, operations }
}

/** Choices are written as text; true / false and whole numbers go into the cell as what they are. */
function ofKind(named: NamedValue, value: string): string | number | boolean {
  if (named.quantity === 'boolean') return value === 'true'
  if (named.quantity === 'text' || value.trim() === '') return value
  const number = Number(value)
  return Number.isFinite(number) ? number : value
}

function few(options: readonly ArgumentOption[]): string {
  const shown = options.slice(0, 8).map(({ value }) => value)
  return shown.join(', ') + (options.length > shown.length ? ', …' : '')
}

function refused(text: string): Effect {
  return { kind: 'refused', text }
}

/** Parts of the house that take a covering: the inputs called `…_covering`. */
const partWords: Readonly<Record<string, string>> = { roof: 'roof', side: 'sides', end: 'ends' }

function coveringInputs(context: CommandContext): readonly NamedValue[] {
  return namedInputs(context).filter(({ name }) => name.endsWith('_covering'))
}

function partOf(named: NamedValue): string {
  return named.name.slice(0, -'_covering'.length)
}

function partOptions(context: CommandContext): readonly ArgumentOption[] {
  const inputs = coveringInputs(context)
  const parts = inputs.map((named) => {
    const part = partOf(named)
    return {
      value: part,
      title: partWords[part] ?? part.replaceAll('_', ' '),
      detail: `now ${coveringTitle(context, named)}`,
      synonyms: [part, `${part} walls`, labelOf(named)],
    }
  })
  if (inputs.length < 2) return parts
  const everything = {
    value: 'all',
    title: 'the whole house',
    detail: parts.map(({ title }) => title).join(', '),
    synonyms: ['all', 'everything', 'house', 'whole'],
  }
  return [...parts, everything]
}

function coveringTitle(context: CommandContext, named: NamedValue): string {
  const code = showNamed(context, named)
  return choicesOf(context, named)?.find(({ value }) => value === code)?.title ?? code
}

function givenParts(context: CommandContext, args: ArgumentValues): readonly NamedValue[] {
  const inputs = coveringInputs(context)
  const part = args.part
  return part === 'all' || part === undefined ? inputs : inputs.filter((named) => partOf(named) === part)
}

const cover: Command = {
  id: 'cover',
  title: 'Cover roof, sides or ends with …',
  phrase: ['Cover', { argument: 'part' }, 'with', { argument: 'covering' }],
  synonyms: ['covering', 'glaze', 'glazing', 'clad', 'sheet the roof', 'change covering'],
  group: 'Estimate',
  keys: ['Alt+Shift+C'],
  when: all(
    mayChange,
    (context) => coveringInputs(context).length > 0 || 'This workbook has no covering inputs',
  ),
  arguments: [
    { kind: 'choice', id: 'part', label: 'a part of the house', options: partOptions },
    {
      kind: 'choice',
      id: 'covering',
      label: 'a covering',
      options: (context, args) => {
        const first = givenParts(context, args)[0] ?? coveringInputs(context)[0]
        return (first && choicesOf(context, first)) ?? []
      },
      compare: ['design_heat_loss', 'quotation_total'],
    },
  ],
  says: (context, args) => {
    const inputs = givenParts(context, args)
    const cells = inputs.map((named) => describeArea(context.workbook, named.area)).join(', ')
    const [first] = inputs
    if (args.part === undefined || !first) return 'Sets the covering of a part of the house.'
    return inputs.length === 1
      ? `Sets ${cells}, now ${coveringTitle(context, first)}.`
      : `Sets ${cells} in one step.`
  },
  run: (context, args) => {
    const inputs = givenParts(context, args)
    if (inputs.length === 0) return refused('That part of the house is no longer there')
    const part = String(args.part ?? 'all')
    const said = part === 'all' ? 'the whole house' : (partWords[part] ?? part)
    return setNamed(context, inputs, args.covering ?? '', `Cover ${said} with ${args.covering}`)
  },
}

export const estimateCommands: readonly Command[] = [cover, setInput]
