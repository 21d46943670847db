import type { CellAddress } from '../contracts'
import type { Shifted } from '../formula/rewrite'
import { type Cell, isFormula, type Sheet, type Workbook } from '../model'
import type { CellPatch, Operation } from '../operations'
import { setCells } from './parts'

export interface Rewritten {
  readonly touched: CellAddress[]
  /** `set-cells` of the formulas that the inverse change alone would not bring back letter by letter. */
  readonly restore: Operation[]
}

/**
 * Rewrites every formula of the workbook in place, before anything moves; addresses are those from before.
 * `skip` leaves out cells that are about to be removed.
 */
export function rewriteFormulas(
  workbook: Workbook,
  change: (text: string, sheet: Sheet) => Shifted,
  skip: (sheet: Sheet, row: number, column: number) => boolean = () => false,
): Rewritten {
  const touched: CellAddress[] = []
  const restore: Operation[] = []
  for (const sheet of workbook.sheets) {
    const patches: CellPatch[] = []
    eachFormula(sheet, (input, cell, row, column, cells) => {
      const { text, exact } = change(input, sheet)
      if ((text === input && exact) || skip(sheet, row, column)) return
      if (!exact) patches.push({ row, column, input })
      if (text === input) return
      cells[column] = { ...cell, input: text }
      touched.push({ sheet: sheet.id, row, column })
    })
    restore.push(...setCells(sheet.id, patches))
  }
  return { touched, restore }
}

function eachFormula(
  sheet: Sheet,
  visit: (input: string, cell: Cell, row: number, column: number, cells: (Cell | undefined)[]) => void,
): void {
  const { rows } = sheet
  for (let row = 0; row < rows.length; row += 1) {
    const cells = rows[row]
    if (!cells) continue
    for (let column = 0; column < cells.length; column += 1) {
      const cell = cells[column]
      if (cell && isFormula(cell.input)) visit(cell.input, cell, row, column, cells)
    }
  }
}
