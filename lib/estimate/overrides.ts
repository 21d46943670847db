import { fail, type Result, succeed } from '../failures'
import { checkValue, type Surroundings } from './check-value'
import type { GridBlock, GridColumn, GridRow, RichCell, SheetDeclaration } from './declare'
import { isRecord } from './json'
import { nearest, quoted } from './nearest'
import { tables } from './template'

/** By table sheet, row code and column title (`_` may stand for a space): `{"Coverings": {"CODE": {"resistance": 2.5}}}`. */
export type Overrides = Readonly<Record<string, Readonly<Record<string, Readonly<Record<string, unknown>>>>>>

const mostRows = 500
const codePattern = /^[A-Za-z0-9][A-Za-z0-9 ./+-]{0,39}$/
const plain = (text: string): string => text.toLowerCase().replaceAll('_', ' ').trim()

interface Change {
  readonly code: string
  readonly values: Readonly<Record<string, unknown>>
}

interface Table {
  readonly sheet: SheetDeclaration
  readonly grid: GridBlock
  readonly name: string
  readonly codes: readonly string[]
}

const known: readonly Table[] = tables.map((sheet) => {
  const grid = sheet.blocks[0]
  if (grid?.kind !== 'grid' || !grid.table) throw new Error(`${sheet.name} is not a table`)
  return { sheet, grid, name: grid.table.name, codes: grid.rows.map((row) => String(row.code)) }
})

/** Tables with the overrides in them, and the codes that they then have, by table name. */
export interface OverriddenTables {
  readonly sheets: readonly SheetDeclaration[]
  readonly codes: (table: string) => readonly string[]
}

/** P3 An override marks the cell that it changes; a code that the table lacks adds a row. */
export function overrideTables(
  overrides: unknown,
  around: Omit<Surroundings, 'codes'>,
): Result<OverriddenTables> {
  const changes = readShape(overrides)
  if (!changes.ok) return changes
  const codesOf = (name: string): readonly string[] => {
    const table = known.find((one) => one.name === name)
    if (!table) return []
    const added = (changes.value.get(table.name) ?? []).map(({ code }) => code)
    return [...new Set([...table.codes, ...added])]
  }
  const sheets: SheetDeclaration[] = []
  for (const table of known) {
    const changed = changeTable(table, changes.value.get(table.name) ?? [], { ...around, codes: codesOf })
    if (!changed.ok) return changed
    sheets.push(changed.value)
  }
  return succeed({ sheets, codes: codesOf })
}

function readShape(overrides: unknown): Result<Map<string, Change[]>> {
  const changes = new Map<string, Change[]>()
  if (overrides === undefined) return succeed(changes)
  if (!isRecord(overrides)) return fail('invalid', 'overrides: expected an object of tables.')
  for (const [sheetName, rows] of Object.entries(overrides)) {
    const table = known.find(
      ({ sheet, name }) => plain(sheet.name) === plain(sheetName) || name === plain(sheetName),
    )
    if (!table) {
      const near = nearest(
        sheetName,
        known.map(({ sheet }) => sheet.name),
      )
      return fail(
        'invalid',
        `overrides: expected the name of a table; the nearest to ${quoted(sheetName)} is ${near}.`,
      )
    }
    const where = `overrides of ${table.sheet.name}`
    if (!isRecord(rows)) return fail('invalid', `${where}: expected an object of rows by their code.`)
    const list = changes.get(table.name) ?? []
    for (const [written, values] of Object.entries(rows)) {
      if (!codePattern.test(written)) {
        return fail(
          'invalid',
          `${where}: expected a code of letters, digits and dashes, not ${quoted(written)}.`,
        )
      }
      if (!isRecord(values)) return fail('invalid', `${where}, ${written}: expected an object of columns.`)
      const code = table.codes.find((one) => one.toLowerCase() === written.toLowerCase()) ?? written
      if (list.some((change) => change.code.toLowerCase() === code.toLowerCase())) {
        return fail('invalid', `${where}: expected ${code} once.`)
      }
      list.push({ code, values })
    }
    if (list.length > mostRows) return fail('invalid', `${where}: expected at most ${mostRows} rows.`)
    changes.set(table.name, list)
  }
  return succeed(changes)
}

function changeTable(
  table: Table,
  changes: readonly Change[],
  around: Surroundings,
): Result<SheetDeclaration> {
  if (changes.length === 0) return succeed(table.sheet)
  const rows: GridRow[] = [...table.grid.rows]
  for (const { code, values } of changes) {
    const cells = changeRow(table, code, values, around)
    if (!cells.ok) return cells
    const index = table.codes.indexOf(code)
    if (index < 0) {
      const row = newRow(table, code, cells.value)
      if (!row.ok) return row
      rows.push(row.value)
    } else rows[index] = { ...rows[index], ...cells.value }
  }
  return succeed({ ...table.sheet, blocks: [{ ...table.grid, rows }] })
}

function changeRow(
  table: Table,
  code: string,
  values: Readonly<Record<string, unknown>>,
  around: Surroundings,
): Result<Record<string, RichCell>> {
  const cells: Record<string, RichCell> = {}
  const present = table.grid.rows[table.codes.indexOf(code)]
  const columns = table.grid.columns.slice(1)
  for (const [written, value] of Object.entries(values)) {
    const where = `${table.sheet.name} ${code}`
    const column = columns.find(({ title }) => plain(title) === plain(written))
    if (!column) {
      const titles = columns.map(({ title }) => title)
      return fail(
        'invalid',
        `${where}: expected a column; the nearest to ${quoted(written)} is "${nearest(written, titles)}".`,
      )
    }
    if (column.formula !== undefined && column.absent === undefined) {
      return fail('invalid', `${where}: expected "resistance"; ${column.title} follows from it.`)
    }
    if (cells[column.title]) return fail('invalid', `${where}: expected ${column.title} once.`)
    const quantity = quantityOf(present, column)
    const checked = checkValue(
      { ...expectedOf(column), name: `${where}, ${column.title}`, quantity },
      value,
      around,
    )
    if (!checked.ok) return checked
    cells[column.title] = {
      value: typeof checked.value === 'number' ? { value: checked.value, in: around.system } : checked.value,
      ground: 'override',
      quantity,
    }
  }
  return succeed(cells)
}

function expectedOf({ limits, choices }: GridColumn) {
  return { ...(limits ? { limits } : {}), ...(choices === undefined ? {} : { choices }) }
}

function quantityOf(row: GridRow | undefined, column: GridColumn) {
  const cell = row?.[column.title]
  return (typeof cell === 'object' && 'quantity' in cell ? cell.quantity : undefined) ?? column.quantity
}

function newRow(table: Table, code: string, cells: Record<string, RichCell>): Result<GridRow> {
  const row: Record<string, RichCell> = { code: { value: code, ground: 'override' }, ...cells }
  for (const column of table.grid.columns) {
    if (row[column.title]) continue
    if (column.required) {
      const title = column.title.replaceAll(' ', '_')
      return fail('invalid', `${table.sheet.name} ${code}: expected ${title}, because the row is new.`)
    }
    if (column.absent !== undefined && column.formula === undefined) {
      row[column.title] = { value: column.absent, ground: 'override' }
    }
  }
  return succeed(row)
}
