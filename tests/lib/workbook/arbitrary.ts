import fc from 'fast-check'
import type { CellPatch, Operation, WorkbookJson } from '@/lib/workbook'

/** Generated workbooks and operations: small sheets, so that operations meet each other's cells often. */
export const sheetIds = ['frame', 'price', 'extra']
export const sheetNames = ['Frame', 'Price list', 'Extra', 'Late']

const column = fc.integer({ min: 0, max: 5 })
const row = fc.integer({ min: 0, max: 9 })
const letters = 'ABCDEF'

const cellText = fc
  .record({ row, column, rowFixed: fc.boolean(), columnFixed: fc.boolean() })
  .map((c) => `${c.columnFixed ? '$' : ''}${letters[c.column]}${c.rowFixed ? '$' : ''}${c.row + 1}`)

const prefix = fc.constantFrom('', '', '', 'Frame!', "'Price list'!", 'Extra!', 'Late!', 'frame!')

const single = fc.tuple(prefix, cellText).map(([sheet, cell]) => sheet + cell)
const range = fc.oneof(
  fc.tuple(prefix, cellText, cellText).map(([sheet, a, b]) => `${sheet}${a}:${b}`),
  fc
    .tuple(prefix, column, column)
    .map(([sheet, a, b]) => `${sheet}${letters[Math.min(a, b)]}:${letters[Math.max(a, b)]}`),
  fc.tuple(prefix, row, row).map(([sheet, a, b]) => `${sheet}${Math.min(a, b) + 1}:${Math.max(a, b) + 1}`),
)
const name = fc.constantFrom('width', 'height', 'rate')

export const formula = fc.oneof(
  single.map((a) => `=${a}`),
  fc.tuple(single, single).map(([a, b]) => `=${a}+2*${b}`),
  fc.tuple(range, single).map(([a, b]) => `=SUM(${a})-${b}`),
  range.map((a) => `=COUNT(${a})`),
  range.map((a) => `=SUMPRODUCT(${a})`),
  fc.tuple(range, name).map(([a, b]) => `=IF(${b}>2, MAX(${a}), "A1 said ""B2""")`),
  name.map((a) => `=${a}*2`),
  single.map((a) => `=IFERROR(VLOOKUP(3,$A$1:$C$8,2,FALSE),${a})`),
)

export const input = fc.oneof(
  { weight: 3, arbitrary: fc.integer({ min: -5, max: 9 }) },
  { weight: 4, arbitrary: formula },
  {
    weight: 1,
    arbitrary: fc.constantFrom<string | boolean | null>('text', "'=text", '12%', '2026-01-02', true, null),
  },
)

const sheet = fc.constantFrom(...sheetIds)
const axis = fc.constantFrom<'row' | 'column'>('row', 'column')
const few = fc.integer({ min: 1, max: 3 })
const line = fc.integer({ min: 0, max: 11 })

export const patch: fc.Arbitrary<CellPatch> = fc.record(
  {
    row: fc.integer({ min: 0, max: 11 }),
    column: fc.integer({ min: 0, max: 6 }),
    input,
    note: fc.constantFrom(null, 'see the drawing'),
    ground: fc.constantFrom(null, 'input' as const, 'override' as const),
    format: fc.constantFrom(null, { quantity: 'length' as const }, { style: 'total' as const, digits: 2 }),
  },
  { requiredKeys: ['row', 'column'] },
)

export const setCellsOperation: fc.Arbitrary<Operation> = fc.record(
  {
    kind: fc.constant('set-cells' as const),
    sheet,
    cells: fc.array(patch, { minLength: 1, maxLength: 4 }),
    system: fc.constantFrom('us' as const, 'si' as const),
  },
  { requiredKeys: ['kind', 'sheet', 'cells'] },
)

export const lineOperation: fc.Arbitrary<Operation> = fc.oneof(
  fc.record({ kind: fc.constant('insert-lines' as const), sheet, axis, at: line, count: few }),
  fc.record({ kind: fc.constant('remove-lines' as const), sheet, axis, at: line, count: few }),
  fc.record({ kind: fc.constant('move-lines' as const), sheet, axis, at: line, count: few, to: line }),
)

export const sheetOperation: fc.Arbitrary<Operation> = fc.oneof(
  fc.record({
    kind: fc.constant('add-sheet' as const),
    sheet,
    name: fc.constantFrom(...sheetNames),
    at: fc.integer({ min: 0, max: 3 }),
    sheetKind: fc.constant('step' as const),
    rowCount: fc.integer({ min: 1, max: 8 }),
    columns: fc.array(fc.constantFrom({}, { width: 90 }, { quantity: 'length' as const }), {
      minLength: 1,
      maxLength: 5,
    }),
  }),
  fc.record({ kind: fc.constant('remove-sheet' as const), sheet }),
  fc.record({ kind: fc.constant('rename-sheet' as const), sheet, name: fc.constantFrom(...sheetNames) }),
  fc.record({ kind: fc.constant('reorder-sheet' as const), sheet, to: fc.integer({ min: 0, max: 2 }) }),
)

const target = fc.record({
  area: fc.record({ sheet, row, column, rowCount: few, columnCount: fc.constantFrom(1, 1, 2) }),
  quantity: fc.constant('number' as const),
  role: fc.constant('input' as const),
})

export const nameOperation: fc.Arbitrary<Operation> = fc.record({
  kind: fc.constant('name-value' as const),
  name,
  target: fc.oneof(fc.constant(null), target),
})

export const columnsOperation: fc.Arbitrary<Operation> = fc.oneof(
  fc.record({
    kind: fc.constant('set-columns' as const),
    sheet,
    columns: fc.array(
      fc.record(
        {
          column,
          width: fc.constantFrom(null, 80, 200),
          quantity: fc.constantFrom(null, 'area' as const, 'money' as const),
        },
        { requiredKeys: ['column'] },
      ),
      { minLength: 1, maxLength: 3 },
    ),
  }),
  fc.record({
    kind: fc.constant('set-extent' as const),
    sheet,
    rowCount: fc.integer({ min: 1, max: 14 }),
    columnCount: fc.integer({ min: 1, max: 9 }),
  }),
)

/** A conversion; of the numbers that it says stood there, most do not fit and are passed over. */
export const convertOperation: fc.Arbitrary<Operation> = fc.record(
  {
    kind: fc.constant('convert-units' as const),
    system: fc.constantFrom('us' as const, 'us' as const, 'si' as const),
    exact: fc.array(fc.record({ sheet, row, column, value: fc.double({ noNaN: true }) }), { maxLength: 2 }),
  },
  { requiredKeys: ['kind', 'system'] },
)

export const operation: fc.Arbitrary<Operation> = fc.oneof(
  { weight: 4, arbitrary: setCellsOperation },
  { weight: 5, arbitrary: lineOperation },
  { weight: 2, arbitrary: sheetOperation },
  { weight: 2, arbitrary: nameOperation },
  { weight: 1, arbitrary: columnsOperation },
  { weight: 2, arbitrary: convertOperation },
)

/** A workbook of two sheets with generated cells (as JSON, so that a test cannot change what was generated); `Extra` and `Late` are named by formulas but not there. */
export const workbook: fc.Arbitrary<WorkbookJson> = fc
  .tuple(
    fc.array(fc.tuple(row, column, input), { maxLength: 25 }),
    fc.array(fc.tuple(row, column, input), { maxLength: 12 }),
  )
  .map(([frame, price]) => ({
    version: 1 as const,
    system: 'si' as const,
    sheets: [
      {
        id: 'frame',
        name: 'Frame',
        kind: 'step' as const,
        rowCount: 10,
        columns: columns(6),
        cells: cellsOf(frame),
      },
      {
        id: 'price',
        name: 'Price list',
        kind: 'table',
        rowCount: 10,
        columns: columns(6),
        cells: cellsOf(price),
      },
    ],
    names: [
      {
        name: 'width',
        area: { sheet: 'frame', row: 1, column: 1, rowCount: 1, columnCount: 1 },
        quantity: 'length',
        role: 'input',
      },
      {
        name: 'rate',
        area: { sheet: 'price', row: 2, column: 2, rowCount: 1, columnCount: 1 },
        quantity: 'ratio',
        role: 'constant',
      },
    ],
  }))

function columns(count: number): Record<string, never>[] {
  return Array.from({ length: count }, () => ({}))
}

function cellsOf(
  list: readonly (readonly [number, number, string | number | boolean | null])[],
): [number, number, { input: string | number | boolean }][] {
  return list.flatMap(([r, c, value]) => (value === null ? [] : [[r, c, { input: value }]]))
}
