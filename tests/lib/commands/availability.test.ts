import { describe, expect, it } from 'vitest'
import { type CommandContext, commandById, commands } from '@/lib/commands'
import { contextOf, house, listContext } from './house'

const at = (sheet: string, row: number, column = 0, rowCount = 1, columnCount = 1) => ({
  selection: { sheet, row, column, rowCount, columnCount },
})
const looking: Partial<CommandContext> = { may: { change: false, changeLocked: false } }
const manager: Partial<CommandContext> = { may: { change: true, changeLocked: true } }

const look = 'You may look but not change this workbook'
const pinned = 'Coverings is pinned from the price tables; a manager keeps it'
const titles = 'Row 1 holds the column titles; select a row below it'

const table: readonly (readonly [
  id: string,
  where: string,
  change: Partial<CommandContext>,
  answer: true | string,
])[] = [
  ['set-input', 'open sheet', {}, true],
  ['set-input', 'as a viewer', looking, look],
  ['cover', 'open sheet', {}, true],
  ['cover', 'as a viewer', looking, look],
  ['undo', 'with something to undo', {}, true],
  ['undo', 'with nothing to undo', { undoLabel: undefined }, 'There is nothing of yours to undo'],
  ['undo', 'as a viewer', looking, look],
  ['redo', 'with nothing to redo', {}, 'There is nothing to redo'],
  ['redo', 'after an undo', { redoLabel: 'Set frame width' }, true],
  ['edit-cell', 'on a locked table', at('coverings', 2), pinned],
  ['edit-cell', 'on a locked table as a manager', { ...at('coverings', 2), ...manager }, true],
  ['edit-cell', 'as a viewer on a locked table', { ...at('coverings', 2), ...looking }, look],
  ['edit-note', 'on a locked table', at('coverings', 2), pinned],
  ['copy', 'on a locked table', at('coverings', 2), true],
  ['copy', 'as a viewer', looking, true],
  ['cut', 'on a locked table', at('coverings', 2), pinned],
  ['paste', 'on a locked table', at('coverings', 2), pinned],
  ['clear-cells', 'on a locked table', at('coverings', 2), pinned],
  ['insert-rows-above', 'on the titles', at('frame', 0), titles],
  ['insert-rows-below', 'on the titles', at('frame', 0), true],
  ['insert-rows-above', 'on a locked table', at('coverings', 2), pinned],
  ['remove-rows', 'on the titles', at('frame', 0), titles],
  ['remove-rows', 'on a row', at('frame', 3), true],
  ['remove-columns', 'on all columns', at('frame', 1, 0, 1, 6), 'A sheet keeps at least one column'],
  ['move-rows-up', 'on the first row', at('frame', 1), 'This is the first row below the titles'],
  ['move-rows-up', 'on the second row', at('frame', 2), true],
  ['move-rows-down', 'on the last row', at('frame', 39), 'This is the last row'],
  ['rename-sheet', 'on a locked table', at('coverings', 2), pinned],
  ['remove-sheet', 'with several sheets', {}, true],
  ['name-cells', 'as a viewer', looking, look],
  ['next-sheet', 'on the last sheet', at('stock', 1), 'This is the last sheet'],
  ['previous-sheet', 'on the first sheet', at('site', 1), 'This is the first sheet'],
  ['open-workbook', 'with no other', { workbooks: [] }, 'There is no other workbook yet'],
  ['new-workbook', 'as a viewer', looking, 'You may look but not make workbooks'],
  ['export-xlsx', 'as a viewer', looking, true],
  ['go-to-cell', 'as a viewer', looking, true],
]

describe('a command may run', () => {
  it.each(table)('%s %s', (id, _where, change, answer) => {
    expect(commandById(id)?.when(contextOf(house(), change))).toBe(answer)
  })

  it('a lock says its reason on a step', () => {
    const workbook = house()
    const sheets = workbook.sheets.map((sheet) =>
      sheet.id === 'price' ? { ...sheet, lock: 'approved' } : sheet,
    )
    const context = contextOf({ ...workbook, sheets }, at('price', 1))
    expect(commandById('edit-cell')?.when(context)).toBe('Price is locked: approved')
  })

  it('without a workbook only where none is needed', () => {
    for (const command of commands) {
      const answer = command.when(listContext())
      if (command.anywhere) expect(answer, command.id).toBe(true)
      else expect(answer, command.id).toBe('Open a workbook first')
    }
  })

  it('never by a bare false', () => {
    for (const command of commands) {
      for (const [, , change] of table) {
        const answer = command.when(contextOf(house(), change))
        if (answer !== true) expect(answer.length, command.id).toBeGreaterThan(10)
      }
    }
  })
})
