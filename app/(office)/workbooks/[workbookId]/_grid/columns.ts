import type { SizedGridColumn } from '@glideapps/glide-data-grid'
import { isNumeric } from '@/lib/units'
import { type CellValue, columnName, isCellError, type Sheet } from '@/lib/workbook'
import { standsRight } from './cell-content'
import type { ColumnHead } from './draw'

const usualWidth = 112
const looked = 24

type ReadCell = (row: number, column: number) => CellValue

/** Headers from the first row of the sheet; a column of numbers has its title at the right. */
export function columnHeads(sheet: Sheet, value: ReadCell): ColumnHead[] {
  return sheet.columns.map((_, column) => {
    const title = value(0, column)
    return {
      letters: columnName(column),
      title: title === null || isCellError(title) ? '' : String(title),
      right: isRight(sheet, column, value),
    }
  })
}

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

export function gridColumns(
  sheet: Sheet,
  heads: readonly ColumnHead[],
  resized: ReadonlyMap<number, number>,
): SizedGridColumn[] {
  return heads.map((head, column) => ({
    id: `${sheet.id} ${column}`,
    title: head.title === '' ? head.letters : `${head.letters} ${head.title}`,
    width: resized.get(column) ?? sheet.columns[column]?.width ?? usualWidth,
  }))
}
