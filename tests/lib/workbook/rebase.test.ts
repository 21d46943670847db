import fc from 'fast-check'
import { describe, expect, test, vi } from 'vitest'
import {
  applyOperation,
  fromJson,
  type Operation,
  rebase,
  squash,
  toJson,
  type Workbook,
  type WorkbookJson,
} from '@/lib/workbook'
import { lineOperation, operation, setCellsOperation, sheetOperation, workbook } from './arbitrary'

// Laws run many cases, on machines that do other work too.
vi.setConfig({ testTimeout: 60_000 })

const sheets = [
  { id: 'frame', name: 'Frame' },
  { id: 'price-list', name: 'Price list' },
]
const set = (row: number, column: number, input: string | number, sheet = 'frame'): Operation => ({
  kind: 'set-cells',
  sheet,
  cells: [{ row, column, input }],
})
const insert = (at: number, count = 1): Operation => ({
  kind: 'insert-lines',
  sheet: 'frame',
  axis: 'row',
  at,
  count,
})
const remove = (at: number, count = 1): Operation => ({
  kind: 'remove-lines',
  sheet: 'frame',
  axis: 'row',
  at,
  count,
})
const move = (at: number, count: number, to: number): Operation => ({
  kind: 'move-lines',
  sheet: 'frame',
  axis: 'row',
  at,
  count,
  to,
})

describe('pending operations over those that came first', () => {
  test.each<[string, Operation[], Operation[], Operation[], number]>([
    ['W27 a cell follows its row', [set(5, 0, 1)], [insert(2)], [set(6, 0, 1)], 0],
    [
      'W27 a formula that is being set follows too',
      [set(5, 0, '=A4+A2')],
      [insert(2)],
      [set(6, 0, '=A5+A2')],
      0,
    ],
    [
      'W27 from another sheet as well',
      [set(5, 0, '=Frame!A4', 'price-list')],
      [insert(2)],
      [set(5, 0, '=Frame!A5', 'price-list')],
      0,
    ],
    ['W28 what stood on a removed row goes', [set(5, 0, 1)], [remove(5)], [], 1],
    ['W28 a reference to it is lost', [set(1, 0, '=A6')], [remove(5)], [set(1, 0, '=#REF!')], 0],
    [
      'W28 a removed sheet takes its edits',
      [set(1, 0, 1)],
      [{ kind: 'remove-sheet', sheet: 'frame' }],
      [],
      1,
    ],
    [
      'W9 a renamed sheet is renamed',
      [set(1, 0, '=Frame!A1', 'price-list')],
      [{ kind: 'rename-sheet', sheet: 'frame', name: 'House' }],
      [set(1, 0, '=House!A1', 'price-list')],
      0,
    ],
    ['W29 one cell: both are kept, the later stands', [set(1, 0, 1)], [set(1, 0, 2)], [set(1, 0, 1)], 0],
    ['W30 the second insertion goes behind the first', [insert(3)], [insert(3, 2)], [insert(5)], 0],
    ['W31 a row put among removed ones stays', [remove(2, 3)], [insert(3)], [remove(4, 2), remove(2, 1)], 0],
    ['W31 a row removed by both is removed once', [remove(2, 3)], [remove(3, 2)], [remove(2, 1)], 0],
    ['W31 removed by both altogether', [remove(2, 2)], [remove(1, 5)], [], 1],
    ['W31 moved rows are removed where they went', [remove(2, 1)], [move(2, 1, 8)], [remove(7, 1)], 0],
    ['W32 moved rows take along what came among them', [move(2, 3, 8)], [insert(3)], [move(2, 4, 9)], 0],
    [
      'W27 later ones build on earlier ones',
      [insert(0), set(6, 0, 1)],
      [remove(2)],
      [insert(0), set(5, 0, 1)],
      0,
    ],
    [
      'W27 what one inserted oneself is not shifted',
      [insert(4), set(4, 0, 1)],
      [insert(4)],
      [insert(5), set(5, 0, 1)],
      0,
    ],
  ])('[%s]', (_rule, pending, over, expected, dropped) => {
    const rebased = rebase(sheets, pending, over)
    expect(rebased.operations).toEqual(expected)
    expect(rebased.dropped).toHaveLength(dropped)
  })

  test('[W28] a partly lost set-cells is reported whole and kept in part', () => {
    const both: Operation = {
      kind: 'set-cells',
      sheet: 'frame',
      cells: [
        { row: 1, column: 0, input: 1 },
        { row: 5, column: 0, input: 2 },
      ],
    }
    const rebased = rebase(sheets, [both], [remove(5)])
    expect(rebased.operations).toEqual([set(1, 0, 1)])
    expect(rebased.dropped).toEqual([both])
  })

  test('[W27] editing and then a change of lines or sheets equals the change and then the rebased edit', () => {
    fc.assert(
      fc.property(
        workbook,
        setCellsOperation,
        fc.oneof(lineOperation, sheetOperation),
        (json, edit, change) => {
          if (change.kind === 'add-sheet') return
          const editFirst = fromJson(json)
          const changeFirst = fromJson(json)
          if (!applyOperation(changeFirst, change).ok || !applyOperation(editFirst, edit).ok) return
          // A sheet that grew by typing may take a place where nothing can be moved or removed otherwise.
          if (!applyOperation(editFirst, change).ok) return
          for (const each of rebase(json.sheets, [edit], [change]).operations) {
            expect(applyOperation(changeFirst, each)).toMatchObject({ ok: true })
          }
          expect(cells(changeFirst)).toEqual(cells(editFirst))
        },
      ),
      { numRuns: 1500 },
    )
  })

  test('[W27 W30 W31] two clients and the server converge, whatever both did', () => {
    const list = fc.array(operation, { maxLength: 5 })
    fc.assert(
      fc.property(workbook, list, list, (json, theirs, mine) => {
        const server = fromJson(json)
        const committed = theirs.filter((each) => applyOperation(server, each).ok)
        const here = fromJson(json)
        const undo: (readonly Operation[])[] = []
        const pending = mine.filter((each) => {
          const applied = applyOperation(here, each)
          if (applied.ok) undo.push(applied.value.inverse)
          return applied.ok
        })
        // The client: its own steps aside, the committed ones in, its own again as rebased.
        for (const back of undo.reverse().flat()) applyOperation(here, back)
        for (const each of committed) expect(applyOperation(here, each)).toMatchObject({ ok: true })
        const { operations } = rebase(json.sheets, pending, committed)
        const sent = operations.filter((each) => applyOperation(here, each).ok)
        // The server and a second client apply what was sent.
        const other = replay(json, [...committed, ...sent])
        for (const each of sent) expect(applyOperation(server, each)).toMatchObject({ ok: true })
        expect(toJson(here)).toEqual(toJson(server))
        expect(toJson(other)).toEqual(toJson(server))
      }),
      { numRuns: 600 },
    )
  })
})

function replay(json: WorkbookJson, operations: readonly Operation[]): Workbook {
  const workbook = fromJson(json)
  for (const each of operations) applyOperation(workbook, each)
  return workbook
}

/** Cells, extents and names apart from what a grown extent alone makes different. */
function cells(workbook: Workbook) {
  const { sheets: all, names } = toJson(workbook)
  return { names, sheets: all.map(({ id, name, cells: list }) => ({ id, name, list })) }
}

describe('two neighbouring edits as one', () => {
  test('[W10] squashed, they do what one after the other does', () => {
    fc.assert(
      fc.property(workbook, setCellsOperation, setCellsOperation, (json, a, b) => {
        const one = squash(a, b)
        if (!one) return
        const both = replay(json, [a, b])
        expect(toJson(replay(json, [one]))).toEqual(toJson(both))
      }),
      { numRuns: 1000 },
    )
  })

  test('[W10] other kinds and other sheets stay two', () => {
    expect(squash(set(0, 0, 1), set(0, 0, 1, 'price-list'))).toBeUndefined()
    expect(squash(insert(1), insert(1))).toBeUndefined()
    expect(squash(set(0, 0, 1), set(0, 0, 2))).toEqual(set(0, 0, 2))
  })
})
