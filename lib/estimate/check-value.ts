import { fail, type Result, succeed } from '../failures'
import {
  convert,
  expectationOf,
  formatQuantity,
  parseQuantity,
  type Quantity,
  type UnitSystem,
} from '../units'
import type { Choices, Limits, Scalar } from './declare'
import { nearest, quoted } from './nearest'

/** What a value must be, wherever it is given: by an input's name, in a table's column, in an opening. */
export interface Expected {
  /** How messages call it. */
  readonly name: string
  readonly quantity: Quantity
  readonly limits?: Limits
  readonly choices?: Choices
}

export interface Surroundings {
  readonly system: UnitSystem
  readonly currency: string
  /** Codes of a table, those that overrides add among them. */
  readonly codes: (table: string) => readonly string[]
}

const longestText = 200
const largest = 1e12

/** The value as a cell of the workbook holds it: a number in the workbook's units, or a text marked as text. */
export function checkValue(expected: Expected, value: unknown, around: Surroundings): Result<Scalar> {
  const { name, quantity } = expected
  if (quantity === 'text') return checkText(expected, value, around)
  if (quantity === 'boolean') {
    if (typeof value === 'boolean') return succeed(value)
    const read = typeof value === 'string' ? parseQuantity(value, quantity, around.system) : undefined
    return read?.ok ? succeed(read.value === 1) : refuse(name, 'true or false')
  }
  if (typeof value === 'number') return checkNumber(expected, value, around)
  if (typeof value !== 'string') return refuse(name, expectationOf(quantity))
  const read = parseQuantity(value, quantity, around.system, { currency: around.currency })
  if (read.ok) return checkNumber(expected, read.value, around)
  return fail('invalid', `${name}: ${lowerFirst(read.failure.text)}`, { name })
}

function checkNumber(expected: Expected, value: number, { system, currency }: Surroundings): Result<number> {
  const { name, quantity, limits = {} } = expected
  if (!Number.isFinite(value) || Math.abs(value) > largest) return refuse(name, expectationOf(quantity))
  const own = (bound: number): number => convert(bound, quantity, limits.in ?? 'us', system)
  const show = (bound: number): string => formatQuantity(own(bound), quantity, system, { currency })
  const { min, max, above, whole } = limits
  if (
    (min !== undefined && value < own(min)) ||
    (max !== undefined && value > own(max)) ||
    (above !== undefined && value <= own(above)) ||
    (whole && !Number.isInteger(value))
  ) {
    const number = whole ? 'a whole number' : 'a value'
    const from = above === undefined ? min : above
    const low = from === undefined ? '' : above === undefined ? `from ${show(from)}` : `above ${show(from)}`
    const high = max === undefined ? '' : low.startsWith('from') ? `to ${show(max)}` : `up to ${show(max)}`
    const range = low !== '' && high.startsWith('up') ? `${low} and ${high}` : `${low} ${high}`.trim()
    return refuse(name, `${number} ${range}`)
  }
  return succeed(value === 0 ? 0 : value)
}

function checkText(expected: Expected, value: unknown, around: Surroundings): Result<string> {
  const { name, choices } = expected
  if (typeof value !== 'string') return refuse(name, expectationOf('text'))
  if (choices !== undefined) {
    const list = typeof choices === 'string' ? around.codes(choices) : choices
    const found = list.find((choice) => choice.toLowerCase() === value.trim().toLowerCase())
    if (found !== undefined) return succeed(found)
    const near = nearest(value, list)
    const known = typeof choices === 'string' ? `a code of ${choices.replaceAll('_', ' ')}` : list.join(', ')
    return refuse(name, `${known}; the nearest to ${quoted(value)} is ${near}`)
  }
  if (value.length > longestText) return refuse(name, `a text of at most ${longestText} characters`)
  if (/[\p{Cc}\p{Cs}\p{Zl}\p{Zp}]/u.test(value)) return refuse(name, 'a text without control characters')
  return succeed(asText(value))
}

/** A text that begins like a formula, or with the mark that makes it none, keeps that mark in front. */
export function asText(text: string): string {
  return text.startsWith('=') || text.startsWith("'") ? `'${text}` : text
}

function refuse(name: string, what: string) {
  return fail('invalid', `${name}: expected ${what}.`, { name })
}

const lowerFirst = (text: string): string => text.charAt(0).toLowerCase() + text.slice(1)
