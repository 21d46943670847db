import { tableCalled, tableOptions } from '@/lib/commands/tables'
import type { Sheet } from '@/lib/workbook'
import { commandContext } from '../_editor/command-context'
import type { WorkbookSession } from '../_editor/session-contract'
import { formatOf } from './cell-content'
import type { Choice } from './cell-editor'

/** The values that the cell takes, when it takes only certain ones. */
export function cellChoices(
  session: WorkbookSession,
  sheet: Sheet,
  row: number,
  column: number,
): readonly Choice[] | undefined {
  const cell = sheet.rows[row]?.[column]
  const format = formatOf(sheet, cell, column)
  const { choices } = format
  if (choices === undefined) return format.quantity === 'boolean' ? yesAndNo : undefined
  if (typeof choices !== 'string') return choices.map((value) => ({ value, title: value }))
  const selection = { sheet: sheet.id, row, column, rowCount: 1, columnCount: 1 }
  const table = tableCalled(session.workbook, choices)
  return table && tableOptions(commandContext(session, selection, []), table)
}

const yesAndNo: readonly Choice[] = [
  { value: 'yes', title: 'yes' },
  { value: 'no', title: 'no' },
]

/** The same as plain values, for reading what was typed; yes and no are read as a quantity of their own. */
export function listedChoices(
  session: WorkbookSession,
  sheet: Sheet,
  row: number,
  column: number,
): readonly string[] | undefined {
  if (formatOf(sheet, sheet.rows[row]?.[column], column).choices === undefined) return undefined
  return cellChoices(session, sheet, row, column)?.map(({ value }) => value)
}
