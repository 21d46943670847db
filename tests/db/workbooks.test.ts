import { randomUUID } from 'node:crypto'
import { beforeAll, describe, expect, test } from 'vitest'
import {
  createWorkbook,
  listWorkbooks,
  openWorkbook,
  operationsAfter,
  removeWorkbook,
  renameWorkbook,
  saveSnapshot,
  workbookForExport,
} from '@/db/access/workbooks'
import { toJson } from '@/lib/workbook'
import { asAdmin, expectOk, makeFirm, type TestFirm } from '../_support/database'
import { addRows, appendNow, makeWorkbook, setCell, stateOf } from '../_support/workbooks'

let firm: TestFirm
let other: TestFirm
beforeAll(async () => {
  firm = await makeFirm('First Firm')
  other = await makeFirm('Second Firm')
})

const making = { now: () => new Date(), newId: randomUUID }

describe('workbooks', () => {
  test('a new one is a draft from the template, with a first snapshot and no log', async () => {
    const id = await makeWorkbook(firm.actors.estimator, 'New house')
    const opened = expectOk(await openWorkbook(firm.actors.estimator, id))
    expect(opened).toMatchObject({
      id,
      title: 'New house',
      state: 'draft',
      seq: 0,
      tail: [],
      snapshot: { seq: 0 },
    })
    expect(opened.snapshot.values).toBeUndefined()
    expect(opened.snapshot.workbook.names.map((named) => named.name)).toContain('frame_width')
  })

  test.each([
    ['viewer', { change: false, changeLocked: false }],
    ['estimator', { change: true, changeLocked: false }],
    ['manager', { change: true, changeLocked: true }],
    ['owner', { change: true, changeLocked: true }],
  ] as const)('%s may', async (role, may) => {
    const id = await makeWorkbook(firm.actors.owner)
    const opened = expectOk(await openWorkbook(firm.actors[role], id))
    expect(opened.may).toEqual(may)
    expect(opened.actor).toEqual({ id: firm.actors[role].memberId, name: firm.actors[role].name, role })
  })

  test.each([
    ['no title', { title: '  ' }],
    ['a long title', { title: 'x'.repeat(121) }],
    ['an unknown frame', { frame: 'igloo' }],
    ['an unknown system', { system: 'cubits' }],
    ['an unknown input', { inputs: { fame_width: 3 } }],
    ['an unknown key', { firm_id: 'x' }],
  ])('is not made with %s', async (_what, change) => {
    const request = { title: 'A house', frame: 'gable', system: 'us', ...change }
    expect(await createWorkbook(firm.actors.estimator, request as never, making)).toMatchObject({
      failure: { code: 'invalid' },
    })
  })

  test('a viewer makes none', async () => {
    const request = { title: 'A house', frame: 'gable', system: 'us' as const }
    expect(await createWorkbook(firm.actors.viewer, request, making)).toMatchObject({
      failure: { code: 'forbidden' },
    })
  })

  test('are listed by last change, found by title whatever its case, and wildcards are plain signs', async () => {
    const fresh = await makeFirm()
    const a = await makeWorkbook(fresh.actors.estimator, 'Alder 100% lean-to')
    const b = await makeWorkbook(fresh.actors.manager, 'Birch hoop')
    const c = await makeWorkbook(fresh.actors.owner, 'Cedar_hoop')
    await appendNow(fresh.actors.estimator, a, [addRows(1)])
    const list = async (search?: string) =>
      expectOk(await listWorkbooks(fresh.actors.viewer, { search })).map((one) => one.id)
    expect(await list()).toEqual([a, c, b])
    expect(await list('HOOP')).toEqual([c, b])
    expect(await list('100%')).toEqual([a])
    expect(await list('r_h')).toEqual([c])
    expect(await list('\\')).toEqual([])
    expect(expectOk(await listWorkbooks(other.actors.owner)).map((one) => one.id)).not.toContain(a)
  })

  test.each([
    ['viewer', 'rename', 'forbidden'],
    ['viewer', 'remove', 'forbidden'],
    ['estimator', 'rename', 'done'],
    ['estimator', 'remove', 'forbidden'],
    ['manager', 'remove', 'done'],
    ['owner', 'remove', 'done'],
  ] as const)('%s on a manager’s workbook: %s %s', async (role, what, expected) => {
    const id = await makeWorkbook(firm.actors.manager)
    const answer = await (what === 'rename'
      ? renameWorkbook(firm.actors[role], id, ' Another title ')
      : removeWorkbook(firm.actors[role], id))
    expect(answer.ok ? 'done' : answer.failure.code).toBe(expected)
    const opened = await openWorkbook(firm.actors.viewer, id)
    if (what === 'remove') expect(opened.ok).toBe(expected !== 'done')
    else expect(expectOk(opened).title).toBe(expected === 'done' ? 'Another title' : 'A house')
  })

  test('a removed one is hidden, and its log is kept', async () => {
    const id = await makeWorkbook(firm.actors.estimator)
    await appendNow(firm.actors.estimator, id, [addRows(1)])
    expectOk(await removeWorkbook(firm.actors.estimator, id))
    expect(expectOk(await listWorkbooks(firm.actors.owner)).map((one) => one.id)).not.toContain(id)
    expect(await asAdmin('select seq from operation where workbook_id = $1', [id])).toEqual([{ seq: 1 }])
  })

  test("another firm's id is answered like an absent one, everywhere", async () => {
    const theirs = await makeWorkbook(other.actors.owner)
    const { owner } = firm.actors
    const calls = [
      (id: string) => openWorkbook(owner, id),
      (id: string) => operationsAfter(owner, id, 0),
      (id: string) => renameWorkbook(owner, id, 'Mine'),
      (id: string) => removeWorkbook(owner, id),
      (id: string) => workbookForExport(owner, id),
      (id: string) => saveSnapshot(owner, id, { seq: 0, values: {} }),
    ]
    for (const call of calls) {
      const answer = await call(theirs)
      expect(answer).toEqual(await call(randomUUID()))
      expect(answer).toEqual(await call("' or true --"))
    }
    expect(await openWorkbook(owner, theirs)).toMatchObject({ failure: { code: 'not-found' } })
    expect(expectOk(await openWorkbook(other.actors.owner, theirs)).title).toBe('A house')
    expect(await asAdmin('select "values" from snapshot where workbook_id = $1', [theirs])).toEqual([
      { values: null },
    ])
  })
})

describe('snapshots', () => {
  const snapshots = (id: string) =>
    asAdmin<{ seq: number; valued: boolean }>(
      'select seq, "values" is not null as valued from snapshot where workbook_id = $1 order by seq',
      [id],
    )

  test('are written each time the log passes a multiple of 50, and old ones go but for the first', async () => {
    const id = await makeWorkbook(firm.actors.estimator)
    const batch = (from: number, count: number) => Array.from({ length: count }, (_, i) => setCell(from + i))
    let seq = await appendNow(firm.actors.estimator, id, [addRows(), ...batch(0, 48)])
    expect(await snapshots(id)).toEqual([{ seq: 0, valued: false }])
    seq = await appendNow(firm.actors.estimator, id, batch(100, 5))
    expect((await snapshots(id)).map((row) => row.seq)).toEqual([0, 54])
    for (let round = 0; round < 4; round++) seq = await appendNow(firm.actors.estimator, id, batch(seq, 60))
    expect((await snapshots(id)).map((row) => row.seq)).toEqual([0, 234, 294])
    const opened = expectOk(await openWorkbook(firm.actors.viewer, id))
    expect([opened.snapshot.seq, opened.seq, opened.tail.length]).toEqual([294, 294, 0])
  })

  test('any state rebuilt from the first snapshot and the whole log equals the newest', async () => {
    const id = await makeWorkbook(firm.actors.estimator)
    await appendNow(firm.actors.estimator, id, [
      addRows(),
      ...Array.from({ length: 70 }, (_, i) => setCell(i, 20 + (i % 9))),
    ])
    const opened = expectOk(await openWorkbook(firm.actors.viewer, id))
    const [first] = await asAdmin<{ body: string }>(
      'select body from snapshot where workbook_id = $1 and seq = 0',
      [id],
    )
    const tail = expectOk(await operationsAfter(firm.actors.viewer, id, 0))
    const rebuilt = stateOf({
      ...opened,
      snapshot: { seq: 0, workbook: JSON.parse(first?.body ?? '') },
      tail,
    })
    expect(rebuilt).toEqual(stateOf(opened))
    expect(rebuilt).toEqual(toJson(expectOk(await workbookForExport(firm.actors.viewer, id)).workbook))
  })

  test('values are kept beside their state, and the opening prefers a snapshot that has them', async () => {
    const id = await makeWorkbook(firm.actors.estimator)
    const values = { job: [[1, 'two', true, null, { error: '#DIV/0!', text: 'divided by zero' }]] }
    expect(
      expectOk(
        await saveSnapshot(firm.actors.viewer, id, { seq: 0, values, tally: { quotation_total: 12.5 } }),
      ),
    ).toEqual({ saved: true })
    await appendNow(firm.actors.estimator, id, [
      addRows(),
      ...Array.from({ length: 59 }, (_, i) => setCell(i)),
    ])
    expect(await snapshots(id)).toEqual([
      { seq: 0, valued: true },
      { seq: 60, valued: false },
    ])
    const opened = expectOk(await openWorkbook(firm.actors.viewer, id))
    expect([opened.snapshot.seq, opened.tail.length, opened.snapshot.values]).toEqual([0, 60, values])
    expect(expectOk(await saveSnapshot(firm.actors.viewer, id, { seq: 60, values }))).toEqual({ saved: true })
    expect(expectOk(await openWorkbook(firm.actors.viewer, id)).snapshot).toMatchObject({ seq: 60, values })
    const listed = expectOk(await listWorkbooks(firm.actors.viewer)).find((one) => one.id === id)
    expect(listed?.tally).toEqual({ quotation_total: 12.5 })
  })

  test('at the newest state a snapshot is made for values; at a state not at hand it is not', async () => {
    const id = await makeWorkbook(firm.actors.estimator)
    await appendNow(firm.actors.estimator, id, [addRows(), setCell(1)])
    const save = async (seq: number) =>
      expectOk(await saveSnapshot(firm.actors.owner, id, { seq, values: {} })).saved
    expect(await save(1)).toBe(false)
    expect(await save(99)).toBe(false)
    expect(await save(2)).toBe(true)
    expect(await snapshots(id)).toEqual([
      { seq: 0, valued: false },
      { seq: 2, valued: true },
    ])
    expect(expectOk(await openWorkbook(firm.actors.viewer, id)).snapshot.seq).toBe(2)
  })
})
