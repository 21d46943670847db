import { labelOf } from '@/lib/commands'
import { isMoney, unitOf } from '@/lib/units'
import {
  type Cell,
  type CellAddress,
  type CellValue,
  cellName,
  isCellError,
  isFormula,
  namedAt,
  type Sheet,
  sayFormula,
  sheetById,
} from '@/lib/workbook'
import { formatOf, groundOf } from '../_grid/cell-content'
import type { WorkbookSession } from './session-contract'

/** What the entry line says about a cell besides its input. */
export interface CellWords {
  readonly address: string
  /** What the cell is called, and what its ground says. */
  readonly about: string
  /** Its formula in words. */
  readonly formula: string | undefined
  readonly error: string | undefined
  readonly note: string | undefined
  readonly unit: string
  readonly source: string
}

/** `typed` is what is being written into it, if anything is. */
export function cellWords(session: WorkbookSession, address: CellAddress, typed?: string): CellWords {
  const { workbook } = session
  const sheet = sheetById(workbook, address.sheet)
  const name = cellName(address.row, address.column)
  if (!sheet) return { ...nothing, address: name }
  const cell = sheet.rows[address.row]?.[address.column]
  const value = session.value(address)
  const named = namedAt(workbook, address).find(({ role }) => role !== 'table')
  const label = named ? labelOf(named) : labelAround(session, sheet, address)
  const ground = groundWords[groundOf(cell)]
  return {
    address: name,
    about: [label, named?.name, ground].filter(Boolean).join(' · '),
    formula: inWords(session, address, typed ?? cell?.input),
    error: isCellError(value) ? value.text : undefined,
    note: noteOf(session, sheet, address, cell),
    unit: unitWords(session, sheet, address),
    source: columnText(session, sheet, address.row, address.column, /^source/i),
  }
}

/** A formula in words, made of the names and titles around what it refers to. */
function inWords(
  session: WorkbookSession,
  address: CellAddress,
  input: Cell['input'] | undefined,
): string | undefined {
  return isFormula(input) ? sayFormula(session.workbook, address, input) : undefined
}

/** The cell's own note, else what the Note column says of its row, else the note on its column's header. */
function noteOf(
  session: WorkbookSession,
  sheet: Sheet,
  { row, column }: CellAddress,
  cell: Cell | undefined,
): string | undefined {
  if (cell?.note) return cell.note
  const ofRow = columnText(session, sheet, row, column, /^notes?$/i)
  return ofRow === '' ? sheet.rows[headerAbove(sheet, row)]?.[column]?.note : ofRow
}

const nothing: CellWords = {
  address: '',
  about: '',
  formula: undefined,
  error: undefined,
  note: undefined,
  unit: '',
  source: '',
}

const groundWords = {
  input: 'an input',
  computed: '',
  table: 'from a table',
  override: 'an override',
  label: '',
  plain: '',
} as const

function unitWords(session: WorkbookSession, sheet: Sheet, { row, column }: CellAddress): string {
  const format = formatOf(sheet, sheet.rows[row]?.[column], column)
  if (format.unit) return format.unit
  const { quantity } = format
  if (!quantity || quantity === 'text' || quantity === 'boolean' || quantity === 'ratio') return ''
  const currency = session.named('currency')?.[0]
  return isMoney(quantity) && typeof currency === 'string'
    ? unitOf(quantity, session.workbook.system, currency).symbol
    : unitOf(quantity, session.workbook.system).symbol
}

/** "U of South roof": the column's title and the text that begins the row. */
function labelAround(session: WorkbookSession, sheet: Sheet, { row, column }: CellAddress): string {
  const title = textOf(session.value({ sheet: sheet.id, row: headerAbove(sheet, row), column }))
  const begins = column === 0 ? '' : textOf(session.value({ sheet: sheet.id, row, column: 0 }))
  return [title, begins].filter(Boolean).join(', ')
}

/** What the column of that title says of the row; nothing of its own cells. */
function columnText(session: WorkbookSession, sheet: Sheet, row: number, of: number, title: RegExp): string {
  const header = headerAbove(sheet, row)
  for (let column = 0; column < sheet.columns.length; column += 1) {
    const titled = title.test(textOf(session.value({ sheet: sheet.id, row: header, column })))
    if (titled && column !== of) return textOf(session.value({ sheet: sheet.id, row, column }))
  }
  return ''
}

/** A sheet may hold several blocks of rows; each has its titles in a row of headings above it. */
function headerAbove(sheet: Sheet, row: number): number {
  for (let above = row - 1; above > 0; above -= 1) {
    const headings = sheet.rows[above]?.filter((cell) => cell?.format?.style === 'heading').length ?? 0
    if (headings > 1) return above
  }
  return 0
}

function textOf(value: CellValue): string {
  return typeof value === 'string' ? value.trim() : ''
}
