import { assertNever, type Result, succeed } from '../../failures'
import type { Applied, CellAddress } from '../contracts'
import type { Workbook } from '../model'
import type { Operation } from '../operations'
import { applyConvertUnits } from './convert-units'
import { applySetColumns, applySetExtent } from './extent'
import { applyInsertLines, applyMoveLines, applyRemoveLines } from './lines'
import { applyNameValue } from './names'
import { applySetCells } from './set-cells'
import { applyAddSheet, applyRemoveSheet, applyRenameSheet, applyReorderSheet } from './sheets'

/**
 * The one way a workbook changes. Everything is checked before the first change: refused whole or done whole.
 * `inverse`, applied in order, restores the workbook exactly.
 */
export function applyOperation(workbook: Workbook, operation: Operation): Result<Applied> {
  switch (operation.kind) {
    case 'set-cells':
      return applySetCells(workbook, operation)
    case 'insert-lines':
      return applyInsertLines(workbook, operation)
    case 'remove-lines':
      return applyRemoveLines(workbook, operation)
    case 'move-lines':
      return applyMoveLines(workbook, operation)
    case 'add-sheet':
      return applyAddSheet(workbook, operation)
    case 'remove-sheet':
      return applyRemoveSheet(workbook, operation)
    case 'rename-sheet':
      return applyRenameSheet(workbook, operation)
    case 'reorder-sheet':
      return applyReorderSheet(workbook, operation)
    case 'name-value':
      return applyNameValue(workbook, operation)
    case 'set-extent':
      return applySetExtent(workbook, operation)
    case 'convert-units':
      return applyConvertUnits(workbook, operation)
    case 'set-columns':
      return applySetColumns(workbook, operation)
    default:
      return assertNever(operation)
  }
}

/**
 * Applies a list whole or not at all: at the first refusal what was done is undone by its inverses.
 * `touched` of a list holds addresses as of the operation that touched them.
 */
export function applyAll(workbook: Workbook, operations: readonly Operation[]): Result<Applied> {
  const inverses: (readonly Operation[])[] = []
  const touched: CellAddress[] = []
  for (const operation of operations) {
    const applied = applyOperation(workbook, operation)
    if (!applied.ok) {
      undo(workbook, inverses)
      return applied
    }
    inverses.push(applied.value.inverse)
    for (const cell of applied.value.touched) touched.push(cell)
  }
  return succeed({ inverse: inverses.reverse().flat(), touched })
}

function undo(workbook: Workbook, inverses: readonly (readonly Operation[])[]): void {
  for (const inverse of inverses.toReversed()) {
    for (const operation of inverse) {
      const undone = applyOperation(workbook, operation)
      if (!undone.ok) throw new Error(`an inverse was refused: ${undone.failure.text}`)
    }
  }
}
