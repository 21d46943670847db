import type { NamedValue } from '../workbook'
import { all, hasInputs, mayChange } from './availability'
import type { ArgumentOption, ArgumentValues, Command, CommandContext } from './command'
import { coveringInputs, coveringTitle, givenParts, partOptions, sayPart } from './coverings'
import { labelInSentence, labelOf, namedInputs } from './inputs'
import { showNamed } from './measures'
import { describeArea } from './references'
import { refused, setNamed } from './set-named'
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
    return setNamed(context, inputs, args.covering ?? '', `Cover ${sayPart(args)} with ${args.covering}`)
  },
}

export const estimateCommands: readonly Command[] = [cover, setInput]
