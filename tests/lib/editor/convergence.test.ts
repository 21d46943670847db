import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { LocalWorkbook } from '@/app/(office)/workbooks/[workbookId]/_editor/local-workbook'
import { Sync } from '@/app/(office)/workbooks/[workbookId]/_editor/sync'
import { fromJson, type Operation, toJson, type Workbook } from '@/lib/workbook'
import { LogServer } from './log-server'

const json = {
  version: 1,
  system: 'us',
  names: [],
  sheets: [
    {
      id: 'frame',
      name: 'Frame',
      kind: 'step',
      rowCount: 8,
      columns: [{}, {}, {}],
      cells: [
        [0, 0, { input: 'Part' }],
        [1, 0, { input: 'Ridge' }],
        [1, 1, { input: 12 }],
        [2, 1, { input: '=B2*2' }],
        [6, 2, { input: '=SUM(B2:B6)' }],
      ],
    },
  ],
} as const

let made = 0
const newId = () => {
  made += 1
  return `id-${made}`
}

function client(server: LogServer) {
  const heard: string[] = []
  const local = new LocalWorkbook(fromJson(json), 0, newId, () => undefined)
  const sync = new Sync(local, server, undefined, {
    changed: () => undefined,
    refused: (label, text) => heard.push(`refused ${label}: ${text}`),
    lost: (operations) => heard.push(`lost ${operations.map(({ label }) => label).join()}`),
  })
  return { local, sync, heard }
}

const state = (workbook: Workbook) => JSON.stringify(toJson(workbook))
const set = (row: number, column: number, input: string | number): Operation => ({
  kind: 'set-cells',
  sheet: 'frame',
  cells: [{ row, column, input }],
})
const insert = (at: number, count = 1): Operation => ({
  kind: 'insert-lines',
  sheet: 'frame',
  axis: 'row',
  at,
  count,
})

type Client = ReturnType<typeof client>
function act({ local, sync }: Client, label: string, operations: readonly Operation[]) {
  const done = local.dispatch(label, operations)
  if (done.ok) sync.add(done.value)
  return done
}

/** Everybody sends and fetches until nobody has anything left. */
async function settle(...clients: Client[]) {
  for (let round = 0; round < 3; round += 1) {
    for (const { sync } of clients) {
      sync.wake()
      await sync.settle()
      await sync.catchUp()
    }
  }
}

describe('two people on one workbook', () => {
  it('what one typed follows the rows that the other inserted', async () => {
    const workbook = fromJson(json)
    const server = new LogServer(workbook)
    const [a, b] = [client(server), client(server)]
    act(a, 'insert', [insert(1, 2)])
    await a.sync.settle()
    act(b, 'type', [set(4, 0, 'Purlin'), set(4, 1, '=B2')])
    await settle(b, a)
    expect(state(a.local.workbook)).toBe(state(workbook))
    expect(state(b.local.workbook)).toBe(state(workbook))
    expect(workbook.sheets[0]?.rows[6]?.[0]?.input).toBe('Purlin')
    expect(workbook.sheets[0]?.rows[6]?.[1]?.input).toBe('=B4')
  })

  it('undo takes back only one’s own, where it has moved to', async () => {
    const server = new LogServer(fromJson(json))
    const [a, b] = [client(server), client(server)]
    act(b, 'mine', [set(1, 1, 24)])
    act(b, 'also mine', [set(3, 0, 'Sill')])
    await b.sync.settle()
    act(a, 'theirs', [insert(1)])
    act(a, 'theirs', [set(4, 0, 'Sill plate')])
    await settle(a, b)
    expect(b.local.undo()).toMatchObject({ ok: false })
    const undone = b.local.undo()
    expect(undone).toMatchObject({ ok: true, value: { label: 'mine' } })
    if (undone.ok) b.sync.add(undone.value.made)
    await settle(b, a)
    const rows = a.local.workbook.sheets[0]?.rows
    expect(rows?.[2]?.[1]?.input).toBe(12)
    expect(rows?.[4]?.[0]?.input).toBe('Sill plate')
  })

  it('an answer that got lost is asked for again, and nothing is done twice', async () => {
    const workbook = fromJson(json)
    const server = new LogServer(workbook)
    const a = client(server)
    server.faults = ['lost']
    act(a, 'insert', [insert(2)])
    await a.sync.settle()
    expect(a.sync.status()).toEqual({ kind: 'offline', pending: 1 })
    act(a, 'more', [set(1, 1, 30)])
    a.sync.wake()
    await settle(a)
    expect(server.log).toHaveLength(2)
    expect(a.sync.status()).toEqual({ kind: 'saved' })
    expect(state(a.local.workbook)).toBe(state(workbook))
  })

  it('signed out: it says so, keeps everything, and sends it after signing in again', async () => {
    const server = new LogServer(fromJson(json))
    const a = client(server)
    server.faults = ['signed-out']
    act(a, 'type', [set(1, 1, 30)])
    await a.sync.settle()
    expect(a.sync.status()).toMatchObject({ kind: 'cannot-save', pending: 1, text: /sign in again/ })
    a.sync.wake()
    await a.sync.settle()
    expect(a.sync.status()).toEqual({ kind: 'saved' })
    expect(server.log).toHaveLength(1)
  })

  it('one refused action is taken back with its reason, the others go on', async () => {
    const workbook = fromJson(json)
    const server = new LogServer(workbook)
    server.refuse = ({ op }) => (op.kind === 'insert-lines' ? 'Frame is locked.' : undefined)
    const a = client(server)
    act(a, 'first', [set(1, 1, 30)])
    act(a, 'rows', [insert(1)])
    act(a, 'second', [set(3, 0, 'Sill')])
    await a.sync.settle()
    a.sync.wake()
    await settle(a)
    expect(a.heard).toEqual(['refused rows: Frame is locked.'])
    expect(server.log).toHaveLength(2)
    expect(workbook.sheets[0]?.rows[2]?.[0]?.input).toBe('Sill')
    expect(state(a.local.workbook)).toBe(state(workbook))
    expect(a.local.undo()).toMatchObject({ ok: true, value: { label: 'second' } })
    expect(a.local.undo()).toMatchObject({ ok: true, value: { label: 'first' } })
  })
})

const operation: fc.Arbitrary<Operation> = fc.oneof(
  fc
    .tuple(fc.nat(7), fc.nat(2), fc.oneof(fc.integer(), fc.constantFrom('=B2+1', 'text', '=SUM(B2:B4)')))
    .map(([row, column, input]) => set(row, column, input)),
  fc
    .tuple(fc.integer({ min: 1, max: 6 }), fc.integer({ min: 1, max: 2 }))
    .map(([at, count]) => insert(at, count)),
  fc
    .integer({ min: 1, max: 6 })
    .map((at): Operation => ({ kind: 'remove-lines', sheet: 'frame', axis: 'row', at, count: 1 })),
  fc
    .tuple(fc.integer({ min: 1, max: 5 }), fc.integer({ min: 1, max: 7 }))
    .map(([at, to]): Operation => ({ kind: 'move-lines', sheet: 'frame', axis: 'row', at, count: 1, to })),
)
const step = fc.oneof(
  {
    weight: 6,
    arbitrary: fc.record({ who: fc.nat(2), act: fc.array(operation, { minLength: 1, maxLength: 3 }) }),
  },
  { weight: 2, arbitrary: fc.record({ who: fc.nat(2), undo: fc.boolean() }) },
  { weight: 3, arbitrary: fc.record({ who: fc.nat(2), send: fc.constant(true) }) },
)

describe('any party of three', () => {
  it('ends with one workbook, whatever was typed, undone and sent in between', async () => {
    await fc.assert(
      fc.asyncProperty(fc.array(step, { maxLength: 24 }), async (steps) => {
        const workbook = fromJson(json)
        const server = new LogServer(workbook)
        const clients = [client(server), client(server), client(server)]
        // Nobody is connected until they send.
        for (const { sync } of clients) sync.send = async () => undefined
        for (const { who, ...what } of steps) {
          const one = clients[who]
          if (!one) continue
          if ('act' in what && what.act) act(one, 'edit', what.act)
          else if ('undo' in what) {
            const back = what.undo ? one.local.undo() : one.local.redo()
            if (back.ok) one.sync.add(back.value.made)
          } else await Sync.prototype.send.call(one.sync)
        }
        for (const { sync } of clients) sync.send = Sync.prototype.send
        await settle(...clients)
        for (const { local } of clients) {
          expect(local.pending).toEqual([])
          expect(state(local.workbook)).toBe(state(workbook))
        }
      }),
      { numRuns: 80 },
    )
  }, 60_000)
})
