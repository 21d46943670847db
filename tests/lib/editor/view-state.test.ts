import { describe, expect, it } from 'vitest'
import { EditorView } from '@/app/(office)/workbooks/[workbookId]/_editor/view-state'
import { single } from '@/app/(office)/workbooks/[workbookId]/_grid/selection'
import { fromJson, type Operation } from '@/lib/workbook'

const workbook = () =>
  fromJson({
    version: 1,
    system: 'us',
    names: [],
    sheets: [{ id: 'frame', name: 'Frame', kind: 'step', rowCount: 8, columns: [{}, {}], cells: [] }],
  })
const rows = (kind: 'insert-lines' | 'remove-lines', at: number, count: number): Operation => ({
  kind,
  sheet: 'frame',
  axis: 'row',
  at,
  count,
})

function writing(row: number) {
  const book = workbook()
  const view = new EditorView(book)
  view.select(single(row, 1))
  view.edit({ sheet: 'frame', row, column: 1, text: '24 ft', mode: 'replace', where: 'cell' })
  return { view, sheets: book.sheets }
}

describe('an edit under way while somebody else changes the rows', () => {
  it('follows its cell', () => {
    const { view, sheets } = writing(4)
    expect(view.follow([rows('insert-lines', 2, 3), rows('remove-lines', 1, 1)], sheets)).toBeUndefined()
    expect(view.snapshot().edit).toMatchObject({ row: 6, column: 1, text: '24 ft' })
    expect(view.snapshot().selection.active).toMatchObject({ row: 6, column: 1 })
  })

  it('stays where it is when the rows below change', () => {
    const { view, sheets } = writing(4)
    view.follow([rows('insert-lines', 5, 3)], sheets)
    expect(view.snapshot().edit).toMatchObject({ row: 4 })
  })

  it('gives its text back when the row is removed', () => {
    const { view, sheets } = writing(4)
    expect(view.follow([rows('remove-lines', 3, 2)], sheets)).toBe('24 ft')
    expect(view.snapshot().edit).toBeUndefined()
  })
})
