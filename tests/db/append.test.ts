import { randomUUID } from 'node:crypto'
import { beforeAll, describe, expect, test } from 'vitest'
import {
  appendOperations,
  openWorkbook,
  operationsAfter,
  removeWorkbook,
  workbookForExport,
} from '@/db/access/workbooks'
import { database } from '@/db/connection'
import { appendOperations as appendRows } from '@/db/repositories/operations'
import { type AppendAccepted, type Operation, toJson } from '@/lib/workbook'
import { asAdmin, expectOk, makeFirm, type TestFirm } from '../_support/database'
import { addRows, appendNow, makeWorkbook, sent, setCell, stateOf } from '../_support/workbooks'

let firm: TestFirm
beforeAll(async () => {
  firm = await makeFirm()
})

/** A workbook with room at the top of its Job sheet; its log is at 1. */
async function prepared(): Promise<string> {
  const id = await makeWorkbook(firm.actors.estimator)
  expect(await appendNow(firm.actors.estimator, id, [addRows()])).toBe(1)
  return id
}

const append = (id: string, base: number, operations: ReturnType<typeof sent>[]) =>
  appendOperations(firm.actors.estimator, id, { base, operations })

async function accepted(answer: ReturnType<typeof append>): Promise<AppendAccepted> {
  const value = expectOk(await answer)
  if (!('accepted' in value)) throw new Error('behind')
  return value
}

async function log(id: string) {
  return expectOk(await operationsAfter(firm.actors.owner, id, 0))
}

describe('appending', () => {
  test('numbers the operations and keeps them with author, batch and time', async () => {
    const id = await prepared()
    const batch = randomUUID()
    const operations = [sent(setCell(1), batch), sent(setCell(2), batch)]
    const before = Date.now() - 1000
    const answer = await accepted(append(id, 1, operations))
    expect(answer).toEqual({ seq: 3, accepted: operations.map((one, i) => ({ id: one.id, seq: i + 2 })) })
    const logged = (await log(id)).slice(1)
    expect(logged).toMatchObject(
      operations.map((one, i) => ({ ...one, seq: i + 2, author: firm.actors.estimator.memberId })),
    )
    for (const { at } of logged) expect(Date.parse(at)).toBeGreaterThan(before)
  })

  test('sent again, whole, in part, in another order, on an old base: accepted as it stands, nothing is added', async () => {
    const id = await prepared()
    const operations = [sent(setCell(1)), sent(setCell(2)), sent(setCell(3))]
    const first = await accepted(append(id, 1, operations))
    await append(id, 4, [sent(setCell(4))])
    for (const [base, again] of [
      [1, operations],
      [5, operations],
      [0, operations.toReversed()],
      [3, operations.slice(1)],
    ] as const) {
      const answer = await accepted(append(id, base, [...again]))
      expect(answer.seq).toBe(5)
      const seqs = new Map(answer.accepted.map((one) => [one.id, one.seq]))
      expect(again.map((one) => seqs.get(one.id))).toEqual(
        again.map((one) => first.accepted.find((a) => a.id === one.id)?.seq),
      )
    }
    expect((await log(id)).length).toBe(5)
  })

  test('sent again when it would no longer apply: accepted still', async () => {
    const id = await prepared()
    const add: Operation = {
      kind: 'add-sheet',
      sheet: 'notes',
      name: 'Notes',
      at: 0,
      sheetKind: 'step',
      rowCount: 5,
      columns: [{}],
    }
    const remove = [sent(add), sent({ kind: 'remove-sheet', sheet: 'notes' })]
    await accepted(append(id, 1, remove))
    const removal = remove.slice(1)
    expect((await accepted(append(id, 3, removal))).accepted).toEqual([{ id: removal[0]?.id, seq: 3 }])
    const withNew = [...removal, sent(setCell(5))]
    expect((await accepted(append(id, 3, withNew))).accepted.map((one) => one.seq)).toEqual([3, 4])
  })

  test('known and new ones together at the head: only the new are added', async () => {
    const id = await prepared()
    const known = sent(setCell(1))
    await accepted(append(id, 1, [known]))
    const fresh = sent(setCell(2))
    const answer = await accepted(append(id, 2, [known, fresh]))
    expect(answer.seq).toBe(3)
    expect(new Map(answer.accepted.map((one) => [one.id, one.seq]))).toEqual(
      new Map([
        [known.id, 2],
        [fresh.id, 3],
      ]),
    )
    expect((await log(id)).length).toBe(3)
  })

  test('on an old base: what came in between, and nothing is added', async () => {
    const id = await prepared()
    const theirs = [sent(setCell(1)), sent(setCell(2))]
    await accepted(append(id, 1, theirs))
    const answer = expectOk(await append(id, 1, [sent(setCell(9))]))
    expect(answer).toMatchObject({
      code: 'behind',
      seq: 3,
      missing: theirs.map((one, i) => ({ ...one, seq: i + 2 })),
    })
    expect((await log(id)).length).toBe(3)
  })

  test('on a base beyond the log: refused', async () => {
    const id = await prepared()
    expect(await append(id, 7, [sent(setCell(9))])).toMatchObject({ failure: { code: 'invalid' } })
  })

  test('refused whole when one does not apply, and the next append meets the right state', async () => {
    const id = await prepared()
    const bad = sent({ kind: 'remove-sheet', sheet: 'nothing-here' })
    const answer = await append(id, 1, [sent(setCell('must not stay')), bad])
    expect(answer.ok).toBe(false)
    expect((await log(id)).length).toBe(1)
    await accepted(append(id, 1, [sent(setCell('stays', 41))]))
    const { workbook } = expectOk(await workbookForExport(firm.actors.viewer, id))
    expect(JSON.stringify(toJson(workbook))).not.toContain('must not stay')
    expect(toJson(workbook)).toEqual(stateOf(expectOk(await openWorkbook(firm.actors.viewer, id))))
  })

  test.each([
    ['no operations', { base: 0, operations: [] }],
    ['an unknown kind', { base: 0, operations: [{ ...sent(setCell(1)), op: { kind: 'drop-table' } }] }],
    ['an unknown key', { base: 0, operations: [{ ...sent(setCell(1)), author: 'me' }] }],
    ['an id that is none', { base: 0, operations: [{ ...sent(setCell(1)), id: '1' }] }],
    ['a negative base', { base: -1, operations: [sent(setCell(1))] }],
    [
      'one id twice',
      (() => {
        const one = sent(setCell(1))
        return { base: 0, operations: [one, one] }
      })(),
    ],
    ['nothing', undefined],
  ])('%s: refused', async (_what, request) => {
    const id = await makeWorkbook(firm.actors.estimator)
    const answer = await appendOperations(firm.actors.estimator, id, request as never)
    expect(answer).toMatchObject({ failure: { code: 'invalid' } })
  })
})

describe('rights', () => {
  const onLocked = async (id: string) => {
    const { snapshot } = expectOk(await openWorkbook(firm.actors.owner, id))
    const sheet = snapshot.workbook.sheets.find((one) => one.lock !== undefined)
    if (!sheet) throw new Error('the template has no locked sheet')
    return sent({ kind: 'set-cells', sheet: sheet.id, cells: [{ row: 1, column: 1, input: 'changed' }] })
  }

  test.each([
    ['viewer', 'open', 'forbidden'],
    ['estimator', 'open', 'accepted'],
    ['manager', 'open', 'accepted'],
    ['owner', 'open', 'accepted'],
    ['viewer', 'locked', 'forbidden'],
    ['estimator', 'locked', 'forbidden'],
    ['manager', 'locked', 'accepted'],
    ['owner', 'locked', 'accepted'],
  ] as const)('%s on a sheet that is %s: %s', async (role, kind, expected) => {
    const id = await prepared()
    const operation = kind === 'locked' ? await onLocked(id) : sent(setCell(1))
    const answer = await appendOperations(firm.actors[role], id, { base: 1, operations: [operation] })
    expect(answer.ok ? 'accepted' : answer.failure.code).toBe(expected)
    expect((await log(id)).length).toBe(expected === 'accepted' ? 2 : 1)
  })

  test("another firm's workbook, a removed one and none at all: the same answer", async () => {
    const other = await makeFirm()
    const theirs = await makeWorkbook(other.actors.owner)
    const removed = await prepared()
    expectOk(await removeWorkbook(firm.actors.estimator, removed))
    const answers = await Promise.all(
      [theirs, removed, randomUUID(), 'not-an-id'].map((id) => append(id, 0, [sent(setCell(1))])),
    )
    expect(answers[0]).toMatchObject({ failure: { code: 'not-found' } })
    for (const answer of answers) expect(answer).toEqual(answers[0])
    // With another firm's id in the operation log's function itself.
    const [first] = await asAdmin<{ n: string }>(
      'select count(*) as n from operation where workbook_id = $1',
      [theirs],
    )
    expect(first?.n).toBe('0')
  })
})

describe('several writers', () => {
  /** Appends past this process's model, as another server would. */
  const elsewhere = (id: string, base: number, input: number) => {
    const { op, batch, id: operationId } = sent(setCell(input))
    return appendRows(database(), {
      firmId: firm.id,
      workbookId: id,
      authorId: firm.actors.manager.memberId,
      base,
      ids: [operationId],
      batches: [batch],
      bodies: [JSON.stringify(op)],
    })
  }

  test('what another server appended is caught up with, or told', async () => {
    const id = await prepared()
    expect(await elsewhere(id, 1, 7)).toMatchObject({ outcome: 'appended', head: 2 })
    expect(expectOk(await append(id, 1, [sent(setCell(8))]))).toMatchObject({ code: 'behind', seq: 2 })
    await accepted(append(id, 2, [sent(setCell(9, 41))]))
    await elsewhere(id, 3, 10)
    await accepted(append(id, 4, [sent(setCell(11, 42))]))
    const { workbook, seq } = expectOk(await workbookForExport(firm.actors.viewer, id))
    expect(seq).toBe(5)
    const job = workbook.sheets.find((sheet) => sheet.id === 'job')
    expect([40, 41, 42].map((row) => job?.rows[row]?.[1]?.input)).toEqual([10, 9, 11])
  })

  test('eight clients at once, each going on after `behind`: every acknowledged edit is in the log once, without gaps', async () => {
    const id = await prepared()
    const acknowledged: { id: string; seq: number }[] = []
    const client = async (n: number) => {
      let base = 1
      for (let edit = 0; edit < 10; edit++) {
        const operations = [sent(setCell(n * 100 + edit, 20 + n))]
        for (;;) {
          const answer = expectOk(await append(id, base, operations))
          base = answer.seq
          if (!('accepted' in answer)) continue
          acknowledged.push(...answer.accepted)
          break
        }
      }
    }
    await Promise.all(Array.from({ length: 8 }, (_, n) => client(n)))
    const logged = await log(id)
    expect(logged.map((one) => one.seq)).toEqual(Array.from({ length: 81 }, (_, i) => i + 1))
    const bySeq = new Map(logged.map((one) => [one.seq, one.id]))
    expect(acknowledged.length).toBe(80)
    for (const one of acknowledged) expect(bySeq.get(one.seq)).toBe(one.id)
  })
})
