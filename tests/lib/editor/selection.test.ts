import { describe, expect, it } from 'vitest'
import {
  blockEdge,
  type CellSelection,
  type Extent,
  moved,
  rectangle,
  single,
} from '@/app/(office)/workbooks/[workbookId]/_grid/selection'

const extent: Extent = { firstRow: 1, lastRow: 20, lastColumn: 5, page: 8 }
const blank = () => false
const at = (selection: CellSelection) => [selection.active.row, selection.active.column]

describe('moving', () => {
  it.each([
    ['down', single(3, 2), { kind: 'move', rows: 1, columns: 0, extend: false }, [4, 2]],
    [
      'up from the first row stays',
      single(1, 2),
      { kind: 'move', rows: -1, columns: 0, extend: false },
      [1, 2],
    ],
    [
      'right from the last column stays',
      single(3, 5),
      { kind: 'move', rows: 0, columns: 1, extend: false },
      [3, 5],
    ],
    ['a page', single(3, 2), { kind: 'page', by: 1, extend: false }, [11, 2]],
    ['to the end of the row', single(3, 2), { kind: 'jump', to: 'row-end', extend: false }, [3, 5]],
    ['to the start of the sheet', single(3, 2), { kind: 'jump', to: 'sheet-start', extend: false }, [1, 0]],
    ['to the end of the sheet', single(3, 2), { kind: 'jump', to: 'sheet-end', extend: false }, [20, 5]],
  ] as const)('%s', (_, from, action, to) => expect(at(moved(from, action, extent, blank))).toEqual(to))

  it('extending keeps the active cell and moves the far corner', () => {
    const right = moved(single(3, 2), { kind: 'move', rows: 0, columns: 1, extend: true }, extent, blank)
    const down = moved(right, { kind: 'move', rows: 1, columns: 0, extend: true }, extent, blank)
    expect(at(down)).toEqual([3, 2])
    expect(rectangle(down)).toEqual({ row: 3, column: 2, rowCount: 2, columnCount: 2 })
  })

  it('a run of Tabs followed by Enter returns to its first column', () => {
    const tab = { kind: 'step', axis: 'column', by: 1 } as const
    const enter = { kind: 'step', axis: 'row', by: 1 } as const
    const tabbed = [tab, tab].reduce((from, action) => moved(from, action, extent, blank), single(3, 1))
    expect(at(tabbed)).toEqual([3, 3])
    expect(at(moved(tabbed, enter, extent, blank))).toEqual([4, 1])
  })

  it('Enter and Tab go round inside a range and leave it as it is', () => {
    const range: CellSelection = {
      active: { row: 3, column: 2 },
      anchor: { row: 3, column: 2 },
      focus: { row: 4, column: 3 },
    }
    const round = (axis: 'row' | 'column') =>
      Array.from({ length: 4 }).reduce<CellSelection[]>((all) => {
        const last = all.at(-1) ?? range
        return [...all, moved(last, { kind: 'step', axis, by: 1 }, extent, blank)]
      }, [])
    expect(round('row').map(at)).toEqual([
      [4, 2],
      [3, 3],
      [4, 3],
      [3, 2],
    ])
    expect(round('column').map(at)).toEqual([
      [3, 3],
      [4, 2],
      [4, 3],
      [3, 2],
    ])
    expect(rectangle(round('row')[3] ?? range)).toEqual(rectangle(range))
  })

  it('whole rows and columns of a selection', () => {
    expect(rectangle(moved(single(3, 2), { kind: 'select', what: 'row' }, extent, blank))).toEqual({
      row: 3,
      column: 0,
      rowCount: 1,
      columnCount: 6,
    })
    expect(rectangle(moved(single(3, 2), { kind: 'select', what: 'column' }, extent, blank))).toEqual({
      row: 1,
      column: 2,
      rowCount: 20,
      columnCount: 1,
    })
  })
})

describe('blocks of filled cells', () => {
  // Rows 3 to 6 and row 10 of column 0 are filled.
  const filled = ({ row, column }: { row: number; column: number }) =>
    column === 0 && ((row >= 3 && row <= 6) || row === 10)
  it.each([
    ['inside a block: its last cell', 3, 1, 6],
    ['from the last cell of a block: the next filled cell', 6, 1, 10],
    ['from a blank: the first filled cell', 1, 1, 3],
    ['after the last block: the edge', 10, 1, 20],
    ['upwards', 10, -1, 6],
    ['from the first row', 1, -1, 1],
  ])('%s', (_, row, by, to) =>
    expect(blockEdge({ row, column: 0 }, by, 0, extent, filled)).toEqual({ row: to, column: 0 }),
  )
})
