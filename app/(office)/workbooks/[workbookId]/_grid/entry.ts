import { type Result, succeed } from '@/lib/failures'
import type { UnitSystem } from '@/lib/units'
import {
  type Cell,
  type CellInput,
  type CellPatch,
  editText,
  isFormula,
  parseEntry,
  type Sheet,
} from '@/lib/workbook'
import { formatOf } from './cell-content'

export interface EntryContext {
  readonly sheet: Sheet
  readonly system: UnitSystem
  readonly currency: string | undefined
  /** The values that a cell takes, when it takes only certain ones. */
  readonly choices?: (row: number, column: number) => readonly string[] | undefined
}

/** What the editor opens with: the formula, or the number in a form that reads back to exactly itself. */
export function openingText({ sheet, system }: EntryContext, row: number, column: number): string {
  const cell = sheet.rows[row]?.[column]
  return editText(cell?.input, formatOf(sheet, cell, column), system)
}

/** What was typed into a cell, as a change of that cell; the failure says what was expected. */
export function readEntry(
  context: EntryContext,
  text: string,
  row: number,
  column: number,
): Result<CellPatch> {
  const cell = context.sheet.rows[row]?.[column]
  if (text.trim() === '') return succeed(clearPatch(row, column))
  const read = parseEntry(
    text,
    formatOf(context.sheet, cell, column),
    context.system,
    context.currency,
    context.choices?.(row, column),
  )
  if (!read.ok) return read
  const input = read.value
  if (input === null || input === undefined) return succeed(clearPatch(row, column))
  const ground = groundAfter(cell, input)
  return succeed({ row, column, input, ...(ground === cell?.ground ? {} : { ground: ground ?? null }) })
}

export function clearPatch(row: number, column: number): CellPatch {
  return { row, column, input: null }
}

/** A value written over a computed cell, or over one pinned from a table, is an override and is shown as one. */
function groundAfter(cell: Cell | undefined, input: CellInput): Cell['ground'] {
  if (cell?.ground === 'table') return 'override'
  if (cell?.ground === undefined && isFormula(cell?.input) && !isFormula(input)) return 'override'
  return cell?.ground
}
