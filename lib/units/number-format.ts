import { isMoney, workbookUnit } from './convert'
import { digitsOf } from './digits'
import { currencyDigits, currencySign } from './money'
import type { Quantity, UnitSystem } from './quantities'

/**
 * A number format code (ECMA-376 part 1, 18.8.31) that shows a stored number in its unit: `#,##0.00" m²"`.
 * The number itself is left alone, so a US length is in decimal feet here. `unit` is one that is not of a kind.
 */
export function numberFormat(
  quantity: Quantity,
  system: UnitSystem,
  currency = '',
  digits?: number,
  unit?: string,
): string {
  if (quantity === 'text') return '@'
  if (quantity === 'boolean') return 'General'
  if (quantity === 'date') return 'yyyy-mm-dd'
  if (isMoney(quantity)) {
    const after = digits ?? (currency === '' ? 2 : currencyDigits(currency))
    return `${currencyCode(currency)}#,##0${point(after, after)}${quoted(unit ?? workbookUnit(quantity, system).symbol)}`
  }
  const { least, most } = digitsOf(quantity, system, digits)
  if (quantity === 'ratio') return `0${point(least, most)}%`
  if (quantity === 'expansion') return `0${point(least, most)}E+00${suffix('1/', quantity, system, unit)}`
  // Optional digits would leave a bare point behind ("12."), so such numbers are General and lose only the grouping.
  const number = least === most ? `#,##0${point(least, most)}` : 'General'
  return number + suffix('1/', quantity, system, unit)
}

function suffix(leading: string, quantity: Quantity, system: UnitSystem, unit: string | undefined): string {
  const symbol = unit ?? workbookUnit(quantity, system).symbol
  if (symbol === '') return ''
  if (symbol === '°') return quoted(symbol)
  return quoted(` ${symbol.startsWith(leading) ? symbol.slice(leading.length - 1) : symbol}`)
}

function point(least: number, most: number): string {
  return most === 0 ? '' : `.${'0'.repeat(least)}${'#'.repeat(most - least)}`
}

/** Dollars of the United States carry their locale, as spreadsheets write them; other signs stand alone. */
function currencyCode(currency: string): string {
  if (currency === '') return ''
  if (currency === 'USD') return '[$$-409]'
  const sign = currencySign(currency)
  return `[$${sign}]${/[A-Z]$/.test(sign) ? ' ' : ''}`
}

function quoted(text: string): string {
  const shown = text.replace(/["\p{Cc}]/gu, '')
  return shown === '' ? '' : `"${shown}"`
}
