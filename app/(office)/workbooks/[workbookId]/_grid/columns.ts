import type { SizedGridColumn } from '@glideapps/glide-data-grid'
import { isNumeric, type Quantity } from '@/lib/units'
import { type CellValue, columnName, isCellError, type Sheet } from '@/lib/workbook'
import { type CellSource, shownText, standsRight, unitSymbol } from './cell-content'
import type { ColumnHead } from './draw'

const narrowest = 72
const widest = 260
const looked = 60
/** Of a character at 13 px, about. */
const characterWidth = 7.8

type ReadCell = (row: number, column: number) => CellValue

/** Headers from the first row of the sheet; a column of numbers has its title at the right. */
export function columnHeads({ sheet, system, currency, value }: CellSource): ColumnHead[] {
  return sheet.columns.map(({ quantity }, column) => {
    const title = value(0, column)
    return {
      letters: columnName(column),
      title: title === null || isCellError(title) ? '' : String(title),
      unit: quantity === undefined || unitless.has(quantity) ? '' : unitSymbol(quantity, system, currency),
      right: isRight(sheet, column, value),
    }
  })
}

/** Printed with the number itself, or not a unit. */
const unitless: ReadonlySet<Quantity> = new Set([
  'ratio',
  'angle',
  'text',
  'boolean',
  'date',
  'number',
  'count',
])

function isRight(sheet: Sheet, column: number, value: ReadCell): boolean {
  const quantity = sheet.columns[column]?.quantity
  if (quantity !== undefined) return isNumeric(quantity)
  let right = 0
  let left = 0
  for (let row = 1; row < Math.min(sheet.rowCount, looked); row += 1) {
    const shown = value(row, column)
    if (shown === null || shown === '') continue
    if (standsRight(shown)) right += 1
    else left += 1
  }
  return right > left
}

/**
 * Widths as the first rows need. A column that has a width keeps it unless a number would not fit; one that has none is
 * never less wide than in `before`, so that nothing jumps.
 */
export function fittingWidths(
  source: CellSource,
  heads: readonly ColumnHead[],
  before: readonly number[] = [],
): number[] {
  const { sheet } = source
  return heads.map((head, column) => {
    const given = sheet.columns[column]?.width
    const titles = Math.max(head.title.length, head.letters.length + head.unit.length + 1)
    let longest = given === undefined ? titles : 0
    for (let row = 1; row < Math.min(sheet.rowCount, looked); row += 1) {
      if (sheet.rows[row]?.[column]?.input === undefined) continue
      if (given !== undefined && typeof source.value(row, column) !== 'number') continue
      longest = Math.max(longest, shownText(source, row, column).length)
    }
    const needed = Math.min(widest, Math.ceil(longest * characterWidth) + 20)
    return given === undefined ? Math.max(narrowest, needed, before[column] ?? 0) : Math.max(given, needed)
  })
}

export function gridColumns(
  sheet: Sheet,
  heads: readonly ColumnHead[],
  fitting: readonly number[],
  resized: ReadonlyMap<number, number>,
): SizedGridColumn[] {
  return heads.map((head, column) => ({
    id: `${sheet.id} ${column}`,
    title: head.title === '' ? head.letters : `${head.letters} ${head.title}`,
    width: resized.get(column) ?? fitting[column] ?? narrowest,
  }))
}
