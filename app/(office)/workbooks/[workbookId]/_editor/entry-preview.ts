import { convert, formatQuantity, isMoney, isNumeric } from '@/lib/units'
import type { CellAddress } from '@/lib/workbook'
import { formatOf } from '../_grid/cell-content'
import type { Editing } from '../_grid/editing'
import { readEntry } from '../_grid/entry'
import type { WorkbookSession } from './session-contract'

/**
 * What a typed quantity comes to: as the cell will print it, or, where that is what was typed, in the other
 * system's units. Undefined for anything that is no quantity, and for what does not read yet.
 */
export function entryPreview(
  session: WorkbookSession,
  editing: Editing,
  { row, column }: CellAddress,
  text: string,
): string | undefined {
  const { sheet } = editing
  if (!sheet || text.trim() === '' || text.startsWith('=')) return undefined
  const { quantity, digits } = formatOf(sheet, sheet.rows[row]?.[column], column)
  if (quantity === undefined || !isNumeric(quantity)) return undefined
  const context = editing.context(sheet)
  const read = readEntry(context, text, row, column)
  if (!read.ok || typeof read.value.input !== 'number') return undefined
  const { system } = session.workbook
  const options = {
    ...(digits === undefined ? {} : { digits }),
    ...(context.currency === undefined ? {} : { currency: context.currency }),
  }
  const own = formatQuantity(read.value.input, quantity, system, options)
  if (bare(own) !== bare(text)) return own
  if (isMoney(quantity)) return undefined
  const other = system === 'us' ? 'si' : 'us'
  const converted = formatQuantity(convert(read.value.input, quantity, system, other), quantity, other)
  return bare(converted) === bare(own) ? undefined : converted
}

const bare = (text: string) => text.replace(/\s/g, '').toLowerCase()
