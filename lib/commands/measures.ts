import { fail, type Result, succeed } from '../failures'
import {
  convert,
  expectationOf,
  formatQuantity,
  isNumeric,
  parseQuantity,
  type Quantity,
  type UnitSystem,
  unitOf,
} from '../units'
import type { CellValue, NamedValue } from '../workbook'
import { isCellError } from '../workbook'
import type { CommandContext } from './command'
import { cellsOf } from './inputs'

type Value = string | number | boolean

/** The workbook's currency (ISO 4217), when it says one. */
export function currencyOf(context: CommandContext): string | undefined {
  const value = context.named('currency')?.[0]
  return typeof value === 'string' && /^[A-Z]{3}$/.test(value) ? value : undefined
}

/** A value as the workbook shows it, with its unit; blank is "blank", an error its code. */
export function showValue(context: CommandContext, value: CellValue, quantity: Quantity): string {
  if (value === null || value === '') return 'blank'
  if (isCellError(value)) return value.error
  if (typeof value === 'boolean') return value ? 'yes' : 'no'
  if (typeof value === 'string' || !isNumeric(quantity)) return String(value)
  return formatQuantity(value, quantity, context.system, { currency: currencyOf(context) ?? '' })
}

/** What a named value holds now, in words. */
export function showNamed(context: CommandContext, named: NamedValue): string {
  const values = context.named(named.name) ?? cellsOf(named.area).map((cell) => context.value(cell))
  if (values.length <= 1) return showValue(context, values[0] ?? null, named.quantity)
  return `${values.length} values`
}

/**
 * Reads what was typed for a named value, in the workbook's units. An area of several cells takes one value
 * for all or one for each, parted by `;`. The failure says what was expected.
 */
export function readValues(
  context: CommandContext,
  named: NamedValue,
  text: string,
): Result<readonly Value[]> {
  const expected = named.area.rowCount * named.area.columnCount
  const parts = expected > 1 ? text.split(';').map((part) => part.trim()) : [text.trim()]
  if (parts.length !== 1 && parts.length !== expected) {
    return fail('invalid', `Give one value, or ${expected} parted by ";" (there are ${parts.length})`)
  }
  const values: Value[] = []
  for (const part of parts) {
    const read = readValue(context, named.quantity, part)
    if (!read.ok) return read
    values.push(read.value)
  }
  return succeed(values)
}

function readValue(context: CommandContext, quantity: Quantity, text: string): Result<Value> {
  if (text === '') return fail('invalid', `Expected ${expectationOf(quantity)}.`)
  if (text.startsWith('=')) return succeed(text)
  if (!isNumeric(quantity)) return succeed(text)
  return parseQuantity(text, quantity, context.system, { currency: currencyOf(context) ?? '' })
}

/** "24' = 7.315 m": what was typed, in the other system's unit too, so that a slip of unit is seen. */
export function unitHint(context: CommandContext, named: NamedValue, text: string): string | undefined {
  const { quantity } = named
  const read = readValues(context, named, text)
  const value = read.ok ? read.value[0] : undefined
  if (typeof value !== 'number' || !isNumeric(quantity)) return undefined
  const other: UnitSystem = context.system === 'us' ? 'si' : 'us'
  const currency = currencyOf(context) ?? ''
  const typed = text.trim()
  const here = formatQuantity(value, quantity, context.system, { currency })
  if (unitOf(quantity, 'us').symbol === unitOf(quantity, 'si').symbol) {
    return typed === here ? undefined : `${typed} = ${here}`
  }
  const converted = convert(value, quantity, context.system, other)
  const there = formatQuantity(converted, quantity, other, { currency })
  // The number as typed says whether it was in the workbook's own unit, in the other's, or in a third.
  const number = Number(/\d+(?:\.\d+)?/.exec(typed)?.[0])
  const isBare = /^[-+]?[\d.,]+$/.test(typed)
  const near = (one: number) => Math.abs(Math.abs(one) - number) < 1e-9 * Math.max(1, number)
  const steps = isBare
    ? [here, there]
    : near(value)
      ? [typed, there]
      : near(converted)
        ? [typed, here]
        : [typed, here, there]
  return steps.filter((step, index) => steps.indexOf(step) === index).join(' = ')
}
