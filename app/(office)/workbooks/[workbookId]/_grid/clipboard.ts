import { fail, type Result, succeed } from '@/lib/failures'
import { type CellPatch, cellName, limits, type Operation, parseTsv, type Sheet, toTsv } from '@/lib/workbook'
import type { CellSource } from './cell-content'
import { shownText } from './cell-content'
import { clearPatch, type EntryContext, readEntry } from './entry'
import type { Rectangle } from './selection'

/** The cells as other programs take them: what is shown, tabs between columns, line feeds between rows. */
export function copiedText(source: CellSource, area: Rectangle): string {
  const rows: string[][] = []
  for (let row = area.row; row < area.row + area.rowCount; row += 1) {
    const cells: string[] = []
    for (let column = area.column; column < area.column + area.columnCount; column += 1) {
      cells.push(shownText(source, row, column))
    }
    rows.push(cells)
  }
  return toTsv(rows)
}

/**
 * What was pasted as operations: written from the top left of `area`, one value repeated over the whole of it,
 * rows added where it reaches past the end. Every text goes through the same reading as typing does; the first
 * that is not understood refuses the whole, and says where.
 */
export function pasteOperations(
  context: EntryContext,
  text: string,
  area: Rectangle,
): Result<{ operations: Operation[]; area: Rectangle }> {
  const rows = parseTsv(text)
  const height = rows.length
  const width = Math.max(0, ...rows.map((row) => row.length))
  if (height === 0 || width === 0) return fail('invalid', 'There is nothing to paste.')
  const one = height === 1 && width === 1
  const target = one ? area : { row: area.row, column: area.column, rowCount: height, columnCount: width }
  const room = fits(context.sheet, target)
  if (!room.ok) return room
  const cells: CellPatch[] = []
  for (let r = 0; r < target.rowCount; r += 1) {
    for (let c = 0; c < target.columnCount; c += 1) {
      const typed = one ? rows[0]?.[0] : rows[r]?.[c]
      if (typed === undefined) continue
      const row = target.row + r
      const column = target.column + c
      const read = readEntry(context, typed, row, column)
      if (!read.ok)
        return fail(
          read.failure.code,
          `${cellName(row, column)} refused ${quoted(typed)}: ${read.failure.text}`,
        )
      cells.push(read.value)
    }
  }
  if (cells.length === 0) return fail('invalid', 'There is nothing to paste.')
  return succeed({ operations: writeOperations(context.sheet, cells), area: target })
}

const quoted = (text: string) => `“${text.length > 24 ? `${text.slice(0, 24)}…` : text}”`

function fits(sheet: Sheet, area: Rectangle): Result<void> {
  const size = area.rowCount * area.columnCount
  if (size > limits.cellsInOperation) {
    return fail(
      'limit',
      `At most ${limits.cellsInOperation.toLocaleString('en-US')} cells are written at once.`,
    )
  }
  if (area.column + area.columnCount > sheet.columns.length) {
    const short = area.column + area.columnCount - sheet.columns.length
    return fail(
      'limit',
      `${sheet.name} has ${short} column${short === 1 ? '' : 's'} too few for this. Insert them first.`,
    )
  }
  if (area.row + area.rowCount > limits.rows) {
    return fail('limit', `A sheet has at most ${limits.rows.toLocaleString('en-US')} rows.`)
  }
  return succeed(undefined)
}

/** Sets the cells, after making the sheet as long as the last of them needs. */
export function writeOperations(sheet: Sheet, cells: CellPatch[]): Operation[] {
  const last = cells.reduce((most, patch) => Math.max(most, patch.row), 0)
  const set: Operation = { kind: 'set-cells', sheet: sheet.id, cells }
  const short = last + 1 - sheet.rowCount
  if (short <= 0) return [set]
  return [{ kind: 'insert-lines', sheet: sheet.id, axis: 'row', at: sheet.rowCount, count: short }, set]
}

/** Empties every filled cell of the area; undefined when there is none. */
export function clearOperation(sheet: Sheet, area: Rectangle): Operation | undefined {
  const cells: CellPatch[] = []
  for (let row = area.row; row < Math.min(area.row + area.rowCount, sheet.rowCount); row += 1) {
    for (let column = area.column; column < area.column + area.columnCount; column += 1) {
      if (sheet.rows[row]?.[column]?.input !== undefined) cells.push(clearPatch(row, column))
    }
  }
  return cells.length === 0 ? undefined : { kind: 'set-cells', sheet: sheet.id, cells }
}
