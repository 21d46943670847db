import { CompactSelection, type GridSelection } from '@glideapps/glide-data-grid'
import { type CellSelection, type Extent, rectangle } from './selection'

/** The grid component counts rows below the header from 0, and columns before rows. */
export function toGrid(selection: CellSelection): GridSelection {
  const area = rectangle(selection)
  return {
    current: {
      cell: [selection.active.column, selection.active.row - 1],
      range: { x: area.column, y: area.row - 1, width: area.columnCount, height: area.rowCount },
      rangeStack: [],
    },
    rows: CompactSelection.empty(),
    columns: CompactSelection.empty(),
  }
}

/** What the pointer selected: cells, whole rows by their number, or whole columns by their letter. */
export function fromGrid(grid: GridSelection, extent: Extent): CellSelection | undefined {
  if (grid.current) {
    const { cell, range } = grid.current
    const anchor = { row: cell[1] + 1, column: cell[0] }
    const focus = {
      row: (range.y === cell[1] ? range.y + range.height - 1 : range.y) + 1,
      column: range.x === cell[0] ? range.x + range.width - 1 : range.x,
    }
    return { active: anchor, anchor, focus }
  }
  const [firstRow, lastRow] = [grid.rows.first(), grid.rows.last()]
  if (firstRow !== undefined && lastRow !== undefined) {
    const anchor = { row: firstRow + 1, column: 0 }
    return { active: anchor, anchor, focus: { row: lastRow + 1, column: extent.lastColumn } }
  }
  const [first, last] = [grid.columns.first(), grid.columns.last()]
  if (first === undefined || last === undefined) return undefined
  const anchor = { row: extent.firstRow, column: first }
  return { active: anchor, anchor, focus: { row: extent.lastRow, column: last } }
}
