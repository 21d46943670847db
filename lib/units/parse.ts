import { fail, type Result, succeed } from '../failures'
import { convertUnit, isMoney, isNumeric, workbookUnit } from './convert'
import { parseDate } from './dates'
import type { Unit } from './definitions'
import { expectationOf, kindWords } from './expectations'
import { readFeetInches } from './feet-inches'
import { findUnit, kindOfUnit, unitKey } from './lookup'
import { isMarkOf, takeCurrency } from './money'
import { plainText, takeNumber, takeSign } from './number-text'
import type { Quantity, UnitSystem } from './quantities'

export interface ParseOptions {
  /** ISO 4217; without it any currency mark is taken to be the workbook's. */
  readonly currency?: string
}

const longest = 200
const isLength = (quantity: Quantity) => quantity === 'length' || quantity === 'small-length'

/**
 * Reads what a person typed as a number in the workbook's unit of that kind. A number without a unit is in that unit
 * already (also after `R` and `U`); a decimal comma is read in an SI workbook or before a metric unit.
 * True and false are 1 and 0, a date is the serial number of its day. Text never has a number: use `parseValue`.
 */
export function parseQuantity(
  text: string,
  quantity: Quantity,
  system: UnitSystem,
  options: ParseOptions = {},
): Result<number> {
  const plain = plainText(text)
  if (plain === '' || text.length > longest) return refuse(quantity, '')
  if (quantity === 'boolean') return parseBoolean(plain)
  if (quantity === 'date') return parseDate(plain) ?? refuse(quantity, '')
  if (!isNumeric(quantity)) return refuse('number', '')
  const { sign, rest } = takeSign(plain)
  if (isMoney(quantity)) return parseMoney(rest, sign, quantity, system, options.currency)
  const read = parseNotation(rest, sign, quantity, system)
  if (!read) return parsePlain(rest, sign, quantity, system)
  return read.ok ? succeed(read.value === 0 ? 0 : sign * read.value) : read
}

/** As `parseQuantity`, but true and false come back as themselves and any text is a text. */
export function parseValue(
  text: string,
  quantity: Quantity,
  system: UnitSystem,
  options: ParseOptions = {},
): Result<number | string | boolean> {
  if (quantity === 'text') return succeed(text)
  const read = parseQuantity(text, quantity, system, options)
  return read.ok && quantity === 'boolean' ? succeed(read.value === 1) : read
}

function refuse(quantity: Quantity, why: string) {
  return fail('invalid', `Expected ${expectationOf(quantity)}${why === '' ? '.' : `; ${why}.`}`)
}

function parseBoolean(text: string): Result<number> {
  const word = text.toLowerCase()
  if (word === 'true' || word === 'yes') return succeed(1)
  if (word === 'false' || word === 'no') return succeed(0)
  return refuse('boolean', '')
}

/** Notations of one kind: feet and inches, pitches, R and U. Undefined when the text is none of them. */
function parseNotation(
  text: string,
  sign: number,
  quantity: Quantity,
  system: UnitSystem,
): Result<number> | undefined {
  if (isLength(quantity)) return parseLength(text, quantity, system)
  if (quantity === 'angle') return parsePitch(text)
  if (quantity === 'u-value' || quantity === 'thermal-resistance') {
    const typed = /^([ru])[\s=-]*(?=[\d.])/i.exec(text)
    if (!typed || sign < 0) return undefined
    const written = typed[1]?.toLowerCase() === 'r' ? 'thermal-resistance' : 'u-value'
    const read = parsePlain(text.slice(typed[0].length), 1, written, system)
    if (!read.ok || written === quantity) return read
    return read.value > 0
      ? succeed(1 / read.value)
      : refuse(quantity, 'its reciprocal needs a number above 0')
  }
  return undefined
}

function parseLength(text: string, quantity: Quantity, system: UnitSystem): Result<number> | undefined {
  const bare = system === 'si' ? undefined : quantity === 'length' ? 'ft' : 'in'
  const read = readFeetInches(text, bare)
  if (read.kind === 'other') return undefined
  if (read.kind === 'refused') return refuse(quantity, read.why)
  if (read.decimalComma && system === 'us') return refuse(quantity, commaWords)
  const unit = findUnit(read.unit, quantity)
  return unit ? succeed(convertUnit(read.value, unit, workbookUnit(quantity, system))) : undefined
}

/** Rise to run, as roofs are drawn: `6:12`, and `6/12`, which as a fraction of a degree nobody means. */
function parsePitch(text: string): Result<number> | undefined {
  const pitch = /^([\d.]+)\s*:\s*([\d.]+)$/.exec(text) ?? /^([\d.]+)\s*\/\s*(12)$/.exec(text)
  if (!pitch) return text.includes('/') ? refuse('angle', 'a pitch is written 6:12') : undefined
  const [rise, run] = [Number(pitch[1]), Number(pitch[2])]
  if (!Number.isFinite(rise) || !Number.isFinite(run) || run === 0) return refuse('angle', '')
  return succeed((Math.atan2(rise, run) * 180) / Math.PI)
}

const commaWords = 'a comma groups thousands here (1,250.5)'

function parsePlain(text: string, sign: number, quantity: Quantity, system: UnitSystem): Result<number> {
  const typed = takeNumber(text)
  if (!typed) return refuse(quantity, strangerWords(text, quantity))
  const usual = workbookUnit(quantity, system)
  const unit = typed.rest === '' ? usual : findUnit(typed.rest, quantity)
  if (!unit) return refuse(quantity, unitWords(typed.rest, quantity))
  if (typed.decimalComma && !commaAllowed(unit, system)) return refuse(quantity, commaWords)
  return finite(convertUnit(sign * typed.value, unit, usual), quantity)
}

function parseMoney(
  text: string,
  sign: number,
  quantity: Quantity,
  system: UnitSystem,
  currency: string | undefined,
): Result<number> {
  const before = takeCurrency(text)
  const inner = takeSign(before.rest)
  const typed = takeNumber(inner.rest)
  if (!typed) return refuse(quantity, strangerWords(text, quantity))
  const after = takeCurrency(typed.rest)
  for (const mark of [before.mark, after.mark]) {
    if (mark !== undefined && currency !== undefined && !isMarkOf(mark, currency)) {
      return refuse(quantity, `the workbook counts in ${currency}, not ${mark}`)
    }
  }
  const usual = workbookUnit(quantity, system)
  const unit = after.rest === '' ? usual : findUnit(after.rest, quantity)
  if (!unit) return refuse(quantity, unitWords(after.rest, quantity))
  if (typed.decimalComma && !commaAllowed(unit, system)) return refuse(quantity, commaWords)
  return finite(convertUnit(sign * inner.sign * typed.value, unit, usual), quantity)
}

function commaAllowed(unit: Unit, system: UnitSystem): boolean {
  return system === 'si' || unit.system === 'si'
}

function finite(value: number, quantity: Quantity): Result<number> {
  return Number.isFinite(value) ? succeed(value === 0 ? 0 : value) : refuse(quantity, '')
}

function unitWords(typed: string, quantity: Quantity): string {
  const shown = typed.length > 30 ? `${typed.slice(0, 30)}…` : typed
  if (takeCurrency(typed).mark !== undefined) return `${shown} is money`
  const kind = unitKey(typed) === '' ? undefined : kindOfUnit(typed)
  return kind && kind !== quantity ? `${shown} is ${kindWords(kind)}` : `“${shown}” is no unit of it`
}

/** Why a text that does not begin with a number is refused, where that can be told. */
function strangerWords(text: string, quantity: Quantity): string {
  if (takeCurrency(text).mark !== undefined && !isMoney(quantity)) return `${text.slice(0, 30)} is money`
  const letter = /^([ru])[\s=-]*[\d.]/i.exec(text)?.[1]?.toLowerCase()
  if (letter === 'r') return `${text.slice(0, 30)} is a thermal resistance`
  return letter === 'u' ? `${text.slice(0, 30)} is a U-value` : ''
}
