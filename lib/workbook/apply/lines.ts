import { fail, type Result, succeed } from '../../failures'
import type { Applied, CellAddress } from '../contracts'
import { type LineChange, lineAfter, spanAfter, undoneBy } from '../formula/lines'
import { type Axis, shiftFormula } from '../formula/rewrite'
import { limits } from '../limits'
import type { Area, NamedValue, Row, Sheet, Workbook } from '../model'
import type { CellPatch, Operation } from '../operations'
import { rewriteFormulas } from './formulas'
import { nameTarget } from './names'
import { type Apply, countCells, findSheet, keepCount, type OperationOf, setCells } from './parts'
import { wholePatch } from './set-cells'

/**
 * W12 Inserting, removing and moving lines rewrites the formulas of all sheets (W1 to W9) and shifts named areas as ranges;
 *     a name whose whole area goes, goes too.
 * W13 The last row and the last column of a sheet stay.
 */
export const applyInsertLines: Apply<'insert-lines'> = (workbook, operation) => {
  const found = findSheet(workbook, operation.sheet)
  if (!found.ok) return found
  const { axis, at, count } = operation
  const extent = extentOf(found.value, axis)
  const most = axis === 'row' ? limits.rows : limits.columns
  if (at > extent) return outside(axis, at, extent)
  if (extent + count > most) {
    return fail('limit', `This would make ${extent + count} ${axis}s; a sheet has at most ${most}.`)
  }
  return change(workbook, found.value, axis, { kind: 'insert', at, count })
}

export const applyRemoveLines: Apply<'remove-lines'> = (workbook, operation) => {
  const found = findSheet(workbook, operation.sheet)
  if (!found.ok) return found
  const { axis, at, count } = operation
  const extent = extentOf(found.value, axis)
  if (at + count > extent) return outside(axis, at + count - 1, extent)
  if (count >= extent) return fail('invalid', `A sheet keeps at least one ${axis}: leave one of them.`)
  return change(workbook, found.value, axis, { kind: 'remove', at, count })
}

export const applyMoveLines: Apply<'move-lines'> = (workbook, operation) => {
  const found = findSheet(workbook, operation.sheet)
  if (!found.ok) return found
  const { axis, at, count, to } = operation
  const extent = extentOf(found.value, axis)
  if (at + count > extent || to > extent) return outside(axis, Math.max(at + count - 1, to), extent)
  if (to > at && to < at + count) {
    return fail(
      'invalid',
      `${axis === 'row' ? 'Rows' : 'Columns'} cannot be moved to a place among themselves.`,
    )
  }
  if (to === at || to === at + count) return succeed({ inverse: [], touched: [] })
  return change(workbook, found.value, axis, { kind: 'move', at, count, to })
}

function extentOf(sheet: Sheet, axis: Axis): number {
  return axis === 'row' ? sheet.rowCount : sheet.columns.length
}

function outside(axis: Axis, line: number, extent: number): ReturnType<typeof fail> {
  return fail('invalid', `There is no ${axis} ${line + 1} here; this sheet has ${extent} ${axis}s.`)
}

function change(workbook: Workbook, sheet: Sheet, axis: Axis, lines: LineChange): Result<Applied> {
  const back = undoneBy(lines)
  const gone = (row: number, column: number) => lineAfter(lines, axis === 'row' ? row : column) === undefined
  const lost = lines.kind === 'remove' ? lostLines(sheet, axis, lines) : []
  const rewritten = rewriteFormulas(
    workbook,
    (text, home) => shiftFormula(text, home.name, sheet.name, axis, lines),
    (home, row, column) => home === sheet && gone(row, column),
  )
  const names = shiftNames(workbook, sheet, axis, lines, back)
  const removed = lost.reduce(
    (sum, operation) => sum + (operation.kind === 'set-cells' ? operation.cells.length : 0),
    0,
  )
  keepCount(sheet, countCells(sheet) - removed)
  moveLines(sheet, axis, lines)
  const first: Operation = backOperation(sheet.id, axis, back)
  return succeed({
    inverse: [first, ...lost, ...rewritten.restore, ...names],
    touched: rewritten.touched.map((cell) => (cell.sheet === sheet.id ? moved(cell, axis, lines) : cell)),
  })
}

function moved(cell: CellAddress, axis: Axis, lines: LineChange): CellAddress {
  return { ...cell, [axis]: lineAfter(lines, cell[axis]) ?? cell[axis] }
}

function backOperation(sheet: string, axis: Axis, back: LineChange): Operation {
  const { at, count } = back
  if (back.kind === 'move') return { kind: 'move-lines', sheet, axis, at, count, to: back.to }
  return { kind: back.kind === 'insert' ? 'insert-lines' : 'remove-lines', sheet, axis, at, count }
}

/** What a removal loses: cells, and widths and quantities of columns. */
function lostLines(sheet: Sheet, axis: Axis, { at, count }: LineChange): Operation[] {
  const patches: CellPatch[] = []
  sheet.rows.forEach((cells, row) => {
    if (axis === 'row' && (row < at || row >= at + count)) return
    cells?.forEach((cell, column) => {
      if (cell && (axis === 'row' || (column >= at && column < at + count))) {
        patches.push(wholePatch(row, column, cell))
      }
    })
  })
  const operations: Operation[] = setCells(sheet.id, patches)
  if (axis === 'column') {
    const columns = sheet.columns
      .slice(at, at + count)
      .map((column, offset) => ({ column: at + offset, ...column }))
      .filter((column) => column.width !== undefined || column.quantity !== undefined)
    if (columns.length > 0) operations.push({ kind: 'set-columns', sheet: sheet.id, columns })
  }
  return operations
}

/** Shifts the named areas; returns what brings back those that the inverse change alone would not. */
function shiftNames(
  workbook: Workbook,
  sheet: Sheet,
  axis: Axis,
  lines: LineChange,
  back: LineChange,
): Operation[] {
  const restore: Operation[] = []
  for (const named of [...workbook.names.values()]) {
    if (named.area.sheet !== sheet.id) continue
    const area = shiftArea(named.area, axis, lines)
    if (area) workbook.names.set(named.name, { ...named, area })
    else workbook.names.delete(named.name)
    const returned = area && shiftArea(area, axis, back)
    if (!returned || !sameArea(returned, named.area)) restore.push(nameOperation(named))
  }
  return restore
}

function nameOperation(named: NamedValue): Operation {
  return { kind: 'name-value', name: named.name, target: nameTarget(named) }
}

/** The area after a change of its sheet's lines, or undefined when all of it is removed. */
export function shiftArea(area: Area, axis: Axis, lines: LineChange): Area | undefined {
  const first = area[axis]
  const count = axis === 'row' ? area.rowCount : area.columnCount
  const span = spanAfter(lines, [first, first + count - 1])
  if (!span) return undefined
  const size = span[1] - span[0] + 1
  return axis === 'row'
    ? { ...area, row: span[0], rowCount: size }
    : { ...area, column: span[0], columnCount: size }
}

function sameArea(a: Area, b: Area): boolean {
  return (
    a.row === b.row && a.column === b.column && a.rowCount === b.rowCount && a.columnCount === b.columnCount
  )
}

function moveLines(sheet: Sheet, axis: Axis, lines: LineChange): void {
  if (axis === 'row') {
    sheet.rows = rearranged<Row | undefined>(sheet.rows, lines, undefined)
    if (lines.kind === 'insert') sheet.rowCount += lines.count
    if (lines.kind === 'remove') sheet.rowCount -= lines.count
    return
  }
  sheet.columns = Array.from(rearranged(sheet.columns, lines, undefined), (column) => column ?? {})
  sheet.rows = sheet.rows.map((cells) => cells && rearranged(cells, lines, undefined))
}

/** A list whose lines were inserted, removed or moved; it may be shorter than the extent, what is beyond it is blank. */
export function rearranged<T>(list: readonly T[], lines: LineChange, blank: T): T[] {
  const { at, count } = lines
  if (list.length <= at && lines.kind !== 'move') {
    const whole = list.slice()
    // The list may end exactly where lines come in: columns are a full list and must grow.
    if (lines.kind === 'insert' && list.length === at) appendBlank(whole, count, blank)
    return whole
  }
  switch (lines.kind) {
    case 'insert':
      return [...list.slice(0, at), ...new Array<T>(count).fill(blank), ...list.slice(at)]
    case 'remove':
      return [...list.slice(0, at), ...list.slice(at + count)]
    case 'move': {
      const padded = list.slice()
      const needed = Math.max(at + count, lines.to)
      if (padded.length < needed) appendBlank(padded, needed - padded.length, blank)
      const block = padded.slice(at, at + count)
      const rest = [...padded.slice(0, at), ...padded.slice(at + count)]
      const place = lines.to > at ? lines.to - count : lines.to
      return [...rest.slice(0, place), ...block, ...rest.slice(place)]
    }
  }
}

function appendBlank<T>(list: T[], count: number, blank: T): void {
  for (let added = 0; added < count; added += 1) list.push(blank)
}

export type LineOperation = OperationOf<'insert-lines' | 'remove-lines' | 'move-lines'>

export function isLineOperation(operation: Operation): operation is LineOperation {
  return (
    operation.kind === 'insert-lines' || operation.kind === 'remove-lines' || operation.kind === 'move-lines'
  )
}

export function lineChangeOf(operation: LineOperation): LineChange {
  const { at, count } = operation
  switch (operation.kind) {
    case 'insert-lines':
      return { kind: 'insert', at, count }
    case 'remove-lines':
      return { kind: 'remove', at, count }
    case 'move-lines':
      return { kind: 'move', at, count, to: operation.to }
  }
}
