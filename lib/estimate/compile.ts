import { convert, type Quantity, type UnitSystem, unitOf } from '../units'
import type { Cell, CellFormat, Column, NamedValue, Sheet, Workbook } from '../workbook'
import { columnName } from '../workbook/address'
import type {
  CellContent,
  GridBlock,
  Line,
  LinesBlock,
  RichCell,
  Scalar,
  SheetDeclaration,
  Stated,
} from './declare'
import { columnOf, lineColumns, type PlacedBlock, place, quoteSheet } from './layout'

/**
 * D1 Every named value has one place, a label, a quantity and a role; names are declared once.
 * D2 Row 0 of every sheet is its header; numbers are written in the units of the workbook's system.
 */
export function compile(sheets: readonly SheetDeclaration[], system: UnitSystem): Workbook {
  const placed = place(sheets)
  const workbook: Workbook = { version: 1, system, sheets: [], names: new Map() }
  const byId = new Map<string, Sheet>()
  for (const sheet of sheets) {
    const made: Sheet = {
      id: sheet.id,
      name: sheet.name,
      kind: sheet.kind,
      about: sheet.about,
      ...(sheet.lock === undefined ? {} : { lock: sheet.lock }),
      rowCount: 1,
      columns: columnsOf(sheet),
      rows: [],
    }
    byId.set(sheet.id, made)
    workbook.sheets.push(made)
  }
  const define = (name: string, rest: Omit<NamedValue, 'name' | 'area'>): void => {
    const area = placed.areas.get(name)
    if (!area) throw new Error(`the name ${name} has no place`)
    workbook.names.set(name, { name, area, ...rest })
  }
  const sameOrder = (name: string, offset: number): string => {
    const area = placed.areas.get(name)
    if (!area) throw new Error(`no column is named ${name}`)
    const sheet = quoteSheet(placed.sheetNames.get(area.sheet) ?? area.sheet)
    return `${sheet}!${columnName(area.column)}${area.row + offset + 1}`
  }
  for (const at of placed.blocks) {
    const sheet = byId.get(at.sheet.id)
    if (!sheet) throw new Error(`no sheet ${at.sheet.id}`)
    sheet.rowCount = Math.max(sheet.rowCount, at.firstRow + at.rowCount)
    if (at.block.kind === 'lines') emitLines(sheet, at, at.block, system, define)
    else emitGrid(sheet, at, at.block, system, define, sameOrder)
  }
  return workbook
}

type Define = (name: string, rest: Omit<NamedValue, 'name' | 'area'>) => void

function columnsOf(sheet: SheetDeclaration): Column[] {
  const columns: Column[] = []
  sheet.blocks.forEach((block, order) => {
    const list = block.kind === 'lines' ? lineColumns : block.columns
    list.forEach((column, index) => {
      if (columns[index]) return
      const quantity = order === 0 && 'quantity' in column ? column.quantity : undefined
      columns[index] = { width: column.width ?? 110, ...(quantity === undefined ? {} : { quantity }) }
    })
  })
  return columns
}

function put(sheet: Sheet, row: number, column: number, cell: Cell): void {
  let cells = sheet.rows[row]
  if (!cells) {
    cells = []
    sheet.rows[row] = cells
  }
  cells[column] = cell
}

const label = (text: string, style?: 'heading' | 'quiet'): Cell => ({
  input: text,
  ground: 'label',
  ...(style ? { format: { style } } : {}),
})

function emitLines(
  sheet: Sheet,
  at: PlacedBlock,
  block: LinesBlock,
  system: UnitSystem,
  define: Define,
): void {
  lineColumns.forEach((column, index) => {
    put(sheet, at.headerRow, index, label(column.title, 'heading'))
  })
  block.lines.forEach((line, index) => {
    const row = at.firstRow + index
    put(sheet, row, 0, label(line.label, line.kind === 'heading' ? 'heading' : undefined))
    if (line.kind === 'heading') return
    put(sheet, row, 1, valueCell(line, system))
    const unit = unitText(
      line.kind === 'check' ? 'text' : line.quantity,
      'unit' in line ? line.unit : undefined,
    )
    if (unit !== '') put(sheet, row, 2, label(unit, 'quiet'))
    if (line.source !== '') put(sheet, row, 3, label(line.source, 'quiet'))
    if (line.note !== undefined) put(sheet, row, 4, label(line.note, 'quiet'))
    put(sheet, row, 5, label(line.name, 'quiet'))
    define(line.name, {
      quantity: line.kind === 'check' ? 'text' : line.quantity,
      role: line.kind === 'check' || line.kind === 'computed' ? 'result' : line.kind,
      label: line.label,
    })
  })
}

function valueCell(line: Exclude<Line, { kind: 'heading' }>, system: UnitSystem): Cell {
  if (line.kind === 'check') return { input: line.formula, format: { quantity: 'text' } }
  const format: CellFormat = {
    quantity: line.quantity,
    ...(line.digits === undefined ? {} : { digits: line.digits }),
    ...(line.unit === undefined || line.unit.startsWith('=') ? {} : { unit: line.unit }),
    ...(line.kind === 'input' && line.choices !== undefined ? { choices: line.choices } : {}),
    ...(line.kind === 'computed' && line.total ? { style: 'total' } : {}),
  }
  if (line.kind === 'computed') {
    return { input: line.formula, format, ...(line.ground ? { ground: line.ground } : {}) }
  }
  const value = line.value === undefined ? undefined : inSystem(line.value, line.quantity, system)
  return {
    ...(value === undefined ? {} : { input: value }),
    format,
    ...(line.kind === 'input' ? { ground: 'input' } : {}),
  }
}

function emitGrid(
  sheet: Sheet,
  at: PlacedBlock,
  block: GridBlock,
  system: UnitSystem,
  define: Define,
  sameOrder: (name: string, offset: number) => string,
): void {
  block.columns.forEach((column, index) => {
    const note = column.source === undefined ? {} : { note: `Source: ${column.source}` }
    put(sheet, at.headerRow, index, { ...label(column.title, 'heading'), ...note })
    if (column.named) {
      const { name, ...rest } = column.named
      define(name, { quantity: column.quantity, role: rest.role, label: rest.label })
    }
  })
  if (block.table) {
    define(block.table.name, { quantity: 'text', role: 'table', label: block.table.label })
    define(`${block.table.name}_columns`, {
      quantity: 'text',
      role: 'table',
      label: `column titles of ${block.table.label}`,
    })
  }
  const titles = new Set(block.columns.map(({ title }) => title))
  block.rows.forEach((row, offset) => {
    const unknown = Object.keys(row).find((title) => !titles.has(title))
    if (unknown !== undefined) throw new Error(`no column is called ${unknown}`)
    block.columns.forEach((column, index) => {
      const given = row[column.title]
      const content = asRich(given)
      const value = content?.value ?? column.formula
      const ground = content?.ground ?? column.ground
      const quantity = content?.quantity ?? column.quantity
      if (content?.name) {
        define(content.name.name, { quantity, role: content.name.role, label: content.name.label })
      }
      if (value === undefined && ground !== 'input') return
      const input = value === undefined ? undefined : inSystem(value, quantity, system)
      const unit = content?.unit ?? column.unit
      const format: CellFormat = {
        quantity,
        ...(column.digits === undefined ? {} : { digits: column.digits }),
        ...(unit === undefined ? {} : { unit }),
        ...(column.choices === undefined ? {} : { choices: column.choices }),
        ...(content?.style ? { style: content.style } : {}),
      }
      put(sheet, at.firstRow + offset, index, {
        ...(input === undefined
          ? {}
          : { input: refer(input, block, at.firstRow + offset, offset, sameOrder) }),
        format,
        ...(ground ? { ground } : {}),
        ...(content?.note === undefined ? {} : { note: content.note }),
      })
    })
  })
  if (block.closing !== undefined) {
    put(sheet, at.firstRow + block.rows.length, 0, label(block.closing, 'quiet'))
  }
}

function asRich(content: CellContent | undefined): RichCell | undefined {
  if (content === undefined) return undefined
  if (typeof content !== 'object') return { value: content }
  return 'in' in content ? { value: content } : content
}

/** A stated number as a workbook of this system writes it. */
export function inSystem(stated: Stated, quantity: Quantity, system: UnitSystem): Scalar {
  if (typeof stated === 'number') return convert(stated, quantity, 'us', system)
  if (typeof stated === 'object') return convert(stated.value, quantity, stated.in, system)
  return stated
}

function refer(
  value: Scalar,
  block: GridBlock,
  row: number,
  offset: number,
  sameOrder: (name: string, offset: number) => string,
): Scalar {
  if (typeof value !== 'string' || !value.startsWith('=')) return value
  return value
    .replace(/\[(?:(first|above):)?([^\]]+)\]/g, (_, reach: string | undefined, title: string) => {
      const letters = columnName(columnOf(block, title))
      const first = row - offset + 1
      if (reach === 'first') return `${letters}$${first}:${letters}${row + 1}`
      if (reach === 'above') return `${letters}$${first - 1}:${letters}${row}`
      return `${letters}${row + 1}`
    })
    .replace(/\{([a-z0-9_]+)(?::(\d+))?\}/g, (_, name: string, index: string | undefined) =>
      sameOrder(name, index === undefined ? offset : Number(index)),
    )
}

const currencyMark = '¤'

/** What stands in the Unit column: a text, or a formula where it depends on the unit system or the currency. */
export function unitText(quantity: Quantity, own?: string): string {
  if (own !== undefined) return own
  if (quantity === 'text' || quantity === 'boolean' || quantity === 'date') return ''
  const [us, si] = [unitOf(quantity, 'us', currencyMark).symbol, unitOf(quantity, 'si', currencyMark).symbol]
  if (us === si && !us.startsWith(currencyMark)) return us
  const money = us.startsWith(currencyMark)
  const [usRest, siRest] = money ? [us.slice(1), si.slice(1)] : [us, si]
  const rest =
    usRest === siRest ? (usRest === '' ? '' : `"${usRest}"`) : `IF(unit_system="us","${usRest}","${siRest}")`
  return money ? `=currency${rest === '' ? '' : `&${rest}`}` : `=${rest}`
}
