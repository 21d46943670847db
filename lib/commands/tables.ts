import type { CellValue, Sheet, Workbook } from '../workbook'
import { cellAt, isCellError, type NamedValue, sheetById, sheetByName } from '../workbook'
import type { ArgumentOption, CommandContext } from './command'
import { showValue } from './measures'

/** Where a table stands on its sheet. */
export interface Table {
  readonly sheet: Sheet
  readonly headerRow: number
  readonly firstRow: number
  readonly rowCount: number
}

/** A row of a table as a choice: the first column is the code, the name column says it in words. */
export interface TableRow {
  readonly row: number
  readonly code: string
  readonly name: string
  readonly detail: string
  readonly figure?: ArgumentOption['figure']
}

/** The table that a choice names: a named value of role `table`, or a sheet whose first row is the header. */
export function tableCalled(workbook: Workbook, name: string): Table | undefined {
  const named = workbook.names.get(name) ?? workbook.names.get(name.toLowerCase().replaceAll(/\W+/g, '_'))
  const sheet = named?.role === 'table' ? sheetById(workbook, named.area.sheet) : sheetByName(workbook, name)
  if (!sheet) return undefined
  if (named?.role !== 'table') return wholeSheet(sheet)
  const { row, rowCount } = named.area
  return { sheet, headerRow: Math.max(0, row - 1), firstRow: row, rowCount }
}

export function wholeSheet(sheet: Sheet): Table {
  return { sheet, headerRow: 0, firstRow: 1, rowCount: sheet.rowCount - 1 }
}

const rowsOf = new WeakMap<CommandContext, Map<string, readonly TableRow[]>>()

/**
 * Rows with a code in their first column. A quiet row only marks where the table closes.
 * A context is of one moment, and is asked at every key: read once.
 */
export function tableRows(context: CommandContext, table: Table): readonly TableRow[] {
  const known = rowsOf.get(context) ?? new Map<string, readonly TableRow[]>()
  rowsOf.set(context, known)
  const key = `${table.sheet.id} ${table.firstRow} ${table.rowCount}`
  const rows = known.get(key) ?? readRows(context, table)
  known.set(key, rows)
  return rows
}

function readRows(context: CommandContext, table: Table): readonly TableRow[] {
  const { sheet } = table
  const titles = sheet.columns.map((_, column) => textAt(context, sheet, table.headerRow, column))
  const nameColumn = columnTitled(titles, /^(name|description|covering|what|title)\b/i, 1)
  const figureColumn = resistanceColumn(table, titles)
  const details = detailColumns(table, titles, nameColumn)
  const rows: TableRow[] = []
  for (let row = table.firstRow; row < table.firstRow + table.rowCount; row++) {
    const cells = sheet.rows[row]
    const code = cells && cells[0]?.format?.style !== 'quiet' ? textAt(context, sheet, row, 0) : ''
    if (code === '') continue
    const name = textAt(context, sheet, row, nameColumn) || code
    const detail = details.flatMap(({ column, quantity, words }) => {
      const held = context.value({ sheet: sheet.id, row, column })
      return textOf(held) === '' ? [] : [words(showValue(context, held, quantity))]
    })
    const value = figureColumn === -1 ? null : context.value({ sheet: sheet.id, row, column: figureColumn })
    const figure = { label: 'R', value, quantity: 'thermal-resistance' } as const
    rows.push({
      row,
      code,
      name,
      detail: detail.join(' · '),
      ...(typeof value === 'number' ? { figure: { ...figure, value } } : {}),
    })
  }
  return rows
}

export function tableOptions(context: CommandContext, table: Table): readonly ArgumentOption[] {
  return tableRows(context, table).map(({ code, name, detail, figure }) => ({
    value: code,
    title: name,
    ...(detail === '' ? {} : { detail }),
    synonyms: [code],
    ...(figure ? { figure } : {}),
  }))
}

/** What the first cell of a named value may be set to, or undefined when it takes any value of its kind. */
export function choicesOf(context: CommandContext, named: NamedValue): readonly ArgumentOption[] | undefined {
  const { choices } = cellAt(context.workbook, named.area)?.format ?? {}
  if (typeof choices === 'string') {
    const table = tableCalled(context.workbook, choices)
    return table && tableOptions(context, table)
  }
  if (choices !== undefined) return choices.map((value) => ({ value, title: value }))
  return named.quantity === 'boolean' ? yesAndNo : undefined
}

const yesAndNo: readonly ArgumentOption[] = [
  { value: 'true', title: 'yes', synonyms: ['true', 'on'] },
  { value: 'false', title: 'no', synonyms: ['false', 'off'] },
]

export function textOf(value: CellValue): string {
  return value === null || isCellError(value) ? '' : String(value).trim()
}

function textAt(context: CommandContext, sheet: Sheet, row: number, column: number): string {
  return textOf(context.value({ sheet: sheet.id, row, column }))
}

function columnTitled(titles: readonly string[], form: RegExp, otherwise: number): number {
  const found = titles.findIndex((title, column) => column > 0 && form.test(title))
  return found === -1 ? Math.min(otherwise, Math.max(0, titles.length - 1)) : found
}

/** The column that rows of coverings are told apart by most often: their thermal resistance. */
function resistanceColumn({ sheet, firstRow }: Table, titles: readonly string[]): number {
  return titles.findIndex(
    (_, column) =>
      (sheet.rows[firstRow]?.[column]?.format?.quantity ?? sheet.columns[column]?.quantity) ===
      'thermal-resistance',
  )
}

/** What tells rows apart at a glance, column by column, as words: "diffusing", "62% light", "life 10 years". */
const telling: readonly (readonly [title: RegExp, words: (shown: string) => string])[] = [
  [/^(kind|type|construction|light|unit)$/i, (shown) => shown],
  [/^light transmittance$/i, (shown) => `${shown} light`],
  [/^life$/i, (shown) => `life ${shown}`],
]

function detailColumns({ sheet, firstRow }: Table, titles: readonly string[], nameColumn: number) {
  return telling.flatMap(([form, words]) => {
    const column = titles.findIndex((title) => form.test(title))
    if (column <= 0 || column === nameColumn) return []
    const quantity =
      sheet.rows[firstRow]?.[column]?.format?.quantity ?? sheet.columns[column]?.quantity ?? 'text'
    return [{ column, quantity, words }]
  })
}
