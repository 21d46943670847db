import { fail, succeed } from '../../failures'
import type { UnitSystem } from '../../units/quantities'
import { cellName } from '../address'
import { limits } from '../limits'
import { sheetById } from '../lookup'
import { type Cell, isFormula, type Row, type Workbook } from '../model'
import type { Operation } from '../operations'
import { convertNumber, isNearly, quantityOf } from './convert-number'
import { type Apply, type OperationOf, setCells } from './parts'

/** The named value whose cell says `us` or `si`: formulas read it where a constant depends on the units. */
export const systemName = 'unit_system'

export const systemWords: Readonly<Record<UnitSystem, string>> = {
  us: 'feet and °F',
  si: 'metres and °C',
}

type Exact = NonNullable<OperationOf<'convert-units'>['exact']>

interface Change {
  readonly sheet: string
  readonly row: number
  readonly column: number
  readonly cells: Row
  readonly cell: Cell
  readonly after: number | string
}

/**
 * W33 Every number of a quantity is written in the other system, on every sheet; formulas, texts and numbers of no quantity stay.
 *     The inverse converts back and restores every number to the last bit. A conversion to what it is already is refused.
 */
export const applyConvertUnits: Apply<'convert-units'> = (workbook, operation) => {
  const { system: from } = workbook
  const { system: to } = operation
  if (from === to) return fail('invalid', `This workbook is in ${systemWords[to]} already.`)
  const changes: Change[] = []
  const restore: Exact = []
  const asStood = index(operation.exact ?? [])
  for (const sheet of workbook.sheets) {
    for (const [row, cells] of sheet.rows.entries()) {
      if (!cells) continue
      for (const [column, cell] of cells.entries()) {
        if (typeof cell?.input !== 'number') continue
        const quantity = quantityOf(cell, sheet, column)
        let after = convertNumber(cell.input, quantity, from, to)
        const stood = asStood.get(key(sheet.id, row, column))
        if (stood !== undefined && quantity !== undefined && isNearly(stood, after, quantity, from, to)) {
          after = stood
        }
        if (!Number.isFinite(after)) {
          return fail(
            'limit',
            `${sheet.name} ${cellName(row, column)}: ${cell.input} is too large to be written in ${systemWords[to]}.`,
          )
        }
        if (after !== cell.input) changes.push({ sheet: sheet.id, row, column, cells, cell, after })
        if (convertNumber(after, quantity, to, from) !== cell.input) {
          restore.push({ sheet: sheet.id, row, column, value: cell.input })
        }
      }
    }
  }
  const inverse: Operation[] = [
    { kind: 'convert-units', system: from, ...(restore.length > 0 ? { exact: restore } : {}) },
  ]
  const said = systemCell(workbook)
  if (said && said.cell.input !== to) changes.push({ ...said, after: to })
  if (said && said.cell.input !== from) {
    const { sheet, row, column, cell } = said
    inverse.push(...setCells(sheet, [{ row, column, input: cell.input ?? null }]))
  }
  workbook.system = to
  for (const { cells, column, cell, after } of changes) cells[column] = { ...cell, input: after }
  return succeed({ inverse, touched: changes.map(({ sheet, row, column }) => ({ sheet, row, column })) })
}

/** The cell that says the unit system, where it says it as a text. */
function systemCell(workbook: Workbook): Omit<Change, 'after'> | undefined {
  const area = workbook.names.get(systemName)?.area
  const cells = area && sheetById(workbook, area.sheet)?.rows[area.row]
  const cell = cells?.[area?.column ?? 0]
  if (!area || !cells || typeof cell?.input !== 'string' || isFormula(cell.input)) return undefined
  return { sheet: area.sheet, row: area.row, column: area.column, cells, cell }
}

function index(exact: Exact): ReadonlyMap<string, number> {
  return new Map(exact.map(({ sheet, row, column, value }) => [key(sheet, row, column), value]))
}

function key(sheet: string, row: number, column: number): string {
  return `${sheet} ${row * limits.columns + column}`
}
