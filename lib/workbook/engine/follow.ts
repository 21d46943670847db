import { ExportedCellChange, type ExportedChange } from 'hyperformula'
import { isLineOperation, type LineOperation } from '../apply/lines'
import type { CellAddress } from '../contracts'
import { mentionsSheet } from '../formula/rewrite'
import { cellAt, sheetById } from '../lookup'
import { isFormula, type NamedValue, type Workbook } from '../model'
import type { Operation } from '../operations'
import { encode } from './encode'
import { engineAddress, type Grid, nameExpression, register } from './grid'

export interface Follower {
  readonly grid: Grid
  /** The model, already changed by the operation. */
  readonly workbook: Workbook
  readonly stopped: ReadonlySet<string>
}

export type Visit = (address: CellAddress, value: ExportedCellChange['newValue']) => void

/**
 * Brings the engine to where the model is after one operation, by its own incremental means, and reports what changed.
 *
 * E8  Rows and columns are inserted and removed by the engine itself. It leaves lines beyond its own used extent alone and
 *     resolves OFFSET when it parses, so the formulas that this concerns are set anew from the model.
 * E9  Moved lines, removed and renamed sheets: every cell that the model rewrote or moved is set from the model.
 *     A sheet renamed to what formulas already wait for is not followed: the caller builds anew (false).
 */
export function followOperation(
  follower: Follower,
  operation: Operation,
  touched: readonly CellAddress[],
  namesBefore: ReadonlyMap<string, NamedValue>,
  visit: Visit,
): boolean {
  const { grid } = follower
  if (operation.kind === 'rename-sheet' && isAwaited(follower.workbook, operation.name, touched)) return false
  const changes = grid.formulas.batch(() => {
    change(follower, operation, touched, namesBefore)
  })
  report(grid, changes, visit)
  return true
}

/** Whether formulas that the renaming did not touch already named the sheet by its new name. */
function isAwaited(workbook: Workbook, name: string, touched: readonly CellAddress[]): boolean {
  const renamed = new Set(touched.map(({ sheet, row, column }) => `${sheet} ${row} ${column}`))
  for (const { sheet, row, column } of formulasWith(workbook, name)) {
    const input = cellAt(workbook, { sheet, row, column })?.input
    if (!renamed.has(`${sheet} ${row} ${column}`) && isFormula(input) && mentionsSheet(input, name))
      return true
  }
  return false
}

/** Cells whose formula holds a word, whatever its case. */
function* formulasWith(workbook: Workbook, word: string): Generator<CellAddress> {
  const wanted = word.toLowerCase()
  for (const sheet of workbook.sheets) {
    for (const [row, cells] of sheet.rows.entries()) {
      for (const [column, cell] of (cells ?? []).entries()) {
        if (isFormula(cell?.input) && cell.input.toLowerCase().includes(wanted)) {
          yield { sheet: sheet.id, row, column }
        }
      }
    }
  }
}

export function report(grid: Grid, changes: readonly ExportedChange[], visit: Visit): void {
  for (const each of changes) {
    if (!(each instanceof ExportedCellChange)) continue
    const sheet = grid.ids.get(each.sheet)
    if (sheet !== undefined) visit({ sheet, row: each.row, column: each.col }, each.newValue)
  }
}

function change(
  follower: Follower,
  operation: Operation,
  touched: readonly CellAddress[],
  namesBefore: ReadonlyMap<string, NamedValue>,
): void {
  const { grid } = follower
  const { formulas } = grid
  if (isLineOperation(operation)) {
    changeLines(follower, operation, touched)
    setFromModel(follower, formulasWith(follower.workbook, 'offset('))
    changeNames(follower, namesBefore)
    return
  }
  switch (operation.kind) {
    case 'set-cells':
    case 'convert-units':
      setFromModel(follower, touched)
      return
    case 'add-sheet': {
      formulas.addSheet(operation.name)
      const number = formulas.getSheetId(operation.name)
      if (number !== undefined) register(grid, operation.sheet, number)
      return
    }
    case 'remove-sheet': {
      const number = grid.numbers.get(operation.sheet)
      if (number === undefined) return
      formulas.removeSheet(number)
      grid.numbers.delete(operation.sheet)
      grid.ids.delete(number)
      setFromModel(follower, touched)
      changeNames(follower, namesBefore)
      return
    }
    case 'rename-sheet': {
      const number = grid.numbers.get(operation.sheet)
      if (number !== undefined) formulas.renameSheet(number, operation.name)
      setFromModel(follower, touched)
      return
    }
    case 'name-value':
      changeNames(follower, namesBefore)
      return
    default:
      return
  }
}

/** Sets cells from the model's inputs. */
export function setFromModel({ grid, workbook, stopped }: Follower, cells: Iterable<CellAddress>): void {
  for (const cell of cells) {
    const address = engineAddress(grid, cell)
    if (address) grid.formulas.setCellContents(address, encode(cellAt(workbook, cell)?.input, stopped))
  }
}

function changeLines(follower: Follower, operation: LineOperation, touched: readonly CellAddress[]): void {
  const { grid } = follower
  const { formulas } = grid
  const number = grid.numbers.get(operation.sheet)
  if (number === undefined) return
  if (operation.kind === 'move-lines') {
    setFromModel(follower, movedCells(follower.workbook, operation))
    setFromModel(follower, touched)
    return
  }
  const { at, count, axis } = operation
  const size = formulas.getSheetDimensions(number)
  const used = axis === 'row' ? size.height : size.width
  if (operation.kind === 'insert-lines') {
    if (at < used) {
      if (axis === 'row') formulas.addRows(number, [at, count])
      else formulas.addColumns(number, [at, count])
    }
  } else if (at < used) {
    if (axis === 'row') formulas.removeRows(number, [at, count])
    else formulas.removeColumns(number, [at, count])
  }
  if (at + (operation.kind === 'remove-lines' ? count : 0) >= used) setFromModel(follower, touched)
}

/** Every cell between the old and the new place of moved lines. */
function* movedCells(
  workbook: Workbook,
  operation: Extract<Operation, { kind: 'move-lines' }>,
): Generator<CellAddress> {
  const sheet = sheetById(workbook, operation.sheet)
  if (!sheet) return
  const from = Math.min(operation.at, operation.to)
  const below = Math.max(operation.at + operation.count, operation.to)
  const rows = operation.axis === 'row' ? [from, Math.min(below, sheet.rowCount)] : [0, sheet.rowCount]
  const columns =
    operation.axis === 'column' ? [from, Math.min(below, sheet.columns.length)] : [0, sheet.columns.length]
  for (let row = rows[0] ?? 0; row < (rows[1] ?? 0); row += 1) {
    for (let column = columns[0] ?? 0; column < (columns[1] ?? 0); column += 1) {
      yield { sheet: sheet.id, row, column }
    }
  }
}

/** Named expressions of the engine to those of the model; untouched ones are left alone, since a change recomputes all readers. */
function changeNames({ grid, workbook }: Follower, before: ReadonlyMap<string, NamedValue>): void {
  const { formulas } = grid
  for (const name of before.keys()) {
    if (!workbook.names.has(name)) formulas.removeNamedExpression(name)
  }
  for (const named of workbook.names.values()) {
    const was = before.get(named.name)
    if (was?.area === named.area) continue
    const expression = nameExpression(workbook, named)
    if (!was) formulas.addNamedExpression(named.name, expression)
    else if (formulas.getNamedExpressionFormula(named.name) !== expression) {
      formulas.changeNamedExpression(named.name, expression)
    }
  }
}
