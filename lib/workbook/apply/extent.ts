import { fail, succeed } from '../../failures'
import type { Column, Sheet, Workbook } from '../model'
import type { Operation } from '../operations'
import { type Apply, findSheet } from './parts'

/** W17 The extent never falls below what holds a cell, a column's width or quantity, or a named value. */
export const applySetExtent: Apply<'set-extent'> = (workbook, operation) => {
  const found = findSheet(workbook, operation.sheet)
  if (!found.ok) return found
  const sheet = found.value
  const used = usedExtent(workbook, sheet)
  const rowCount = Math.max(operation.rowCount, used.rowCount)
  const columnCount = Math.max(operation.columnCount, used.columnCount)
  const inverse: Operation = {
    kind: 'set-extent',
    sheet: sheet.id,
    rowCount: sheet.rowCount,
    columnCount: sheet.columns.length,
  }
  if (rowCount === sheet.rowCount && columnCount === sheet.columns.length) {
    return succeed({ inverse: [], touched: [] })
  }
  sheet.rowCount = rowCount
  sheet.rows.length = Math.min(sheet.rows.length, rowCount)
  sheet.columns = Array.from({ length: columnCount }, (_, column) => sheet.columns[column] ?? {})
  return succeed({ inverse: [inverse], touched: [] })
}

function usedExtent(workbook: Workbook, sheet: Sheet): { rowCount: number; columnCount: number } {
  let rowCount = 1
  let columnCount = 1
  sheet.rows.forEach((cells, row) => {
    cells?.forEach((cell, column) => {
      if (!cell) return
      rowCount = Math.max(rowCount, row + 1)
      columnCount = Math.max(columnCount, column + 1)
    })
  })
  sheet.columns.forEach((column, index) => {
    if (column.width !== undefined || column.quantity !== undefined) {
      columnCount = Math.max(columnCount, index + 1)
    }
  })
  for (const { area } of workbook.names.values()) {
    if (area.sheet !== sheet.id) continue
    rowCount = Math.max(rowCount, area.row + area.rowCount)
    columnCount = Math.max(columnCount, area.column + area.columnCount)
  }
  return { rowCount, columnCount }
}

export const applySetColumns: Apply<'set-columns'> = (workbook, operation) => {
  const found = findSheet(workbook, operation.sheet)
  if (!found.ok) return found
  const sheet = found.value
  const beyond = operation.columns.find(({ column }) => column >= sheet.columns.length)
  if (beyond) {
    return fail(
      'invalid',
      `There is no column ${beyond.column + 1} here; this sheet has ${sheet.columns.length} columns.`,
    )
  }
  const before = new Map<number, { readonly column: Column; width: boolean; quantity: boolean }>()
  for (const { column, width, quantity } of operation.columns) {
    const now = sheet.columns[column] ?? {}
    const entry = before.get(column) ?? { column: now, width: false, quantity: false }
    entry.width ||= width !== undefined
    entry.quantity ||= quantity !== undefined
    before.set(column, entry)
    const newWidth = width === undefined ? now.width : (width ?? undefined)
    const newQuantity = quantity === undefined ? now.quantity : (quantity ?? undefined)
    sheet.columns[column] = {
      ...(newWidth === undefined ? {} : { width: newWidth }),
      ...(newQuantity === undefined ? {} : { quantity: newQuantity }),
    }
  }
  const columns = [...before].map(([column, entry]) => ({
    column,
    ...(entry.width ? { width: entry.column.width ?? null } : {}),
    ...(entry.quantity ? { quantity: entry.column.quantity ?? null } : {}),
  }))
  return succeed({ inverse: [{ kind: 'set-columns', sheet: sheet.id, columns }], touched: [] })
}
