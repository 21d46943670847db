import { formatQuantity } from './format'
import { parseQuantity } from './parse'
import type { Quantity, UnitSystem } from './quantities'

/**
 * A text for the cell editor that reads back to exactly this number: the printed one where that loses nothing
 * (`12' 6 1/2"`, `30%`), else every digit in the workbook's unit. Empty for what is not finite.
 */
export function editText(value: number, quantity: Quantity, system: UnitSystem): string {
  if (!Number.isFinite(value)) return ''
  if (quantity === 'boolean') return value === 0 ? 'no' : 'yes'
  if (quantity === 'date') {
    const date = formatQuantity(value, quantity, system)
    return Number.isInteger(value) && date !== '' ? date : plain(value)
  }
  if (quantity === 'length' || quantity === 'small-length') {
    const printed = formatQuantity(value, quantity, system)
    if (system === 'us' && readsBack(printed, value, quantity, system)) return printed
  }
  if (quantity === 'ratio') {
    const percent = `${plain(Number((value * 100).toPrecision(15)))}%`
    if (percent.length < 8 && readsBack(percent, value, quantity, system)) return percent
  }
  return plain(value)
}

function plain(value: number): string {
  return String(value === 0 ? 0 : value)
}

function readsBack(text: string, value: number, quantity: Quantity, system: UnitSystem): boolean {
  const read = parseQuantity(text, quantity, system)
  return read.ok && read.value === value
}
