import { isMoney, unitOf, workbookUnit } from './convert'
import { formatDate } from './dates'
import { digitsOf } from './digits'
import { moneyFormat } from './money'
import type { Quantity, UnitSystem } from './quantities'

export interface FormatOptions {
  /** Digits after the point; a US length is then in decimals instead of sixteenths. */
  readonly digits?: number
  /** ISO 4217; without it money is a plain number. */
  readonly currency?: string
  /** False leaves the unit off (a heading says it). Foot and inch marks and the per cent sign always stay. */
  readonly unit?: boolean
}

/**
 * A number of the workbook's unit of that kind, as printed: grouped, in sixteenths of an inch or to the millimetre,
 * money by its currency's custom, never a negative zero. What is not finite prints as nothing.
 */
export function formatQuantity(
  value: number,
  quantity: Quantity,
  system: UnitSystem,
  options: FormatOptions = {},
): string {
  if (!Number.isFinite(value)) return ''
  if (quantity === 'boolean') return value === 0 ? 'no' : 'yes'
  if (quantity === 'date') return formatDate(value)
  const withUnit = options.unit !== false
  if (isMoney(quantity)) {
    const amount = moneyFormat(options.currency ?? '', options.digits).format(value)
    return withUnit ? amount + workbookUnit(quantity, system).symbol : amount
  }
  const isLength = quantity === 'length' || quantity === 'small-length'
  if (isLength && system === 'us' && options.digits === undefined) {
    return quantity === 'length' ? feetAndInches(value * 12) : smallInches(value)
  }
  const { least, most } = digitsOf(quantity, system, options.digits)
  if (quantity === 'ratio') return `${grouped(value * 100, least, most)}%`
  const number = quantity === 'expansion' ? scientific(value, most) : grouped(value, least, most)
  const { symbol } = unitOf(quantity, system)
  if (!withUnit || symbol === '') return number
  return symbol === '°' ? number + symbol : `${number} ${symbol.replace(/^1\//, '/')}`
}

const formats = new Map<string, Intl.NumberFormat>()

function grouped(value: number, least: number, most: number): string {
  const key = `${least} ${most}`
  let format = formats.get(key)
  if (!format) {
    format = new Intl.NumberFormat('en-US', {
      minimumFractionDigits: least,
      maximumFractionDigits: most,
      signDisplay: 'negative',
    })
    formats.set(key, format)
  }
  return format.format(value)
}

/** `6.50e-5`: coefficients far below one keep their digits. */
function scientific(value: number, digits: number): string {
  return value === 0 ? '0' : value.toExponential(digits)
}

/** To the nearest sixteenth of an inch: `12' 6 1/2"`, `24' 0"`, `7/8"`. */
function feetAndInches(inches: number): string {
  const sixteenths = Math.round(Math.abs(inches) * 16)
  if (!Number.isSafeInteger(sixteenths)) return `${grouped(inches / 12, 0, 0)} ft`
  const sign = inches < 0 && sixteenths > 0 ? '-' : ''
  const feet = Math.floor(sixteenths / 192)
  const rest = inchText(sixteenths - feet * 192)
  return feet === 0 ? `${sign}${rest}` : `${sign}${grouped(feet, 0, 0)}' ${rest}`
}

/** As above in inches alone; what is too thin for a sixteenth (a film) is in decimals. */
function smallInches(inches: number): string {
  const sixteenths = Math.round(Math.abs(inches) * 16)
  if (!Number.isSafeInteger(sixteenths)) return `${grouped(inches, 0, 0)} in`
  if (sixteenths === 0 && inches !== 0) return `${Number(inches.toPrecision(3))} in`
  return `${inches < 0 && sixteenths > 0 ? '-' : ''}${inchText(sixteenths)}`
}

function inchText(sixteenths: number): string {
  const whole = Math.floor(sixteenths / 16)
  let over = sixteenths - whole * 16
  let under = 16
  if (over === 0) return `${grouped(whole, 0, 0)}"`
  while (over % 2 === 0) {
    over /= 2
    under /= 2
  }
  return whole === 0 ? `${over}/${under}"` : `${grouped(whole, 0, 0)} ${over}/${under}"`
}
