import { cellName } from '../address'
import type { CellAddress } from '../contracts'
import { scan } from '../formula/scan'
import { cellAt, sheetById, sheetByName } from '../lookup'
import { type Area, isFormula, type Workbook } from '../model'

/** Cells looked at before a path is given up: a circle longer than this is named without its path. */
const mostSteps = 400

/**
 * The cells of a circle through `start`, in the order in which each reads the next, `start` last again.
 * `inCircle` says which cells the engine found to take part. Undefined when the circle is too long to follow,
 * or when the cell only reads one that is in a circle.
 */
export function cyclePath(
  workbook: Workbook,
  start: CellAddress,
  inCircle: (address: CellAddress) => boolean,
): CellAddress[] | undefined {
  const key = ({ sheet, row, column }: CellAddress) => `${sheet} ${row} ${column}`
  const cameFrom = new Map<string, CellAddress | undefined>([[key(start), undefined]])
  const queue: CellAddress[] = [start]
  for (let steps = 0; steps < queue.length && steps < mostSteps; steps += 1) {
    const cell = queue[steps]
    if (!cell) break
    for (const next of readBy(workbook, cell, inCircle)) {
      if (key(next) === key(start)) {
        const path = [start]
        for (let back: CellAddress | undefined = cell; back; back = cameFrom.get(key(back)))
          path.unshift(back)
        return path
      }
      if (!cameFrom.has(key(next))) {
        cameFrom.set(key(next), cell)
        queue.push(next)
      }
    }
  }
  return undefined
}

function readBy(
  workbook: Workbook,
  cell: CellAddress,
  inCircle: (address: CellAddress) => boolean,
): CellAddress[] {
  const input = cellAt(workbook, cell)?.input
  if (!isFormula(input)) return []
  const found: CellAddress[] = []
  for (const area of areasRead(workbook, cell.sheet, input)) {
    const lastRow = Math.min(area.row + area.rowCount, area.row + mostSteps)
    for (let row = area.row; row < lastRow && found.length < mostSteps; row += 1) {
      for (let column = area.column; column < area.column + area.columnCount; column += 1) {
        const address = { sheet: area.sheet, row, column }
        if (inCircle(address)) found.push(address)
      }
    }
  }
  return found
}

/** The areas that a formula reads: its references, and what its names stand for. */
export function areasRead(workbook: Workbook, home: string, formula: string): Area[] {
  const areas: Area[] = []
  scan(formula, (kind, start, end, reference) => {
    if (kind === 'name') {
      const named = workbook.names.get(formula.slice(start, end).toLowerCase())
      if (named) areas.push(named.area)
    }
    if (!reference) return
    const sheet =
      reference.sheet === undefined ? sheetById(workbook, home) : sheetByName(workbook, reference.sheet)
    if (!sheet) return
    const { first, last } = reference
    const row = first.row < 0 ? 0 : Math.min(first.row, last.row)
    const column = first.column < 0 ? 0 : Math.min(first.column, last.column)
    const lastRow = first.row < 0 ? sheet.rowCount - 1 : Math.max(first.row, last.row)
    const lastColumn = first.column < 0 ? sheet.columns.length - 1 : Math.max(first.column, last.column)
    areas.push({
      sheet: sheet.id,
      row,
      column,
      rowCount: lastRow - row + 1,
      columnCount: lastColumn - column + 1,
    })
  })
  return areas
}

/** `Frame B2 → B3 → Price list C1 → Frame B2`; a long path keeps its first and last cells. */
export function pathText(workbook: Workbook, path: readonly CellAddress[]): string {
  let sheet = ''
  const names = path.map((cell) => {
    const prefix = cell.sheet === sheet ? '' : `${sheetById(workbook, cell.sheet)?.name ?? ''} `
    sheet = cell.sheet
    return prefix + cellName(cell.row, cell.column)
  })
  const shown = names.length > 8 ? [...names.slice(0, 5), '…', ...names.slice(-2)] : names
  return shown.join(' → ')
}
