import { currencyDigits, isMoney, isNumeric, type Quantity } from '../units'
import { cellAt, isFormula, type NamedValue } from '../workbook'
import { all, hasInputs, mayChange, sheetIsOpen } from './availability'
import type { ArgumentOption, ArgumentValues, Command, CommandContext } from './command'
import { labelInSentence, labelOf, namedInputs } from './inputs'
import { currencyOf, readValues, showNamed, showValue } from './measures'
import { refused } from './set-named'
import { choicesOf } from './tables'

const isSingle = ({ area }: NamedValue) => area.rowCount === 1 && area.columnCount === 1

/** Results with one number, in the order of the sheets' names. */
function results(context: CommandContext): readonly NamedValue[] {
  return [...context.workbook.names.values()].filter(
    (named) => named.role === 'result' && isSingle(named) && isNumeric(named.quantity),
  )
}

/** Inputs that can take any number of a range: no choices, no whole counts, no formula that would be lost. */
function changeable(context: CommandContext): readonly NamedValue[] {
  return namedInputs(context).filter(
    (named) =>
      isSingle(named) &&
      isNumeric(named.quantity) &&
      named.quantity !== 'count' &&
      !isFormula(cellAt(context.workbook, named.area)?.input) &&
      typeof context.named(named.name)?.[0] === 'number' &&
      choicesOf(context, named) === undefined,
  )
}

function options(context: CommandContext, list: readonly NamedValue[]): readonly ArgumentOption[] {
  return list.map((named) => ({
    value: named.name,
    title: labelInSentence(named),
    detail: showNamed(context, named),
    synonyms: [labelOf(named), named.name.replaceAll('_', ' ')],
  }))
}

function given(
  list: readonly NamedValue[],
  name: ArgumentValues[string] | undefined,
): NamedValue | undefined {
  return list.find((named) => named.name === name)
}

/** Kinds that may lie below nothing; all others begin at 0. */
const signed: ReadonlySet<Quantity> = new Set(['temperature', 'temperature-difference', 'angle', 'number'])

export const solveCommand: Command = {
  id: 'solve-for',
  title: 'Solve for …',
  phrase: [
    'Solve for',
    { argument: 'result' },
    'to be',
    { argument: 'target' },
    'by changing',
    { argument: 'input' },
  ],
  synonyms: ['goal', 'target', 'find the input', 'work back', 'what must', 'reach'],
  group: 'Estimate',
  when: all(
    mayChange,
    hasInputs,
    (context) => results(context).length > 0 || 'This workbook has no named results',
  ),
  arguments: [
    {
      kind: 'choice',
      id: 'result',
      label: 'a named result',
      options: (context) => options(context, results(context)),
    },
    {
      kind: 'quantity',
      id: 'target',
      label: 'what it is to be',
      named: (context, { result }) => given(results(context), result),
    },
    {
      kind: 'choice',
      id: 'input',
      label: 'a named input to change',
      options: (context) => options(context, changeable(context)),
    },
  ],
  says: (context, { result, input }) => {
    const [wanted, changed] = [given(results(context), result), given(changeable(context), input)]
    if (!wanted) return 'Finds the input that brings a result to what you want.'
    const now = `${labelOf(wanted)} is ${showNamed(context, wanted)} now`
    return changed
      ? `Tries out ${labelInSentence(changed)}, now ${showNamed(context, changed)}, until it fits. ${now}.`
      : `${now}.`
  },
  run: (context, { result, input, target }) => {
    const wanted = given(results(context), result)
    const changed = given(changeable(context), input)
    if (!wanted) return refused('That result is no longer there')
    if (!changed) return refused('That input is no longer there, or no single number')
    const open = sheetIsOpen(context, changed.area.sheet)
    if (open !== true) return refused(open)
    const read = readValues(context, wanted, String(target ?? ''))
    if (!read.ok) return refused(read.failure.text)
    const [value] = read.value
    const from = context.named(changed.name)?.[0]
    if (typeof value !== 'number')
      return refused(`Give ${labelInSentence(wanted)} as a number, not as a formula`)
    if (typeof from !== 'number') return refused(`${labelOf(changed)} holds no number`)
    return {
      kind: 'solve',
      label: `Solve ${labelInSentence(wanted)} for ${showValue(context, value, wanted.quantity)}`,
      result: wanted.name,
      target: value,
      tolerance: toleranceOf(context, wanted.quantity, value),
      input: changed.name,
      from,
      ...(from >= 0 && !signed.has(changed.quantity) ? { low: 0 } : {}),
    }
  },
}

/** Money to half of its smallest coin, whole counts exactly, anything else to a billionth. */
function toleranceOf(context: CommandContext, quantity: Quantity, target: number): number {
  if (isMoney(quantity)) return 0.5 * 10 ** -currencyDigits(currencyOf(context) ?? '') + 1e-9
  return quantity === 'count' ? 0 : 1e-9 * Math.max(1, Math.abs(target))
}
