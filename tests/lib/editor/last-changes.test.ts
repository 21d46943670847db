import { describe, expect, it } from 'vitest'
import { LastChanges } from '@/app/(office)/workbooks/[workbookId]/_editor/last-changes'
import type { LoggedOperation, Operation } from '@/lib/workbook'

const set = (row: number): Operation => ({
  kind: 'set-cells',
  sheet: 'heat',
  cells: [{ row, column: 1, input: row }],
})
const insert: Operation = { kind: 'insert-lines', sheet: 'heat', axis: 'row', at: 1, count: 2 }
const at = (row: number) => ({ sheet: 'heat', row, column: 1 })
const me = { author: 'me', at: '2026-03-01T10:00:00.000Z' }

function logged(op: Operation, author: string): LoggedOperation {
  return { id: author, batch: author, op, seq: 1, author, at: '2026-03-01T11:00:00.000Z' }
}

describe('who changed a cell last', () => {
  it('is known of the cells that were written, and goes with them when lines move', () => {
    const changes = new LastChanges()
    changes.follow([set(4)], me)
    expect([changes.of(at(4)), changes.of(at(5))]).toEqual([me, undefined])
    changes.follow([insert])
    expect([changes.of(at(4)), changes.of(at(6))]).toEqual([undefined, me])
  })

  it('is the later one, each operation of the log by its own author', () => {
    const changes = new LastChanges()
    changes.follow([set(1), set(2)], me)
    const log = [logged(set(2), 'ann'), logged(insert, 'bo'), logged(set(1), 'cy')]
    changes.followLogged(
      log.map(({ op }) => op),
      log,
    )
    expect([1, 3, 4].map((row) => changes.of(at(row))?.author)).toEqual(['cy', 'me', 'ann'])
  })

  it('is the last author where the log reads as fewer operations here', () => {
    const changes = new LastChanges()
    changes.followLogged([set(1)], [logged(set(1), 'ann'), logged(set(2), 'bo')])
    expect(changes.of(at(1))?.author).toBe('bo')
  })
})
