import type { Failure, Result } from '../../failures'
import { fail } from '../../failures'
import type { Applied } from '../contracts'
import { limits } from '../limits'
import { sheetById } from '../lookup'
import type { Sheet, Workbook } from '../model'
import type { CellPatch, Operation, OperationKind } from '../operations'

export type OperationOf<K extends OperationKind> = Extract<Operation, { kind: K }>

/** Checks everything first; changes the workbook only when it returns `ok`. */
export type Apply<K extends OperationKind> = (
  workbook: Workbook,
  operation: OperationOf<K>,
) => Result<Applied>

export function unknownSheet(id: string): { readonly ok: false; readonly failure: Failure } {
  return fail('not-found', 'There is no such sheet in this workbook; it may have been removed.', { name: id })
}

export function findSheet(workbook: Workbook, id: string): Result<Sheet> {
  const sheet = sheetById(workbook, id)
  return sheet ? { ok: true, value: sheet } : unknownSheet(id)
}

/** Patches as as many `set-cells` as the limit of cells in one operation asks for. */
export function setCells(sheet: string, cells: readonly CellPatch[]): OperationOf<'set-cells'>[] {
  const operations: OperationOf<'set-cells'>[] = []
  for (let from = 0; from < cells.length; from += limits.cellsInOperation) {
    operations.push({ kind: 'set-cells', sheet, cells: cells.slice(from, from + limits.cellsInOperation) })
  }
  return operations
}

const counts = new WeakMap<Sheet, number>()

/** Cells that hold something on a sheet; counted once, then kept by the operations, so that a small edit stays small. */
export function countCells(sheet: Sheet): number {
  const known = counts.get(sheet)
  if (known !== undefined) return known
  let count = 0
  for (const row of sheet.rows) {
    row?.forEach((cell) => {
      if (cell) count += 1
    })
  }
  counts.set(sheet, count)
  return count
}

export function keepCount(sheet: Sheet, count: number): void {
  counts.set(sheet, count)
}

export function countAll(workbook: Workbook): number {
  return workbook.sheets.reduce((sum, sheet) => sum + countCells(sheet), 0)
}
