import { type Area, areaName, parseCellName, sheetById, sheetByName, type Workbook } from '../workbook'
import type { Selection } from './command'

/** `Heat B7`: as people say it, with the sheet before it. */
export function describeArea(workbook: Workbook, area: Area): string {
  return `${sheetById(workbook, area.sheet)?.name ?? area.sheet} ${areaName(area)}`
}

interface Parts {
  readonly sheet: string | undefined
  readonly cells: string
}

/** `'Sheets in stock'!B7`, `Heat!B7`, and `heat b7` where a sheet of that name exists (else those are words). */
function split(workbook: Workbook, text: string): Parts {
  const marked = /^(?:'([^']+)'|([^!]+?))\s*!\s*(\S+)$/.exec(text)
  if (marked) return { sheet: marked[1] ?? marked[2], cells: marked[3] ?? '' }
  const spaced = /^(\S.*?)\s+(\S+)$/.exec(text)
  if (spaced && sheetByName(workbook, spaced[1] ?? '')) return { sheet: spaced[1], cells: spaced[2] ?? '' }
  return { sheet: undefined, cells: text }
}

/**
 * Reads a cell or a range (`B7:D9`) with or without its sheet.
 * `undefined` when the text is no reference at all; a sentence when it is one that leads nowhere.
 */
export function readReference(
  workbook: Workbook,
  text: string,
  current: string,
): Selection | string | undefined {
  const parts = split(workbook, text.trim())
  const [first = '', last = first, ...more] = parts.cells.split(':')
  const from = parseCellName(first)
  const to = parseCellName(last)
  if (!from || !to || more.length > 0) return undefined
  const sheet =
    parts.sheet === undefined ? sheetById(workbook, current) : sheetByName(workbook, parts.sheet.trim())
  if (!sheet) return parts.sheet === undefined ? 'Open a sheet first' : `No sheet is called ${parts.sheet}`
  const row = Math.min(from.row, to.row)
  const column = Math.min(from.column, to.column)
  const rowCount = Math.abs(from.row - to.row) + 1
  const columnCount = Math.abs(from.column - to.column) + 1
  if (row + rowCount > sheet.rowCount || column + columnCount > sheet.columns.length) {
    const whole = { row: 0, column: 0, rowCount: sheet.rowCount, columnCount: sheet.columns.length }
    return `${sheet.name} ends at ${areaName(whole).split(':').at(-1)}`
  }
  return { sheet: sheet.id, row, column, rowCount, columnCount }
}
