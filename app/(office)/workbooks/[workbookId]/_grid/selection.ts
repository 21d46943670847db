import type { Selection } from '@/lib/commands/command'
import type { GridAction } from './keys'

export interface Point {
  readonly row: number
  readonly column: number
}

/** Rows and columns that can be selected, by sheet index: the header row is not among them. */
export interface Extent {
  readonly firstRow: number
  readonly lastRow: number
  readonly lastColumn: number
  /** Rows to a page. */
  readonly page: number
}

/**
 * What is selected on a sheet: a range between `anchor` and `focus`, and the active cell inside it,
 * which typing and the entry line are about. `run` is the column where a run of Tabs began.
 */
export interface CellSelection {
  readonly active: Point
  readonly anchor: Point
  readonly focus: Point
  readonly run?: number
}

export function single(row: number, column: number): CellSelection {
  const point = { row, column }
  return { active: point, anchor: point, focus: point }
}

export interface Rectangle {
  readonly row: number
  readonly column: number
  readonly rowCount: number
  readonly columnCount: number
}

export function rectangle(selection: CellSelection): Rectangle {
  const { anchor, focus } = selection
  const row = Math.min(anchor.row, focus.row)
  const column = Math.min(anchor.column, focus.column)
  return {
    row,
    column,
    rowCount: Math.abs(anchor.row - focus.row) + 1,
    columnCount: Math.abs(anchor.column - focus.column) + 1,
  }
}

export function fromCommand(selection: Selection, extent: Extent): CellSelection {
  const anchor = clamp({ row: selection.row, column: selection.column }, extent)
  const focus = clamp(
    {
      row: selection.row + selection.rowCount - 1,
      column: selection.column + selection.columnCount - 1,
    },
    extent,
  )
  return { active: anchor, anchor, focus }
}

export function clamp(point: Point, extent: Extent): Point {
  return {
    row: Math.max(extent.firstRow, Math.min(extent.lastRow, point.row)),
    column: Math.max(0, Math.min(extent.lastColumn, point.column)),
  }
}

/** True when the cell shows something; blocks are made of such cells. */
export type IsFilled = (point: Point) => boolean

/** The selection after a key; actions that do not move it give it back unchanged. */
export function moved(
  selection: CellSelection,
  action: GridAction,
  extent: Extent,
  isFilled: IsFilled,
): CellSelection {
  const from = 'extend' in action && action.extend ? selection.focus : selection.active
  switch (action.kind) {
    case 'move':
      return to(
        selection,
        { row: from.row + action.rows, column: from.column + action.columns },
        action,
        extent,
      )
    case 'block':
      return to(selection, blockEdge(from, action.rows, action.columns, extent, isFilled), action, extent)
    case 'page':
      return to(selection, { row: from.row + action.by * extent.page, column: from.column }, action, extent)
    case 'jump':
      return to(selection, jumpTarget(from, action.to, extent), action, extent)
    case 'step':
      return stepped(selection, action.axis, action.by, extent)
    case 'select':
      return selected(selection, action.what, extent)
    case 'collapse':
      return { active: selection.active, anchor: selection.active, focus: selection.active }
    default:
      return selection
  }
}

function to(
  selection: CellSelection,
  target: Point,
  action: { readonly extend: boolean },
  extent: Extent,
): CellSelection {
  const point = clamp(target, extent)
  if (action.extend) return { active: selection.active, anchor: selection.anchor, focus: point }
  return { active: point, anchor: point, focus: point }
}

function jumpTarget(from: Point, where: string, extent: Extent): Point {
  switch (where) {
    case 'row-start':
      return { row: from.row, column: 0 }
    case 'row-end':
      return { row: from.row, column: extent.lastColumn }
    case 'sheet-start':
      return { row: extent.firstRow, column: 0 }
    default:
      return { row: extent.lastRow, column: extent.lastColumn }
  }
}

function selected(selection: CellSelection, what: 'all' | 'row' | 'column', extent: Extent): CellSelection {
  const { anchor, focus } = selection
  const rows = what === 'row' ? [anchor.row, focus.row] : [extent.firstRow, extent.lastRow]
  const columns = what === 'column' ? [anchor.column, focus.column] : [0, extent.lastColumn]
  return {
    active: selection.active,
    anchor: { row: rows[0] ?? 0, column: columns[0] ?? 0 },
    focus: { row: rows[1] ?? 0, column: columns[1] ?? 0 },
  }
}

/** From a filled cell with a filled neighbour: the last filled cell of the run; else the next filled cell, or the edge. */
export function blockEdge(
  from: Point,
  rows: number,
  columns: number,
  extent: Extent,
  isFilled: IsFilled,
): Point {
  const next = (point: Point) => ({ row: point.row + rows, column: point.column + columns })
  const inside = (point: Point) =>
    point.row >= extent.firstRow &&
    point.row <= extent.lastRow &&
    point.column >= 0 &&
    point.column <= extent.lastColumn
  let point = next(from)
  if (!inside(point)) return from
  const run = isFilled(from) && isFilled(point)
  while (inside(next(point))) {
    if (run ? !isFilled(next(point)) : isFilled(point)) break
    point = next(point)
  }
  return point
}

function stepped(
  selection: CellSelection,
  axis: 'row' | 'column',
  by: -1 | 1,
  extent: Extent,
): CellSelection {
  const area = rectangle(selection)
  if (area.rowCount * area.columnCount > 1) return roundRange(selection, area, axis, by)
  const { active } = selection
  if (axis === 'column') {
    const point = clamp({ row: active.row, column: active.column + by }, extent)
    return { active: point, anchor: point, focus: point, run: selection.run ?? active.column }
  }
  const point = clamp({ row: active.row + by, column: selection.run ?? active.column }, extent)
  return { active: point, anchor: point, focus: point }
}

function roundRange(
  selection: CellSelection,
  area: Rectangle,
  axis: 'row' | 'column',
  by: -1 | 1,
): CellSelection {
  const r = selection.active.row - area.row
  const c = selection.active.column - area.column
  const total = area.rowCount * area.columnCount
  const index = axis === 'row' ? c * area.rowCount + r : r * area.columnCount + c
  const next = (index + by + total) % total
  const active =
    axis === 'row'
      ? { row: area.row + (next % area.rowCount), column: area.column + Math.floor(next / area.rowCount) }
      : {
          row: area.row + Math.floor(next / area.columnCount),
          column: area.column + (next % area.columnCount),
        }
  return { ...selection, active }
}
