import { definitions, kindOf, type Unit } from './definitions'
import { quotient } from './fraction'
import type { Quantity, UnitSystem } from './quantities'

/** How a number of the unit becomes one of its kind's base unit: (value - zero) * times / over. */
export interface ToBase {
  readonly times: number
  readonly over: number
  readonly zero: number
}

export interface QuantityUnit {
  /** As printed beside a number or in a heading; empty where a number stands alone. */
  readonly symbol: string
  readonly title: string
  readonly toBase: ToBase
}

const units = new Map<string, Unit>()

/** The unit that numbers of this kind are written in, in a workbook of this system. */
export function workbookUnit(quantity: Quantity, system: UnitSystem): Unit {
  const key = `${quantity} ${system}`
  let unit = units.get(key)
  if (!unit) {
    const known = definitions[kindOf(quantity)]
    const small = system === 'us' ? 'in' : 'mm'
    unit = known.find((u) =>
      quantity === 'small-length' ? u.symbol === small : u.system === undefined || u.system === system,
    )
    if (!unit) throw new Error(`no unit of ${quantity} in ${system}`)
    units.set(key, unit)
  }
  return unit
}

/** Money is counted in `currency` (ISO 4217); without one its symbol is left out. */
export function unitOf(quantity: Quantity, system: UnitSystem, currency = ''): QuantityUnit {
  const unit = workbookUnit(quantity, system)
  return {
    symbol: isMoney(quantity) ? `${currency}${unit.symbol}` : unit.symbol,
    title: unit.title,
    toBase: { times: Number(unit.factor.times), over: Number(unit.factor.over), zero: unit.zero },
  }
}

export function isMoney(quantity: Quantity): boolean {
  return quantity === 'money' || quantity.startsWith('money-')
}

/** Kinds whose value is a number with a unit or none; text, dates and true / false are not. */
export function isNumeric(quantity: Quantity): boolean {
  return quantity !== 'text' && quantity !== 'boolean' && quantity !== 'date'
}

/** A number of a workbook in one system, as a workbook in the other writes it. Money is not exchanged. */
export function convert(value: number, quantity: Quantity, from: UnitSystem, to: UnitSystem): number {
  if (from === to) return value
  return convertUnit(value, workbookUnit(quantity, from), workbookUnit(quantity, to))
}

/** Between two units of one kind; the factor is reduced exactly first, so that whole ratios stay whole. */
export function convertUnit(value: number, from: Unit, to: Unit): number {
  if (from === to) return value
  const step = stepBetween(from, to)
  const shifted = from.zero === 0 ? value : value - from.zero
  const scaled = step.over === 1 ? shifted * step.times : (shifted * step.times) / step.over
  return to.zero === 0 ? scaled : scaled + to.zero
}

type Step = Pick<ToBase, 'times' | 'over'>
const steps = new WeakMap<Unit, WeakMap<Unit, Step>>()

function stepBetween(from: Unit, to: Unit): Step {
  const known = steps.get(from) ?? new WeakMap<Unit, Step>()
  steps.set(from, known)
  const found = known.get(to)
  if (found) return found
  const { times, over } = quotient(from.factor, to.factor)
  const step = { times: Number(times), over: Number(over) }
  known.set(to, step)
  return step
}
