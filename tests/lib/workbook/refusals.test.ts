import { describe, expect, test } from 'vitest'
import { applyOperation, type Operation, type Role, refusal, toJson } from '@/lib/workbook'
import { book } from './books'

const fixture = () =>
  book(
    { Frame: { A1: 1, B2: '=A1*2' }, 'Price list': { A1: 'code' } },
    { width: ['Frame', 0, 0] },
    { 'Price list': 'edition 3 is in force.' },
  )

const cell = (row: number, column: number, input: string | number) => ({ row, column, input })
const set = (sheet: string, ...cells: ReturnType<typeof cell>[]): Operation => ({
  kind: 'set-cells',
  sheet,
  cells,
})
const area = (sheet: string, row: number, rowCount = 1) => ({
  sheet,
  row,
  column: 0,
  rowCount,
  columnCount: 1,
})
const name = (text: string, target = area('frame', 0)): Operation => ({
  kind: 'name-value',
  name: text,
  target: { area: target, quantity: 'number', role: 'input' },
})

describe('refused operations say why and change nothing', () => {
  test.each<[Operation, string, RegExp]>([
    [set('nowhere', cell(0, 0, 1)), 'not-found', /no such sheet/],
    [set('frame', cell(100_000, 0, 1)), 'limit', /Row 100001 .* at most 100000 rows/],
    [set('frame', cell(0, 256, 1)), 'limit', /Column 257 .* at most 256 columns/],
    [set('frame', cell(0, 0, 2), cell(1, 1, Number.NaN)), 'invalid', /Frame B2: expected a number/],
    [set('frame', cell(0, 0, 'x'.repeat(32_768))), 'limit', /Frame A1: .*32768 characters; at most 32767/],
    [set('frame', cell(0, 0, `=${'('.repeat(65)}`)), 'limit', /Frame A1: .*65 deep; at most 64/],
    [
      { kind: 'insert-lines', sheet: 'frame', axis: 'row', at: 21, count: 1 },
      'invalid',
      /no row 22 here; this sheet has 20 rows/,
    ],
    [
      { kind: 'insert-lines', sheet: 'frame', axis: 'row', at: 3, count: 99_990 },
      'limit',
      /100010 rows; a sheet has at most 100000/,
    ],
    [
      { kind: 'insert-lines', sheet: 'frame', axis: 'column', at: 3, count: 250 },
      'limit',
      /258 columns; a sheet has at most 256/,
    ],
    [{ kind: 'remove-lines', sheet: 'frame', axis: 'row', at: 19, count: 2 }, 'invalid', /no row 21/],
    [
      { kind: 'remove-lines', sheet: 'frame', axis: 'column', at: 0, count: 8 },
      'invalid',
      /at least one column/,
    ],
    [
      { kind: 'move-lines', sheet: 'frame', axis: 'row', at: 2, count: 3, to: 4 },
      'invalid',
      /among themselves/,
    ],
    [{ kind: 'move-lines', sheet: 'frame', axis: 'row', at: 2, count: 3, to: 21 }, 'invalid', /no row/],
    [
      { kind: 'rename-sheet', sheet: 'frame', name: 'PRICE LIST' },
      'invalid',
      /sheet called Price list already/,
    ],
    [{ kind: 'reorder-sheet', sheet: 'frame', to: 2 }, 'invalid', /place from 1 to 2/],
    [
      {
        kind: 'add-sheet',
        sheet: 'frame',
        name: 'New',
        at: 0,
        sheetKind: 'step',
        rowCount: 1,
        columns: [{}],
      },
      'invalid',
      /identity is there already/,
    ],
    [
      {
        kind: 'add-sheet',
        sheet: 'new',
        name: 'frame',
        at: 0,
        sheetKind: 'step',
        rowCount: 1,
        columns: [{}],
      },
      'invalid',
      /called Frame already/,
    ],
    [
      { kind: 'add-sheet', sheet: 'new', name: 'New', at: 3, sheetKind: 'step', rowCount: 1, columns: [{}] },
      'invalid',
      /place from 1 to 3/,
    ],
    [{ kind: 'set-columns', sheet: 'frame', columns: [{ column: 8, width: 90 }] }, 'invalid', /no column 9/],
    [name('a1'), 'invalid', /address of a cell/],
    [name('r1c1'), 'invalid', /address of a cell/],
    [name('true'), 'invalid', /means something else/],
    [name('offset_left'), 'invalid', /means something else/],
    [name('Width'), 'invalid', /small letters/],
    [name('far', area('frame', 19, 2)), 'invalid', /far must stand for cells of Frame, which has 20 rows/],
    [name('lost', area('nowhere', 0)), 'not-found', /no such sheet/],
  ])('[W11 W12 W13 W14 W15] %j', (operation, code, words) => {
    const workbook = fixture()
    const before = toJson(workbook)
    const applied = applyOperation(workbook, operation)
    expect(applied.ok).toBe(false)
    if (!applied.ok) {
      expect(applied.failure.code).toBe(code)
      expect(applied.failure.text).toMatch(words)
    }
    expect(toJson(workbook)).toEqual(before)
  })

  test('[W15] the last sheet stays', () => {
    const workbook = book({ Only: {} })
    const applied = applyOperation(workbook, { kind: 'remove-sheet', sheet: 'only' })
    expect(applied).toMatchObject({ ok: false, failure: { text: 'A workbook keeps at least one sheet.' } })
  })

  test('[W11] a workbook holds at most 200,000 cells', () => {
    const workbook = book({ Frame: {} })
    for (let from = 0; from < 200_000; from += 20_000) {
      const cells = Array.from({ length: 20_000 }, (_, i) =>
        cell(Math.floor((from + i) / 200), (from + i) % 200, 1),
      )
      expect(applyOperation(workbook, set('frame', ...cells)).ok).toBe(true)
    }
    expect(applyOperation(workbook, set('frame', cell(2000, 0, 1)))).toMatchObject({
      failure: { code: 'limit', text: 'This would make 200001 cells; a workbook holds at most 200000.' },
    })
    expect(applyOperation(workbook, set('frame', cell(0, 0, 7))).ok).toBe(true)
  })

  test('[W11] typing past the end grows the sheet, and taking it back makes it small again', () => {
    const workbook = fixture()
    const before = toJson(workbook)
    const applied = applyOperation(workbook, set('frame', cell(30, 9, 1)))
    expect(workbook.sheets[0]).toMatchObject({ rowCount: 31 })
    expect(workbook.sheets[0]?.columns).toHaveLength(10)
    if (applied.ok) for (const back of applied.value.inverse) applyOperation(workbook, back)
    expect(toJson(workbook)).toEqual(before)
  })

  test('[W17] an extent never cuts off what somebody wrote', () => {
    const workbook = fixture()
    applyOperation(workbook, { kind: 'set-extent', sheet: 'frame', rowCount: 1, columnCount: 1 })
    expect(workbook.sheets[0]?.rowCount).toBe(2)
    expect(workbook.sheets[0]?.columns).toHaveLength(2)
  })
})

describe('who may', () => {
  const edit = set('frame', cell(0, 0, 1))
  const priceEdits: Operation[] = [
    set('price-list', cell(0, 0, 1)),
    { kind: 'insert-lines', sheet: 'price-list', axis: 'row', at: 0, count: 1 },
    { kind: 'remove-lines', sheet: 'price-list', axis: 'column', at: 0, count: 1 },
    { kind: 'move-lines', sheet: 'price-list', axis: 'row', at: 0, count: 1, to: 3 },
    { kind: 'remove-sheet', sheet: 'price-list' },
    { kind: 'rename-sheet', sheet: 'price-list', name: 'Prices' },
    { kind: 'reorder-sheet', sheet: 'price-list', to: 0 },
    { kind: 'set-columns', sheet: 'price-list', columns: [{ column: 0, width: 90 }] },
    { kind: 'set-extent', sheet: 'price-list', rowCount: 5, columnCount: 5 },
    name('price', area('price-list', 0)),
  ]

  test.each(priceEdits)('[W19] an estimator may not touch a locked sheet: $kind', (operation) => {
    expect(refusal(fixture(), operation, 'estimator')).toEqual({
      code: 'forbidden',
      text: 'Price list is locked (edition 3 is in force). A manager or the owner can change it.',
      name: 'Price list',
    })
  })

  test.each<Role>(['manager', 'owner'])('[W20] a %s may', (role) => {
    for (const operation of [edit, ...priceEdits]) expect(refusal(fixture(), operation, role)).toBeUndefined()
  })

  test('[W19] an estimator may change other sheets, and not take a name away from a locked one', () => {
    const workbook = book(
      { Frame: {}, Prices: {} },
      { price: ['Prices', 0, 0] },
      { Prices: 'kept by the manager' },
    )
    expect(refusal(workbook, edit, 'estimator')).toBeUndefined()
    expect(refusal(workbook, { kind: 'name-value', name: 'price', target: null }, 'estimator')?.code).toBe(
      'forbidden',
    )
    expect(refusal(workbook, name('price'), 'estimator')?.code).toBe('forbidden')
  })

  test('[W18] a viewer changes nothing', () => {
    for (const operation of [edit, ...priceEdits]) {
      expect(refusal(fixture(), operation, 'viewer')?.text).toMatch(
        /An estimator, a manager or the owner can/,
      )
    }
  })
})
