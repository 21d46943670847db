import { type CellAddress, type Operation, rebase, type SheetGround } from '@/lib/workbook'

/** Where a cell has come to after somebody else's operations; undefined when its line or sheet is gone. */
export function cellAfter(
  sheets: readonly SheetGround[],
  { sheet, row, column }: CellAddress,
  operations: readonly Operation[],
): CellAddress | undefined {
  // A cell moves as an edit of it does.
  const edit: Operation = { kind: 'set-cells', sheet, cells: [{ row, column, input: null }] }
  const [moved] = rebase(sheets, [edit], operations).operations
  const cell = moved?.kind === 'set-cells' ? moved.cells[0] : undefined
  return cell && { sheet, row: cell.row, column: cell.column }
}

/** Whether cells may have moved at all. */
export function movesCells(operation: Operation): boolean {
  return operation.kind.endsWith('-lines') || operation.kind === 'remove-sheet'
}
