import { convert, isNumeric } from '../../units/convert'
import type { Quantity, UnitSystem } from '../../units/quantities'
import type { Cell, Sheet } from '../model'

/** What a cell's number is a number of: its format says so, else its column. */
export function quantityOf(cell: Cell | undefined, sheet: Sheet, column: number): Quantity | undefined {
  return cell?.format?.quantity ?? sheet.columns[column]?.quantity
}

/**
 * A number in the other system's notation; the same number when its kind has one unit in both.
 *
 * W34 Of the numbers that mean the same, the one of at most 13 digits is written that converts back to exactly this one, so that
 *     what a person typed comes back as typed (24.1 ft is 7.34568 m is 24.1 ft, not 24.099999999999998 ft).
 */
export function convertNumber(
  value: number,
  quantity: Quantity | undefined,
  from: UnitSystem,
  to: UnitSystem,
): number {
  if (from === to || quantity === undefined || !isNumeric(quantity)) return value
  const converted = convert(value, quantity, from, to)
  if (converted === value) return value
  const short = Number(converted.toPrecision(13))
  const chosen = short !== converted && convert(short, quantity, to, from) === value ? short : converted
  return chosen === 0 ? 0 : chosen
}

/** Whether `other` is `value` but for the last bits that a conversion loses, measured on the scale of the kind's zero. */
export function isNearly(
  other: number,
  value: number,
  quantity: Quantity,
  from: UnitSystem,
  to: UnitSystem,
): boolean {
  const zero = Math.abs(convert(0, quantity, from, to))
  const scale = Math.max(Math.abs(value), Math.abs(other), zero, 1e-290)
  return Math.abs(other - value) <= scale * 1e-12
}
