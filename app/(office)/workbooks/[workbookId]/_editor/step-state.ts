import {
  type CellAddress,
  type CellValue,
  cellName,
  isCellError,
  type Sheet,
  type Workbook,
} from '@/lib/workbook'

/** How a step stands: nothing on it yet, in order, or with things to look at. */
export interface StepState {
  readonly filled: boolean
  readonly toLookAt: number
  /** The first few of them, in words. */
  readonly words: readonly string[]
  /** The first of them. */
  readonly first: CellAddress | undefined
}

const wordsShown = 4

/** Cells in error, named inputs that are blank, and overrides, by reading the sheet once. */
export function stepState(
  workbook: Workbook,
  sheet: Sheet,
  value: (address: CellAddress) => CellValue,
): StepState {
  const found: { readonly address: CellAddress; readonly words: string }[] = []
  let filled = false
  const look = (row: number, column: number, words: string) => {
    found.push({ address: { sheet: sheet.id, row, column }, words: `${cellName(row, column)} ${words}` })
  }
  sheet.rows.forEach((cells, row) => {
    if (row === 0) return
    cells?.forEach((cell, column) => {
      if (!cell || cell.input === undefined) return
      filled = true
      const shown = value({ sheet: sheet.id, row, column })
      if (isCellError(shown)) look(row, column, shown.text)
      else if (cell.ground === 'override') look(row, column, 'is an override')
    })
  })
  for (const { row, column } of blankInputs(workbook, sheet)) look(row, column, 'is missing')
  return {
    filled,
    toLookAt: found.length,
    words: found.slice(0, wordsShown).map(({ words }) => words),
    first: found[0]?.address,
  }
}

function blankInputs(workbook: Workbook, sheet: Sheet): { row: number; column: number }[] {
  const blank: { row: number; column: number }[] = []
  for (const { role, area } of workbook.names.values()) {
    if (role !== 'input' || area.sheet !== sheet.id) continue
    for (let row = area.row; row < area.row + area.rowCount; row += 1) {
      for (let column = area.column; column < area.column + area.columnCount; column += 1) {
        if (sheet.rows[row]?.[column]?.input === undefined) blank.push({ row, column })
      }
    }
  }
  return blank
}
