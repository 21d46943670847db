import { labelOf } from '@/lib/commands'
import {
  type CellAddress,
  type CellValue,
  cellName,
  isCellError,
  type NamedValue,
  type Sheet,
  type Workbook,
} from '@/lib/workbook'

/** What the estimate's declarations say of a named check, and what a check says when nothing is wrong. */
export interface CheckBook {
  readonly inOrder: string
  readonly checks: ReadonlyMap<string, { readonly about: string; readonly severity: string }>
}

export type Severity = 'error' | 'warning' | 'missing' | 'override' | 'note'

/** One thing to look at: what is wrong, the cell that says so, and the cell where a person puts it right. */
export interface Finding {
  readonly severity: Severity
  readonly words: string
  readonly at: CellAddress
  readonly goTo: CellAddress
}

export type ReadValue = (address: CellAddress) => CellValue

/** Everything to look at on one sheet: cells in error, checks that do not hold, inputs that must be given, overrides. */
export function findings(
  workbook: Workbook,
  sheet: Sheet,
  value: ReadValue,
  book: CheckBook | undefined,
): Finding[] {
  return [
    ...cellFindings(workbook, sheet, value),
    ...checkFindings(workbook, sheet, value, book),
    ...blankInputs(workbook, sheet),
  ]
}

function cellFindings(workbook: Workbook, sheet: Sheet, value: ReadValue): Finding[] {
  const found: Finding[] = []
  sheet.rows.forEach((cells, row) => {
    if (row === 0) return
    cells?.forEach((cell, column) => {
      if (cell?.input === undefined) return
      const at = { sheet: sheet.id, row, column }
      const shown = value(at)
      if (isCellError(shown)) found.push({ severity: 'error', words: shown.text, at, goTo: at })
      else if (cell.ground === 'override') {
        const of = labelAround(workbook, sheet, row, column, value)
        found.push({
          severity: 'override',
          words: of === '' ? 'is an override' : `is an override: ${of}`,
          at,
          goTo: at,
        })
      }
    })
  })
  return found
}

function labelAround(
  workbook: Workbook,
  sheet: Sheet,
  row: number,
  column: number,
  value: ReadValue,
): string {
  for (const named of workbook.names.values()) {
    const { area } = named
    if (area.sheet === sheet.id && area.row === row && area.column === column && area.rowCount === 1)
      return labelOf(named)
  }
  const begins = value({ sheet: sheet.id, row, column: 0 })
  return typeof begins === 'string' && column > 0 ? begins.trim() : ''
}

/** A check's severity in the declarations; anything graver than these is an error here. */
const gravity: Readonly<Record<string, Severity>> = { warning: 'warning', note: 'note' }

function checkFindings(
  workbook: Workbook,
  sheet: Sheet,
  value: ReadValue,
  book: CheckBook | undefined,
): Finding[] {
  if (!book) return []
  const found: Finding[] = []
  for (const [name, { about, severity }] of book.checks) {
    const named = workbook.names.get(name)
    if (named?.area.sheet !== sheet.id) continue
    const at = startOf(named)
    const says = value(at)
    if (typeof says !== 'string' || says === '' || says === book.inOrder) continue
    const changed = workbook.names.get(about)
    found.push({
      severity: gravity[severity] ?? 'error',
      words: says,
      at,
      goTo: changed ? startOf(changed) : at,
    })
  }
  return found
}

/** Inputs without which there is no result. A text or a date that says nothing is not missed. */
function blankInputs(workbook: Workbook, sheet: Sheet): Finding[] {
  const found: Finding[] = []
  for (const named of workbook.names.values()) {
    const { role, area } = named
    if (role !== 'input' || area.sheet !== sheet.id) continue
    for (let row = area.row; row < area.row + area.rowCount; row += 1) {
      for (let column = area.column; column < area.column + area.columnCount; column += 1) {
        const cell = sheet.rows[row]?.[column]
        if (cell?.input !== undefined) continue
        const optional = named.quantity === 'text' || named.quantity === 'date'
        if (optional && cell?.format?.choices === undefined) continue
        const at = { sheet: sheet.id, row, column }
        found.push({ severity: 'missing', words: `is missing: ${labelOf(named)}`, at, goTo: at })
      }
    }
  }
  return found
}

function startOf({ area: { sheet, row, column } }: NamedValue): CellAddress {
  return { sheet, row, column }
}

const order: readonly Severity[] = ['error', 'missing', 'warning', 'override', 'note']

/** The gravest first; within one severity in the order of the sheets. */
export function bySeverity(found: readonly Finding[]): Finding[] {
  return [...found].sort((a, b) => order.indexOf(a.severity) - order.indexOf(b.severity))
}

/** "B14 is missing: Ridge height": the place and what is said there. */
export function findingWords({ at, words }: Finding): string {
  return `${cellName(at.row, at.column)} ${words}`
}
