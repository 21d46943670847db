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
    expect(state.words).toEqual(['B4 divides by zero', 'B2 is missing: frame width', 'B3 is an override: R'])
    expect(state.first).toEqual({ sheet: 'frame', row: 3, column: 1 })
  })

  it('does not miss a text or a date that says nothing, but a choice that was not made', () => {
    const sheet = sheetOf([header, [{ input: 'Client' }, { ground: 'input' }]])
    const named = (quantity: 'text' | 'date'): Workbook => ({
      ...workbookOf(sheet),
      names: new Map([['client', { ...width, name: 'client', quantity }]]),
    })
    for (const quantity of ['text', 'date'] as const)
      expect(stepState(named(quantity), sheet, read(sheet)).toLookAt).toBe(0)
    const chosen = sheetOf([header, [{ input: 'Use' }, { ground: 'input', format: { choices: ['a', 'b'] } }]])
    expect(stepState(named('text'), chosen, read(chosen)).toLookAt).toBe(1)
  })

  it('counts checks that do not hold, by what the declarations say of them, and no notes', () => {
    const sheet = sheetOf([
      header,
      [{ input: 'Light' }, { input: '=x' }],
      [{ input: 'Bend' }, { input: '=y' }],
    ])
    const check = (name: string, row: number): [string, NamedValue] => [
      name,
      { ...width, name, quantity: 'text', role: 'result', area: { ...width.area, row } },
    ]
    const workbook: Workbook = { ...workbookOf(sheet), names: new Map([check('light', 1), check('bend', 2)]) }
    const say = (light: string, bend: string) => read(sheet, { '1 1': light, '2 1': bend })
    const book = (severity: string) => ({
      inOrder: 'in order',
      checks: new Map([
        ['light', { about: 'light', severity: 'warning' }],
        ['bend', { about: 'light', severity }],
      ]),
    })
    expect(stepState(workbook, sheet, say('in order', 'in order'), book('error')).toLookAt).toBe(0)
    const both = stepState(workbook, sheet, say('too dark', 'too tight'), book('error'))
    expect(both.words).toEqual(['B3 too tight', 'B2 too dark'])
    expect(stepState(workbook, sheet, say('in order', 'too tight'), book('note')).toLookAt).toBe(0)
  })

  it('a sheet with titles alone has no state yet', () => {
    const sheet = sheetOf([header])
    expect(stepState({ ...workbookOf(sheet), names: new Map() }, sheet, read(sheet)).filled).toBe(false)
  })
})
