import { describe, expect, test, vi } from 'vitest'
import { buildWorkbook, frameTypes } from '@/lib/estimate'
import type { Quantity } from '@/lib/units'
import { applyOperation, type Cell, fromJson, quantityWarnings, type Workbook } from '@/lib/workbook'

vi.setConfig({ testTimeout: 60_000 })

function seeded(frame_type: string): Workbook {
  const inputs = frame_type === 'gothic' ? { frame_type, ridge_height: 22 } : { frame_type }
  const built = buildWorkbook({ system: 'us', inputs })
  if (!built.ok) throw new Error(built.failure.text)
  return built.value
}

const said = (workbook: Workbook) =>
  quantityWarnings(workbook).map(({ sheet, row, column, text }) => {
    const input = workbook.sheets.find(({ id }) => id === sheet)?.rows[row]?.[column]?.input
    return `${sheet} ${row + 1}:${column + 1} ${text}: ${String(input)}`
  })

describe('kinds of quantity on the seeded workbook', () => {
  test.each(frameTypes)('[K5] %s: no false warning, in either system', (type) => {
    const workbook = seeded(type)
    expect(said(workbook)).toEqual([])
    applyOperation(workbook, { kind: 'convert-units', system: 'si' })
    expect(said(workbook)).toEqual([])
  })

  test.each([
    ['=frame_width+roof_area', 'Adds a length to an area'],
    ['=design_heat_loss-quotation_total', 'Takes an amount of money from a heat rate'],
    ['=SUM(frame_width,roof_area)', 'Adds a length and an area'],
  ])('[K2] a mistake planted on it: %s', (formula, text) => {
    const workbook = seeded('gable')
    const at = workbook.names.get('frame_width')?.area
    if (!at) throw new Error('no frame_width')
    const cells = [{ row: at.row, column: 9, input: formula }]
    expect(applyOperation(workbook, { kind: 'set-cells', sheet: at.sheet, cells }).ok).toBe(true)
    expect(quantityWarnings(workbook)).toEqual([{ sheet: at.sheet, row: at.row, column: 9, text }])
  })
})

const inputs = {
  width: 'length',
  gap: 'small-length',
  floor: 'area',
  room: 'volume',
  tilt: 'angle',
  inside: 'temperature',
  outside: 'temperature',
  rise: 'temperature-difference',
  loss: 'heat-rate',
  fuel: 'energy',
  u: 'u-value',
  r: 'thermal-resistance',
  price: 'money',
  rate: 'money-per-area',
  wage: 'money-per-hour',
  work: 'hours',
  life: 'years',
  weight: 'mass',
  share: 'ratio',
  sheets: 'count',
  plain: 'number',
  capacity: 'volumetric-heat-capacity',
  changes: 'air-changes',
  note: 'text',
} as const satisfies Readonly<Record<string, Quantity>>

/** Named cells of every kind in column B, and a formula in D1, whose cell is for `own`. */
function bookWith(formula: string, own?: Quantity): Workbook {
  const names = Object.entries(inputs)
  const cells = names.map(([, quantity], row): [number, number, Cell] => [
    row,
    1,
    { input: 2, format: { quantity } },
  ])
  const asked: Cell = { input: formula, ...(own ? { format: { quantity: own } } : {}) }
  const table: [number, number, Cell][] = [
    [0, 6, { input: 'code', format: { style: 'heading' } }],
    [0, 7, { input: 'wide', format: { style: 'heading' } }],
    [0, 8, { input: 'price', format: { style: 'heading' } }],
    [1, 6, { input: 'A' }],
    [1, 7, { input: 4, format: { quantity: 'length' } }],
    [1, 8, { input: 4, format: { quantity: 'money-per-area' } }],
  ]
  const area = (row: number, column: number, columnCount = 1) => ({
    sheet: 'a',
    row,
    column,
    rowCount: 1,
    columnCount,
  })
  return fromJson({
    version: 1,
    system: 'us',
    sheets: [
      {
        id: 'a',
        name: 'A',
        kind: 'step',
        rowCount: 40,
        columns: Array.from({ length: 9 }, () => ({})),
        cells: [...cells, ...table, [0, 3, asked]],
      },
    ],
    names: [
      ...names.map(([name, quantity], row) => ({
        name,
        area: area(row, 1),
        quantity,
        role: 'input' as const,
      })),
      { name: 'table', area: area(1, 6, 3), quantity: 'text', role: 'table' },
      { name: 'table_columns', area: area(0, 6, 3), quantity: 'text', role: 'table' },
    ],
  })
}

describe('kinds of quantity in a formula', () => {
  test.each<[string, string, Quantity?]>([
    ['=width+floor', 'Adds a length to an area'],
    ['=width-floor', 'Takes an area from a length'],
    ['=width*width-room', 'Takes a volume from an area'],
    ['=B1+B3', 'Adds a length to an area'],
    ['=SUM(B1:B1,B3)', 'Adds a length and an area'],
    ['=IF(width>floor,1,2)', 'Compares a length with an area'],
    ['=MAX(width,floor)', 'Compares a length with an area'],
    ['=width+gap', 'Adds a length to a small length'],
    ['=2*width+floor', 'Adds a length to an area'],
    ['=price+loss', 'Adds an amount of money to a heat rate'],
    ['=work+life', 'Adds a number of hours to a number of years'],
    ['=inside+width', 'Adds a temperature to a length'],
    ['=IF(inside>rise,1,0)', 'Compares a temperature with a temperature difference'],
    ['=u*floor*(inside-outside)+fuel', 'Adds a heat rate to an energy'],
    ['=floor/r*rise-weight', 'Takes a mass from a heat rate'],
    ['=SIN(tilt)', 'Takes the sine of an angle in degrees; RADIANS turns it'],
    ['=COS(RADIANS(width))', 'Turns a length into radians as if it were an angle'],
    ['=share+width', 'Adds a ratio to a length'],
    ['=width*floor', 'Gives a volume, where the cell is for an area', 'area'],
    ['=u*floor', 'Gives a conductance, where the cell is for a heat rate', 'heat-rate'],
    ['=inside-outside', 'Gives a temperature difference, where the cell is for a temperature', 'temperature'],
    ['=gap', 'Gives a small length, where the cell is for a length', 'length'],
    ['=VLOOKUP("A",table,MATCH("wide",table_columns,0),0)+floor', 'Adds a length to an area'],
    ['=VLOOKUP("A",table,3,0)', 'Gives a price per area, where the cell is for a length', 'length'],
    [
      '=floor*capacity',
      'Gives heat ÷ length ÷ temperature together, where the cell is for a conductance',
      'conductance',
    ],
    ['=SQRT(floor)+floor', 'Adds a length to an area'],
  ])('[K2 K3 K4] %s: %s', (formula, text, own) => {
    expect(quantityWarnings(bookWith(formula, own)).map((warning) => warning.text)).toEqual([text])
  })

  test.each<[string, Quantity?]>([
    ['=width+2'],
    ['=width+plain'],
    ['=plain*width+floor'],
    ['=12*width+gap'],
    ['=width*12', 'small-length'],
    ['=inside-outside', 'temperature-difference'],
    ['=inside+rise', 'temperature'],
    ['=(inside+outside)/2', 'temperature'],
    ['=(inside-32)*5/9', 'temperature'],
    ['=u*floor*(inside-outside)', 'heat-rate'],
    ['=capacity*room*changes*(inside-outside)', 'heat-rate'],
    ['=1/r', 'u-value'],
    ['=loss*24', 'energy'],
    ['=fuel*price', 'money'],
    ['=price*life', 'money'],
    ['=rate*floor*(1+share)', 'money'],
    ['=wage*work', 'money'],
    ['=sheets*width', 'length'],
    ['=SQRT(width^2+width^2)', 'length'],
    ['=SIN(RADIANS(tilt))*width', 'length'],
    ['=floor/width', 'length'],
    ['=IF(sheets=0,floor,sheets)', 'area'],
    ['=SUMPRODUCT((B1:B1>2)*B1:B1)', 'length'],
    ['=IF(note="a",width,0)', 'length'],
    ['=VLOOKUP("A",table,MATCH("wide",table_columns,0),0)', 'length'],
    ['=SUM(B1:B20)', 'length'],
    ['=width&floor', 'text'],
    ['=width+', 'area'],
    ['=RATE(width,floor,room)', 'ratio'],
  ])('[K1 K5] nothing is said of %s', (formula, own) => {
    expect(quantityWarnings(bookWith(formula, own))).toEqual([])
  })
})
