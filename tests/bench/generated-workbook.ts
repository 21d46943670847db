import type { Cell, CellInput, NamedValue, Sheet, Workbook } from '@/lib/workbook'
import { createRandom, type Random } from './random'
import { countCells, type Subject } from './subject'

/**
 * A synthetic estimating workbook: inputs, price tables of 500 rows, take-off sheets of which 7 cells in 12 are
 * formulas (each line looks its price up by exact VLOOKUP), and a summary. Same size, same workbook.
 */
export const generatedSizes = [5_000, 20_000, 50_000] as const

const tableRows = 500
const tableColumns = ['Code', 'Price', 'Weight', 'Hours']
const lineColumns = [
  'Code',
  'Where',
  'Count',
  'Length',
  'Width',
  'Area',
  'With waste',
  'Price',
  'Pieces',
  'Material',
  'Labour',
  'Line total',
]
const linesInSheet = 2_000
const last = lineColumns.length - 1

export function generateWorkbook(cellCount: number, seed = 1): Subject {
  const random = createRandom(seed + cellCount)
  const tables = [0, 1].slice(0, cellCount < 10_000 ? 1 : 2).map((i) => priceTable(i, random))
  const used = tables.length * (tableRows + 1) * tableColumns.length + 40
  const lineCount = Math.max(1, Math.floor((cellCount - used) / lineColumns.length))
  const takeOffs: Sheet[] = []
  for (let done = 0; done < lineCount; done += linesInSheet) {
    const count = Math.min(linesInSheet, lineCount - done)
    takeOffs.push(takeOff(takeOffs.length, count, tables.length, random))
  }
  const inputs = inputSheet()
  const sheets = [inputs, ...takeOffs, summarySheet(takeOffs), ...tables]
  const names: NamedValue[] = [
    named('waste_share', inputs, 1, 'input', 'ratio'),
    named('hourly_rate', inputs, 2, 'input', 'money-per-hour'),
    named('markup_share', inputs, 3, 'input', 'ratio'),
    named('stock_width', inputs, 4, 'input', 'length'),
    named('lines_total', inputs, 6, 'result', 'money'),
    ...tables.map(
      (table, i): NamedValue => ({
        name: tableName(i),
        area: { sheet: table.id, row: 1, column: 0, rowCount: tableRows, columnCount: tableColumns.length },
        quantity: 'text',
        role: 'table',
      }),
    ),
  ]
  const total = { sheet: inputs.id, row: 6, column: 1 }
  const workbook: Workbook = {
    version: 1,
    system: 'us',
    sheets,
    names: new Map(names.map((n) => [n.name, n])),
  }
  return {
    workbook,
    cells: countCells(workbook),
    edits: {
      fan: { place: { sheet: inputs.id, row: 1, column: 1 }, from: 0.05, result: total },
      price: { place: { sheet: 'bench-prices-1', row: 8, column: 1 }, from: 20, result: total },
      local: {
        place: { sheet: 'bench-lines-1', row: 1, column: 2 },
        from: 4,
        result: { sheet: 'bench-lines-1', row: 1, column: last },
      },
    },
  }
}

function named(
  name: string,
  sheet: Sheet,
  row: number,
  role: NamedValue['role'],
  quantity: NamedValue['quantity'],
): NamedValue {
  return {
    name,
    area: { sheet: sheet.id, row, column: 1, rowCount: 1, columnCount: 1 },
    quantity,
    role,
    label: name,
  }
}

const tableName = (i: number) => `price_table_${i + 1}`
const code = (row: number) => `P-${String(row).padStart(4, '0')}`
const pick = (numbers: number, random: Random) => Math.round(random.next() * numbers * 100) / 100

function priceTable(i: number, random: Random): Sheet {
  const rows: CellInput[][] = [tableColumns]
  for (let row = 0; row < tableRows; row++) {
    rows.push([code(row), 1 + pick(90, random), 0.1 + pick(20, random), 0.01 + pick(2, random)])
  }
  return sheetOf(`bench-prices-${i + 1}`, `Bench prices ${i + 1}`, 'table', rows)
}

function inputSheet(): Sheet {
  return sheetOf('bench-inputs', 'Bench inputs', 'step', [
    ['What', 'Value'],
    ['Waste', 0.05],
    ['Hourly rate', 48],
    ['Markup', 0.18],
    ['Stock width', 4],
    ['Result', 'Value'],
    ['Total of all lines', "='Bench summary'!C2"],
  ])
}

function takeOff(i: number, count: number, tables: number, random: Random): Sheet {
  const rows: CellInput[][] = [lineColumns]
  for (let line = 0; line < count; line++) {
    const r = line + 2
    const table = tableName(line % tables)
    rows.push([
      code(random.whole(0, tableRows - 1)),
      `Bay ${random.whole(1, 40)}`,
      random.whole(1, 12),
      2 + pick(20, random),
      1 + pick(3, random),
      `=C${r}*D${r}*E${r}`,
      `=F${r}*(1+waste_share)`,
      `=VLOOKUP(A${r},${table},2,0)`,
      `=ROUNDUP(ROUND(G${r}/(D${r}*stock_width),9),0)`,
      `=G${r}*H${r}`,
      `=VLOOKUP(A${r},${table},4,0)*G${r}*hourly_rate`,
      `=(J${r}+K${r})*(1+markup_share)`,
    ])
  }
  return sheetOf(`bench-lines-${i + 1}`, `Bench lines ${i + 1}`, 'step', rows)
}

function summarySheet(takeOffs: readonly Sheet[]): Sheet {
  const totals = takeOffs.map((sheet): CellInput[] => {
    const range = (column: string) => `'${sheet.name}'!${column}2:${column}${sheet.rowCount}`
    return [sheet.name, `=SUM(${range('I')})`, `=SUM(${range('L')})`]
  })
  const sum = (column: string) => `=SUM(${column}3:${column}${totals.length + 2})`
  return sheetOf('bench-summary', 'Bench summary', 'step', [
    ['Sheet', 'Pieces', 'Total'],
    ['All', sum('B'), sum('C')],
    ...totals,
  ])
}

function sheetOf(id: string, name: string, kind: Sheet['kind'], rows: CellInput[][]): Sheet {
  const cell = (input: CellInput, row: number): Cell => {
    if (row === 0) return { input, ground: 'label' }
    if (typeof input !== 'number')
      return { input, ...(typeof input === 'string' && { format: { digits: 2 } }) }
    return { input, ground: kind === 'table' ? 'table' : 'input', format: { quantity: 'number', digits: 2 } }
  }
  return {
    id,
    name,
    kind,
    rowCount: rows.length,
    // Narrow enough for all of a take-off sheet's columns to be on the screen: what is not there is not painted.
    columns: (rows[0] ?? []).map(() => ({ width: rows[0]?.length === lineColumns.length ? 92 : 130 })),
    rows: rows.map((inputs, row) => inputs.map((input) => cell(input, row))),
  }
}
