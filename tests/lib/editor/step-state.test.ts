import { describe, expect, it } from 'vitest'
import { stepState } from '@/app/(office)/workbooks/[workbookId]/_editor/step-state'
import type { Cell, CellAddress, CellValue, NamedValue, Sheet, Workbook } from '@/lib/workbook'

function sheetOf(rows: (Cell | undefined)[][]): Sheet {
  return { id: 'frame', name: 'Frame', kind: 'step', rowCount: rows.length, columns: [{}, {}], rows }
}

const width: NamedValue = {
  name: 'frame_width',
  quantity: 'length',
  role: 'input',
  area: { sheet: 'frame', row: 1, column: 1, rowCount: 1, columnCount: 1 },
}
const workbookOf = (sheet: Sheet): Workbook => ({
  version: 1,
  system: 'us',
  sheets: [sheet],
  names: new Map([[width.name, width]]),
})
const header: Cell[] = [{ input: 'Input' }, { input: 'Value' }]
const read =
  (sheet: Sheet, errors: Record<string, CellValue> = {}) =>
  ({ row, column }: CellAddress): CellValue =>
    errors[`${row} ${column}`] ?? sheet.rows[row]?.[column]?.input ?? null

describe('the state of a step', () => {
  it('is in order when its inputs are there and nothing is in error', () => {
    const sheet = sheetOf([header, [{ input: 'Width' }, { input: 24, ground: 'input' }]])
    expect(stepState(workbookOf(sheet), sheet, read(sheet))).toEqual({
      filled: true,
      toLookAt: 0,
      words: [],
      first: undefined,
    })
  })

  it('counts cells in error, overrides and named inputs that are blank, and says where', () => {
    const sheet = sheetOf([
      header,
      [{ input: 'Width' }, { ground: 'input' }],
      [{ input: 'R' }, { input: 11, ground: 'override' }],
      [{ input: 'U' }, { input: '=1/0' }],
    ])
    const state = stepState(
      workbookOf(sheet),
      sheet,
      read(sheet, { '3 1': { error: '#DIV/0!', text: 'divides by zero' } }),
    )
    expect(state.toLookAt).toBe(3)
    expect(state.words).toEqual(['B3 is an override', 'B4 divides by zero', 'B2 is missing'])
    expect(state.first).toEqual({ sheet: 'frame', row: 2, column: 1 })
  })

  it('a sheet with titles alone has no state yet', () => {
    const sheet = sheetOf([header])
    expect(stepState({ ...workbookOf(sheet), names: new Map() }, sheet, read(sheet)).filled).toBe(false)
  })
})
