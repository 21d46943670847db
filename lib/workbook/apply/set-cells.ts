import { fail, succeed } from '../../failures'
import { cellName } from '../address'
import type { CellAddress } from '../contracts'
import { formulaBounds } from '../formula/bounds'
import { limits } from '../limits'
import { type Cell, type CellInput, isFormula, type Row, type Sheet } from '../model'
import type { CellPatch, Operation } from '../operations'
import { convertNumber, quantityOf } from './convert-number'
import { systemWords } from './convert-units'
import { type Apply, countAll, countCells, findSheet, keepCount, setCells } from './parts'

/**
 * W10 A cell's absent parts stay, `null` clears a part, a cell without parts is gone. A later patch of one cell comes after an earlier.
 * W35 Numbers said to be in the other system are converted by the quantity that the cell has once it is set.
 * W11 Writing beyond the extent grows it, up to the limits.
 */
export const applySetCells: Apply<'set-cells'> = (workbook, operation) => {
  const found = findSheet(workbook, operation.sheet)
  if (!found.ok) return found
  const sheet = found.value
  let lastRow = sheet.rowCount - 1
  let lastColumn = sheet.columns.length - 1
  for (const patch of operation.cells) {
    const refused = refusedPatch(sheet, patch)
    if (refused) return refused
    if (!clearsOnly(patch)) {
      lastRow = Math.max(lastRow, patch.row)
      lastColumn = Math.max(lastColumn, patch.column)
    }
  }
  const { system: written = workbook.system } = operation
  const plan = planCells(sheet, operation.cells, (value, cell, column) =>
    convertNumber(value, quantityOf(cell, sheet, column), written, workbook.system),
  )
  if (written !== workbook.system) {
    for (const { after } of plan.cells.values()) {
      if (typeof after?.input !== 'number' || Number.isFinite(after.input)) continue
      return fail('limit', `A number is too large to be written in ${systemWords[workbook.system]}.`)
    }
  }
  const total = countAll(workbook) + plan.added
  if (plan.added > 0 && total > limits.cells) {
    return fail('limit', `This would make ${total} cells; a workbook holds at most ${limits.cells}.`)
  }
  return succeed(commit(sheet, plan, lastRow, lastColumn))
}

interface Plan {
  readonly cells: Map<
    number,
    { readonly patch: CellPatch; readonly before: Cell | undefined; after: Cell | undefined }
  >
  added: number
}

function refusedPatch(sheet: Sheet, patch: CellPatch): ReturnType<typeof fail> | undefined {
  const where = `${sheet.name} ${cellName(patch.row, patch.column)}`
  if (patch.row < 0 || patch.row >= limits.rows) {
    return fail('limit', `Row ${patch.row + 1} is too far down; a sheet has at most ${limits.rows} rows.`)
  }
  if (patch.column < 0 || patch.column >= limits.columns) {
    return fail(
      'limit',
      `Column ${patch.column + 1} is too far right; a sheet has at most ${limits.columns} columns.`,
    )
  }
  const { input, note } = patch
  if (typeof input === 'number' && !Number.isFinite(input)) {
    return fail('invalid', `${where}: expected a number that can be written down.`)
  }
  if (typeof input === 'string') {
    if (input.length > limits.textLength) {
      return fail(
        'limit',
        `${where}: this text has ${input.length} characters; at most ${limits.textLength} are possible.`,
      )
    }
    const bounds = isFormula(input) ? formulaBounds(input) : undefined
    if (bounds) return fail(bounds.code, `${where}: ${bounds.text}`)
  }
  if (typeof note === 'string' && note.length > limits.noteLength) {
    return fail(
      'limit',
      `${where}: this note has ${note.length} characters; at most ${limits.noteLength} are possible.`,
    )
  }
  return undefined
}

function clearsOnly(patch: CellPatch): boolean {
  return (
    (patch.input ?? null) === null &&
    (patch.format ?? null) === null &&
    (patch.note ?? null) === null &&
    (patch.ground ?? null) === null
  )
}

type Convert = (value: number, cell: Cell | undefined, column: number) => number

function planCells(sheet: Sheet, patches: readonly CellPatch[], convert: Convert): Plan {
  const plan: Plan = { cells: new Map(), added: 0 }
  for (const patch of patches) {
    const key = patch.row * limits.columns + patch.column
    const planned = plan.cells.get(key)
    const before = planned ? planned.before : sheet.rows[patch.row]?.[patch.column]
    let after = patched(planned ? planned.after : before, patch)
    if (typeof patch.input === 'number' && typeof after?.input === 'number') {
      const input = convert(after.input, after, patch.column)
      if (input !== after.input) after = { ...after, input }
    }
    plan.cells.set(key, { patch: planned ? { ...planned.patch, ...patch } : patch, before, after })
  }
  for (const { before, after } of plan.cells.values()) {
    if (!before && after) plan.added += 1
    if (before && !after) plan.added -= 1
  }
  return plan
}

/** The cell with the parts of a patch; undefined when nothing is left of it. [W10] */
export function patched(cell: Cell | undefined, patch: Omit<CellPatch, 'row' | 'column'>): Cell | undefined {
  const input = patch.input === undefined ? cell?.input : normal(patch.input)
  const format = patch.format === undefined ? cell?.format : patch.format
  const note = patch.note === undefined ? cell?.note : patch.note
  const ground = patch.ground === undefined ? cell?.ground : patch.ground
  const parts = {
    ...(input === undefined || input === null ? {} : { input }),
    ...(format && Object.keys(format).length > 0 ? { format: format as NonNullable<Cell['format']> } : {}),
    ...(note ? { note } : {}),
    ...(ground ? { ground } : {}),
  }
  return Object.keys(parts).length > 0 ? parts : undefined
}

function normal(input: CellInput | null): CellInput | null {
  if (input === '') return null
  return Object.is(input, -0) ? 0 : input
}

function commit(sheet: Sheet, plan: Plan, lastRow: number, lastColumn: number) {
  const inverse: CellPatch[] = []
  const touched: CellAddress[] = []
  const count = countCells(sheet) + plan.added
  for (const { patch, before, after } of plan.cells.values()) {
    const { row, column } = patch
    inverse.push(restoring(patch, before))
    if (before?.input !== after?.input) touched.push({ sheet: sheet.id, row, column })
    if (after) cellsOf(sheet, row)[column] = after
    else if (before) delete sheet.rows[row]?.[column]
  }
  keepCount(sheet, count)
  const operations: Operation[] = setCells(sheet.id, inverse)
  const { rowCount } = sheet
  const columnCount = sheet.columns.length
  if (lastRow >= rowCount || lastColumn >= columnCount) {
    operations.push({ kind: 'set-extent', sheet: sheet.id, rowCount, columnCount })
    sheet.rowCount = Math.max(rowCount, lastRow + 1)
    while (sheet.columns.length <= lastColumn) sheet.columns.push({})
  }
  return { inverse: operations, touched }
}

/** What puts back the parts that a patch changes. */
function restoring(patch: CellPatch, before: Cell | undefined): CellPatch {
  return {
    row: patch.row,
    column: patch.column,
    ...(patch.input === undefined ? {} : { input: before?.input ?? null }),
    ...(patch.format === undefined ? {} : { format: formatOf(before) }),
    ...(patch.note === undefined ? {} : { note: before?.note ?? null }),
    ...(patch.ground === undefined ? {} : { ground: before?.ground ?? null }),
  }
}

/** The whole cell as a patch, for cells that a removal loses. */
export function wholePatch(row: number, column: number, cell: Cell): CellPatch {
  return restoring({ row, column, input: null, format: null, note: null, ground: null }, cell)
}

function formatOf(cell: Cell | undefined): NonNullable<CellPatch['format']> | null {
  const format = cell?.format
  if (!format) return null
  const { choices, ...rest } = format
  return {
    ...rest,
    ...(choices === undefined ? {} : { choices: typeof choices === 'string' ? choices : [...choices] }),
  }
}

function cellsOf(sheet: Sheet, row: number): Row {
  const cells = sheet.rows[row] ?? []
  sheet.rows[row] = cells
  return cells
}
