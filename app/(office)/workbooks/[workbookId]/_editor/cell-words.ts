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
  readonly about: string
  readonly error: string | undefined
  readonly note: string | undefined
  readonly unit: string
  readonly source: string
}

export function cellWords(session: WorkbookSession, address: CellAddress): CellWords {
  const { workbook } = session
  const sheet = sheetById(workbook, address.sheet)
  const name = cellName(address.row, address.column)
  if (!sheet) return { address: name, about: '', error: undefined, note: undefined, unit: '', source: '' }
  const cell = sheet.rows[address.row]?.[address.column]
  const value = session.value(address)
  const named = namedAt(workbook, address).find(({ role }) => role !== 'table')
  const label = named ? labelOf(named) : labelAround(session, sheet, address)
  const ground = groundWords[groundOf(cell)]
  return {
    address: name,
    about: [label, named?.name, ground, inWords(session, address, cell)].filter(Boolean).join(' · '),
    error: isCellError(value) ? value.text : undefined,
    note: cell?.note,
    unit: unitWords(session, sheet, address),
    source: columnText(session, sheet, address.row, /^source/i),
  }
}

/** A formula in words, made of the names and titles around what it refers to. */
function inWords(session: WorkbookSession, address: CellAddress, cell: Cell | undefined): string | undefined {
  return isFormula(cell?.input) ? sayFormula(session.workbook, address, cell.input) : undefined
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
  const title = textOf(session.value({ sheet: sheet.id, row: 0, column }))
  const begins = column === 0 ? '' : textOf(session.value({ sheet: sheet.id, row, column: 0 }))
  return [title, begins].filter(Boolean).join(', ')
}

function columnText(session: WorkbookSession, sheet: Sheet, row: number, title: RegExp): string {
  for (let column = 0; column < sheet.columns.length; column += 1) {
    if (!title.test(textOf(session.value({ sheet: sheet.id, row: 0, column })))) continue
    return textOf(session.value({ sheet: sheet.id, row, column }))
  }
  return ''
}

function textOf(value: CellValue): string {
  return typeof value === 'string' ? value.trim() : ''
}
