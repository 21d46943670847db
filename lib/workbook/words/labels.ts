import { areaName } from '../address'
import type { CellAddress } from '../contracts'
import type { Reference } from '../formula/reference'
import { namedAt, sheetById, sheetByName } from '../lookup'
import type { Sheet, Workbook } from '../model'

/** A label inside a sentence: its first letter small, unless it is an abbreviation or a symbol. */
export function inSentence(label: string): string {
  return /^\p{Lu}\p{Ll}/u.test(label) ? label.charAt(0).toLowerCase() + label.slice(1) : label
}

/** What a name stands for, in words; the name with spaces when it has no label. */
export function sayName(workbook: Workbook, name: string): string {
  const label = workbook.names.get(name.toLowerCase())?.label
  return label ? inSentence(label) : name.replaceAll('_', ' ')
}

/** What a reference stands for, seen from the cell `from`: by name, else by the titles of its row and column. */
export function sayReference(workbook: Workbook, from: CellAddress, reference: Reference): string {
  const sheet =
    reference.sheet === undefined ? sheetById(workbook, from.sheet) : sheetByName(workbook, reference.sheet)
  if (!sheet) return 'a sheet that is not there'
  const { first, last } = reference
  if (reference.shape === 'cell') return sayCell(workbook, from, sheet, first.row, first.column)
  const where = sheet.id === from.sheet ? '' : ` on ${sheet.name}`
  if (reference.shape === 'area' && first.column === last.column) {
    const title = columnTitle(sheet, first.row, first.column)
    const [start, end] = [rowTitle(sheet, first.row), rowTitle(sheet, last.row)]
    if (title && start && end) return `${inSentence(title)} from ${start} to ${end}${where}`
  }
  if (reference.shape === 'area')
    return `${areaName({
      row: first.row,
      column: first.column,
      rowCount: last.row - first.row + 1,
      columnCount: last.column - first.column + 1,
    })}${where}`
  return `whole ${reference.shape}${where}`
}

function sayCell(workbook: Workbook, from: CellAddress, sheet: Sheet, row: number, column: number): string {
  const [named] = namedAt(workbook, { sheet: sheet.id, row, column })
  if (named && named.area.rowCount === 1 && named.area.columnCount === 1) return sayName(workbook, named.name)
  const title = columnTitle(sheet, row, column)
  const line = rowTitle(sheet, row)
  const sameRow = sheet.id === from.sheet && row === from.row
  const where = sheet.id === from.sheet ? '' : ` on ${sheet.name}`
  if (title && isValueColumn(title) && line) return `${inSentence(line)}${where}`
  if (title && sameRow) return inSentence(title)
  if (title && line) return `${inSentence(title)} of ${line}${where}`
  return `${title ? inSentence(title) : areaName({ row, column, rowCount: 1, columnCount: 1 })}${where}`
}

/** A column whose title says nothing of its own: the row's title names the figure. */
function isValueColumn(title: string): boolean {
  return title.toLowerCase() === 'value'
}

/** The nearest heading above a cell in its column. */
export function columnTitle(sheet: Sheet, row: number, column: number): string | undefined {
  for (let above = Math.min(row, sheet.rows.length) - 1; above >= 0; above -= 1) {
    const cell = sheet.rows[above]?.[column]
    if (cell?.format?.style === 'heading' && typeof cell.input === 'string') return cell.input
  }
  return undefined
}

/** The first text of a row that is no formula: what the row is about. */
export function rowTitle(sheet: Sheet, row: number): string | undefined {
  const first = sheet.rows[row]?.[0]?.input
  return typeof first === 'string' && !first.startsWith('=') ? first : undefined
}
