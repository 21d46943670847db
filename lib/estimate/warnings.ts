import { type Area, type CellValue, isCellError, type NamedValue, type Workbook } from '../workbook'
import { columnName } from '../workbook/address'
import { inOrder, type Severity } from './declare'
import { quoteSheet } from './layout'
import { templateChecks } from './template'

/** Something to look at, and the cell to go to. */
export interface Warning {
  /** The named value that a person would look at first; of an override, the table. */
  readonly name: string
  readonly message: string
  readonly severity: Exclude<Severity, 'impossible'>
  /** As formulas write it: the sheet's name, and the column and row. */
  readonly cell: string
}

const cellAt = (
  workbook: Workbook,
  { sheet, row, column }: Pick<Area, 'sheet' | 'row' | 'column'>,
): string => {
  const name = workbook.sheets.find(({ id }) => id === sheet)?.name ?? sheet
  return `${quoteSheet(name)}!${columnName(column)}${row + 1}`
}

/**
 * D3 What the checks say, errors first, then every override. A check that was taken out of the workbook says nothing.
 * `read` gives the computed values of a name, or nothing where there is no such name.
 */
export function warningsOf(
  workbook: Workbook,
  read: (name: string) => readonly CellValue[] | undefined,
): readonly Warning[] {
  const said = templateChecks.flatMap(({ name, about, severity }): Warning[] => {
    const says = read(name)?.[0]
    const area = workbook.names.get(about)?.area ?? workbook.names.get(name)?.area
    if (severity === 'impossible' || typeof says !== 'string' || says === inOrder || !area) return []
    return [{ name: about, message: says, severity, cell: cellAt(workbook, area) }]
  })
  const order = ['error', 'warning', 'note']
  const byWeight = said.sort((a, b) => order.indexOf(a.severity) - order.indexOf(b.severity))
  return [...byWeight, ...overridesInUse(workbook)]
}

/** A value that could not be computed, as a warning. */
export function uncomputed(workbook: Workbook, named: NamedValue, value: CellValue): Warning | undefined {
  if (value === null || !isCellError(value)) return undefined
  return { name: named.name, message: value.text, severity: 'error', cell: cellAt(workbook, named.area) }
}

/** Every cell of a table that holds a value of this job’s own, and every row that was added to one. */
export function overridesInUse(workbook: Workbook): readonly Warning[] {
  const warnings: Warning[] = []
  for (const { name, role, area } of workbook.names.values()) {
    const sheet = workbook.sheets.find(({ id, kind }) => id === area.sheet && kind === 'table')
    if (role !== 'table' || !sheet || !workbook.names.has(`${name}_columns`)) continue
    for (let row = area.row; row < area.row + area.rowCount; row += 1) {
      const cells = sheet.rows[row] ?? []
      const code = String(cells[area.column]?.input ?? '')
      const say = (column: number, message: string): void => {
        const cell = cellAt(workbook, { sheet: sheet.id, row, column })
        warnings.push({ name, message, severity: 'note', cell })
      }
      if (cells[area.column]?.ground === 'override') {
        say(area.column, `${sheet.name}, ${code}: a row of this job’s own`)
        continue
      }
      for (let column = area.column; column < area.column + area.columnCount; column += 1) {
        if (cells[column]?.ground !== 'override') continue
        const title = String(sheet.rows[area.row - 1]?.[column]?.input ?? '')
        say(column, `${sheet.name}, ${code}: ${title} is overridden`)
      }
    }
  }
  return warnings
}
