import { quantityOf } from '../apply/convert-number'
import type { CellAddress } from '../contracts'
import type { Reference } from '../formula/reference'
import { sheetById, sheetByName } from '../lookup'
import { type Area, isFormula, type NamedValue, type Sheet, type Workbook } from '../model'
import type { Expression } from '../words/expression'
import { columnTitle } from '../words/labels'
import { type Kind, kindOfQuantity } from './kind'

/** Cells of an area that are looked at; a longer one is of no known kind. */
const mostCells = 4000

/** The kind of a named value: its own, unless a cell of it carries another unit ("per sheet"). */
export function kindOfName(workbook: Workbook, text: string): Kind {
  const named = workbook.names.get(text.toLowerCase())
  if (!named || named.role === 'table') return 'unknown'
  const sheet = sheetById(workbook, named.area.sheet)
  const cell = sheet?.rows[named.area.row]?.[named.area.column]
  return cell?.format?.unit ? 'unknown' : kindOfQuantity(named.quantity)
}

export function kindOfReference(workbook: Workbook, from: CellAddress, reference: Reference): Kind {
  const sheet = sheetOf(workbook, from, reference)
  const area = sheet && areaOf(reference, sheet)
  return area ? kindOfArea(sheet, area) : 'unknown'
}

/** Kinds of areas, while one workbook is looked through: the same columns are read by very many formulas. */
let areas: Map<string, Kind> | undefined

/** Runs something that changes no workbook, and looks at each area once meanwhile. */
export function lookingOnce<T>(run: () => T): T {
  areas = new Map()
  try {
    return run()
  } finally {
    areas = undefined
  }
}

/** The one kind that all figures of an area are of; unknown when they differ, or when one of them is not known. */
export function kindOfArea(sheet: Sheet, area: Omit<Area, 'sheet'>): Kind {
  const key = `${sheet.id} ${area.row} ${area.column} ${area.rowCount} ${area.columnCount}`
  const kind = areas?.get(key) ?? commonKind(sheet, area)
  areas?.set(key, kind)
  return kind
}

function commonKind(sheet: Sheet, area: Omit<Area, 'sheet'>): Kind {
  if (area.rowCount * area.columnCount > mostCells) return 'unknown'
  let found: Kind | undefined
  for (let row = area.row; row < area.row + area.rowCount; row += 1) {
    for (let column = area.column; column < area.column + area.columnCount; column += 1) {
      const cell = sheet.rows[row]?.[column]
      const input = cell?.input
      // Texts and blanks among figures (headings, closing lines) count as nothing.
      if (input === undefined || (typeof input === 'string' && !isFormula(input))) continue
      const kind = cell?.format?.unit ? 'unknown' : kindOfQuantity(quantityOf(cell, sheet, column))
      if (kind === 'unknown' || kind === 'bare') return 'unknown'
      if (found === undefined) found = kind
      else if (found !== 'unknown' && found !== 'bare' && found.quantity !== kind.quantity) return 'unknown'
    }
  }
  return found ?? 'unknown'
}

/** The kind of what a look-up in `table` gives, by the title of its column or its number. */
export function kindOfColumn(
  workbook: Workbook,
  from: CellAddress,
  table: Expression,
  column: Expression | undefined,
): Kind {
  const place = placeOf(workbook, from, table)
  if (!place) return 'unknown'
  const { sheet, area } = place
  if (area.columnCount === 1) return kindOfArea(sheet, area)
  const index = column && columnIndex(sheet, area, column)
  return index === undefined
    ? 'unknown'
    : kindOfArea(sheet, { ...area, column: area.column + index, columnCount: 1 })
}

function columnIndex(sheet: Sheet, area: Area, column: Expression): number | undefined {
  if (column.kind === 'number') {
    const index = Number(column.text) - 1
    return Number.isInteger(index) && index >= 0 && index < area.columnCount ? index : undefined
  }
  const title = column.kind === 'call' && column.name === 'MATCH' ? column.args[0] : undefined
  if (title?.kind !== 'text') return undefined
  const wanted = title.text.slice(1, -1).toLowerCase()
  for (let index = 0; index < area.columnCount; index += 1) {
    if (columnTitle(sheet, area.row, area.column + index)?.toLowerCase() === wanted) return index
  }
  return undefined
}

function placeOf(
  workbook: Workbook,
  from: CellAddress,
  table: Expression,
): { sheet: Sheet; area: Area } | undefined {
  if (table.kind === 'name') {
    const named: NamedValue | undefined = workbook.names.get(table.text.toLowerCase())
    const sheet = named && sheetById(workbook, named.area.sheet)
    return sheet && { sheet, area: named.area }
  }
  if (table.kind !== 'reference') return undefined
  const sheet = sheetOf(workbook, from, table.reference)
  const area = sheet && areaOf(table.reference, sheet)
  return sheet && area ? { sheet, area } : undefined
}

function sheetOf(workbook: Workbook, from: CellAddress, { sheet }: Reference): Sheet | undefined {
  return sheet === undefined ? sheetById(workbook, from.sheet) : sheetByName(workbook, sheet)
}

/** Whole columns and rows end where the sheet ends. */
function areaOf({ shape, first, last }: Reference, sheet: Sheet): Area {
  const rows = shape === 'columns' ? [0, sheet.rows.length - 1] : [first.row, last.row]
  const columns = shape === 'rows' ? [0, sheet.columns.length - 1] : [first.column, last.column]
  const [row = 0, lastRow = 0] = rows.toSorted((a, b) => a - b)
  const [column = 0, lastColumn = 0] = columns.toSorted((a, b) => a - b)
  return { sheet: sheet.id, row, column, rowCount: lastRow - row + 1, columnCount: lastColumn - column + 1 }
}
