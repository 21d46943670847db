import type { CommandContext } from '@/lib/commands'
import { type Cell, fromJson, isFormula, type NamedValue, type Workbook } from '@/lib/workbook'

type Cells = readonly (readonly [row: number, column: number, cell: Cell])[]

const inputRow = (row: number, label: string, cell: Cell): Cells => [
  [row, 0, { input: label, ground: 'label' }],
  [row, 1, { ground: 'input', ...cell }],
]

const frame: Cells = [
  [0, 0, { input: 'Item' }],
  [0, 1, { input: 'Value' }],
  ...inputRow(1, 'Frame width', { input: 24, format: { quantity: 'length' } }),
  ...inputRow(2, 'Frame length', { input: 48, format: { quantity: 'length' } }),
  ...inputRow(3, 'Eave height', { input: 8, format: { quantity: 'length' } }),
  ...inputRow(4, 'Ridge height', { input: 14, format: { quantity: 'length' } }),
  ...inputRow(5, 'Frame type', { input: 'gable', format: { choices: ['gable', 'hoop'] } }),
  ...inputRow(6, 'Roof covering', { input: 'TW8', format: { choices: 'coverings' } }),
  ...inputRow(7, 'Side covering', { input: 'TW8', format: { choices: 'coverings' } }),
  ...inputRow(8, 'End covering', { input: 'TW8', format: { choices: 'coverings' } }),
  ...inputRow(9, 'Ground snow load', { input: 30, format: { quantity: 'pressure' } }),
  ...inputRow(10, 'Inside night temperature', { input: 55, format: { quantity: 'temperature' } }),
  ...inputRow(11, 'Waste allowance', { input: 0.08, format: { quantity: 'ratio' } }),
  ...inputRow(12, 'Roof is slippery', { input: false, format: { quantity: 'boolean' } }),
  ...inputRow(13, 'Currency', { input: 'USD', format: { quantity: 'text' } }),
  ...inputRow(14, 'Markup', { input: 0.31, format: { quantity: 'ratio' } }),
  ...inputRow(15, 'Fuel price', { input: 1.2, format: { quantity: 'money' } }),
]

const coverings = [
  ['TW8', 'Twin-wall polycarbonate 8 mm', 'clear', 1.7],
  ['TW10', 'Twin-wall polycarbonate 10 mm', 'clear', 1.9],
  ['TR8', 'Triple-wall polycarbonate 8 mm', 'diffusing', 1.8],
  ['TR16', 'Triple-wall polycarbonate 16 mm', 'diffusing', 2.4],
  ['GL3', 'Single glass 3 mm', 'clear', 0.91],
  ['DF', 'Double polyethylene film', 'diffusing', 1.43],
] as const

const coveringCells: Cells = [
  ...['Code', 'Name', 'Kind', 'R'].map((input, column) => [0, column, { input }] as const),
  ...coverings.flatMap((row, index) => row.map((input, column) => [index + 1, column, { input }] as const)),
  [coverings.length + 1, 0, { input: 'new rows go above', format: { style: 'quiet' } }],
]

const one = (sheet: string, row: number, column: number, rowCount = 1, columnCount = 1) => ({
  sheet,
  row,
  column,
  rowCount,
  columnCount,
})

const input = (name: string, row: number, quantity: NamedValue['quantity'], label: string): NamedValue => ({
  name,
  area: one('frame', row, 1),
  quantity,
  role: 'input',
  label,
})

const names: readonly NamedValue[] = [
  input('frame_width', 1, 'length', 'Frame width'),
  input('frame_length', 2, 'length', 'Frame length'),
  input('eave_height', 3, 'length', 'Eave height'),
  input('ridge_height', 4, 'length', 'Ridge height'),
  input('frame_type', 5, 'text', 'Frame type'),
  input('roof_covering', 6, 'text', 'Roof covering'),
  input('side_covering', 7, 'text', 'Side covering'),
  input('end_covering', 8, 'text', 'End covering'),
  input('ground_snow_load', 9, 'pressure', 'Ground snow load'),
  input('inside_night_temperature', 10, 'temperature', 'Inside night temperature'),
  input('waste_allowance', 11, 'ratio', 'Waste allowance'),
  input('roof_is_slippery', 12, 'boolean', 'Roof is slippery'),
  input('currency', 13, 'text', 'Currency'),
  input('markup_rate', 14, 'ratio', 'Markup'),
  input('fuel_price', 15, 'money', 'Fuel price'),
  {
    name: 'monthly_mean_temperature',
    area: one('site', 1, 1, 12),
    quantity: 'temperature',
    role: 'input',
    label: 'Monthly mean temperature',
  },
  {
    name: 'design_heat_loss',
    area: one('heat', 1, 1),
    quantity: 'heat-rate',
    role: 'result',
    label: 'Design heat loss',
  },
  {
    name: 'quotation_total',
    area: one('price', 1, 1),
    quantity: 'money',
    role: 'result',
    label: 'Quotation',
  },
  {
    name: 'roof_area',
    area: one('heat', 2, 1),
    quantity: 'area',
    role: 'result',
    label: 'Roof area',
  },
  {
    name: 'coverings',
    area: one('coverings', 1, 0, coverings.length + 1, 4),
    quantity: 'text',
    role: 'table',
    label: 'Coverings',
  },
]

const columns = (count: number) => Array.from({ length: count }, () => ({}))

/** A small house: a frame with inputs, a site, results, a step of surfaces and a locked table of coverings. */
export function house(): Workbook {
  const step = { kind: 'step' as const, rowCount: 40, columns: columns(6) }
  return fromJson({
    version: 1,
    system: 'us',
    sheets: [
      {
        ...step,
        id: 'site',
        name: 'Site',
        about: 'Where the house stands.',
        cells: [[0, 0, { input: 'Month' }]],
      },
      { ...step, id: 'frame', name: 'Frame', about: 'The frame and its dimensions.', cells: frame },
      {
        ...step,
        id: 'surfaces',
        name: 'Surfaces',
        cells: [
          [0, 0, { input: 'Surface' }],
          [0, 1, { input: 'Area' }],
          [1, 0, { input: 'South roof' }],
          [1, 1, { input: 644 }],
          [2, 0, { input: 'North roof' }],
          [2, 1, { input: 644 }],
        ],
      },
      {
        ...step,
        id: 'heat',
        name: 'Heat',
        cells: [
          [1, 1, { input: 83250, format: { quantity: 'heat-rate' } }],
          [2, 1, { input: '=frame_width*frame_length', format: { quantity: 'area' } }],
        ],
      },
      {
        ...step,
        id: 'price',
        name: 'Price',
        cells: [[1, 1, { input: 21486, format: { quantity: 'money' } }]],
      },
      {
        id: 'coverings',
        name: 'Coverings',
        kind: 'table',
        lock: 'Pinned from the price tables; a manager keeps them.',
        rowCount: 8,
        columns: [{}, {}, {}, { quantity: 'thermal-resistance' }],
        cells: coveringCells,
      },
      { ...step, id: 'stock', name: 'Sheets in stock', kind: 'table', rowCount: 10, cells: [] },
    ],
    names,
  })
}

/** Values are the inputs themselves; formulas read as blank, as before the engine is ready. */
export function contextOf(workbook: Workbook, change: Partial<CommandContext> = {}): CommandContext {
  const value: CommandContext['value'] = ({ sheet, row, column }) => {
    const found = workbook.sheets.find(({ id }) => id === sheet)?.rows[row]?.[column]?.input
    return found === undefined || isFormula(found) ? null : found
  }
  return {
    workbook,
    system: workbook.system,
    selection: { sheet: 'frame', row: 2, column: 1, rowCount: 1, columnCount: 1 },
    may: { change: true, changeLocked: false },
    undoLabel: 'Set frame width',
    redoLabel: undefined,
    value,
    named: (name) => {
      const area = workbook.names.get(name)?.area
      if (!area) return undefined
      return Array.from({ length: area.rowCount * area.columnCount }, (_, index) =>
        value({
          sheet: area.sheet,
          row: area.row + Math.floor(index / area.columnCount),
          column: area.column + (index % area.columnCount),
        }),
      )
    },
    workbooks: [
      { id: 'w-1', title: 'Heron Slough growing house', changed: '2 days ago' },
      { id: 'w-2', title: 'Millbrook school hoop house', changed: 'last week' },
    ],
    ...change,
  }
}

/** The workbooks list: nothing is open. */
export function listContext(change: Partial<CommandContext> = {}): CommandContext {
  const empty: Workbook = { version: 1, system: 'us', sheets: [], names: new Map() }
  const selection = { sheet: '', row: 0, column: 0, rowCount: 1, columnCount: 1 }
  return contextOf(empty, { selection, undoLabel: undefined, ...change })
}
