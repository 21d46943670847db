import { fail, type Result, succeed } from '../failures'
import { all, mayChange } from './availability'
import type { ArgumentValues, Command, CommandContext, Trial } from './command'
import { coveringInputs, givenParts, partOptions, sayPart } from './coverings'
import { refused, setNamed } from './set-named'
import { choicesOf, textOf } from './tables'

/** The figures that coverings are weighed by: the first of each list that the workbook names. */
const figures = [
  ['quotation_total'],
  ['annual_heat_demand', 'annual_fuel_cost', 'design_heat_loss'],
  ['darkest_month_light', 'covering_light_transmittance'],
] as const

/** One trial for each row of the Coverings table: that covering on the part of the house that the arguments name. */
export function coveringTrials(context: CommandContext, args: ArgumentValues): Result<readonly Trial[]> {
  const inputs = givenParts(context, args)
  const [first] = inputs
  const options = first && choicesOf(context, first)
  if (!options || options.length === 0) {
    return fail('invalid', 'That part of the house takes no covering from a table')
  }
  const trials: Trial[] = []
  for (const { value, title } of options) {
    const label = `Cover ${sayPart(args)} with ${value}`
    const effect = setNamed(context, inputs, value, label)
    if (effect.kind !== 'operations') {
      return fail('invalid', effect.kind === 'refused' ? effect.text : 'That covering cannot be set')
    }
    trials.push({ code: value, title, label, operations: effect.operations })
  }
  return succeed(trials)
}

/** The code that every one of the inputs holds now. */
function presentCode(context: CommandContext, args: ArgumentValues): string | undefined {
  const codes = new Set(givenParts(context, args).map(({ name }) => textOf(context.named(name)?.[0] ?? null)))
  const [code] = codes
  return codes.size === 1 && code !== '' ? code : undefined
}

export const tryEvery: Command = {
  id: 'try-every-covering',
  title: 'Try every covering on …',
  phrase: ['Try every covering on', { argument: 'part' }],
  synonyms: ['compare coverings', 'which covering', 'try all coverings', 'best covering', 'plot coverings'],
  group: 'Estimate',
  when: all(
    mayChange,
    (context) => coveringInputs(context).length > 0 || 'This workbook has no covering inputs',
  ),
  arguments: [{ kind: 'choice', id: 'part', label: 'a part of the house', options: partOptions }],
  says: (context, args) => {
    const trials = coveringTrials(context, args)
    const count = trials.ok ? `each of ${trials.value.length} coverings` : 'each covering'
    return `Computes the whole workbook for ${count}, and shows price, yearly heat and winter light. Nothing changes until you choose one.`
  },
  run: (context, args) => {
    const trials = coveringTrials(context, args)
    if (!trials.ok) return refused(trials.failure.text)
    const names = figures.flatMap((list) => {
      const name = list.find((one) => context.workbook.names.has(one))
      return name === undefined ? [] : [name]
    })
    if (names.length === 0) return refused('This workbook names no price, heat or light to compare')
    return {
      kind: 'try-every',
      label: `Try every covering on ${sayPart(args)}`,
      part: sayPart(args),
      trials: trials.value,
      now: presentCode(context, args),
      names,
    }
  },
}
