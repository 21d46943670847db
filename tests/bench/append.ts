import { createHash } from 'node:crypto'
import pg from 'pg'
import type { Actor } from '@/db/access/actor'
import { appendOperations } from '@/db/access/append'
import { closeDatabase } from '@/db/connection'
import { withClient } from '@/db/server/sql.mjs'
import { type Operation, toJson } from '@/lib/workbook'
import { withCleanup } from './cleanup'
import { generateWorkbook } from './generated-workbook'
import type { Say } from './main'
import { pgbench } from './pgbench'
import type { Line } from './report'
import { median } from './statistics'
import { startThrowawayDatabase, type ThrowawayDatabase } from './throwaway-database'

const rounds = 5
const seconds = 2
const clientCounts = [1, 4] as const
const goals = { 1: 0.6, 4: 0.75 } as const

/** A small edit; pgbench inserts the text of it that the log holds. */
const edit: Operation = {
  kind: 'set-cells',
  sheet: 'bench-inputs',
  cells: [{ row: 2, column: 1, input: 31.5 }],
}
const body = JSON.stringify(edit)
const firm = uuid('firm')
const member = uuid('member')

/** One saved edit against the fastest that this PostgreSQL inserts one row, each its own durable transaction. */
export function run(say: Say): Promise<Line[]> {
  return withCleanup(async (later) => {
    const database = await startThrowawayDatabase('append')
    later(database.stop)
    later(closeDatabase)
    await prepare(database)
    const lines: Line[] = []
    for (const clients of clientCounts) {
      const rates: Record<'pgbench' | 'whole' | 'bare', number[]> = { pgbench: [], whole: [], bare: [] }
      for (let round = 0; round < rounds; round++) {
        rates.pgbench.push(await pgbench({ url: database.adminUrl, statement: insertRow, clients, seconds }))
        rates.whole.push(await throughAccess(database.appUrl, clients))
        rates.bare.push(await bareFunction(database.appUrl, clients))
      }
      say(`${clients} client${clients > 1 ? 's' : ''} done`)
      lines.push(
        line('appendOperations', clients, rates.whole, rates.pgbench, goals[clients]),
        line('its SQL function alone', clients, rates.bare, rates.pgbench, goals[clients]),
      )
    }
    return lines
  })
}

function line(
  what: string,
  clients: number,
  ours: readonly number[],
  theirs: readonly number[],
  least: number,
): Line {
  // Round by round, since the disk's speed drifts: each rate is set against the one measured beside it.
  const ratios = ours.map((rate, i) => rate / (theirs[i] as number))
  return {
    section: 'append',
    what: `${what} to pgbench insert, ${clients} client${clients > 1 ? 's' : ''}`,
    value: median(ratios),
    unit: 'ratio',
    goal: { least },
    raw: `${median(ours).toFixed(0)}/s, pgbench ${median(theirs).toFixed(0)}/s`,
  }
}

const insertRow = `insert into bench_row (workbook_id, batch, author_id, at, body)
  values ('${uuid('workbook')}', '${uuid('batch')}', '${member}', now(), '${body}')`

async function prepare({ adminUrl }: ThrowawayDatabase): Promise<void> {
  await withClient(adminUrl, async (client) => {
    await client.query(
      `create table bench_row (id bigint generated always as identity primary key, workbook_id uuid not null,
        batch uuid not null, author_id uuid not null, at timestamptz not null, body text not null)`,
    )
    await client.query('insert into firm (id, name) values ($1, $2)', [firm, 'Bench'])
    await client.query(
      `insert into member (firm_id, id, email, name, role, password_hash)
        values ($1, $2, 'bench@example.test', 'Bench', 'estimator', '-')`,
      [firm, member],
    )
    const snapshot = JSON.stringify(toJson(generateWorkbook(5_000).workbook))
    for (let i = 0; i < Math.max(...clientCounts); i++) {
      await client.query(
        `insert into workbook (firm_id, id, title, created_by, created_at, updated_at)
          values ($1, $2, 'Bench', $3, now(), now())`,
        [firm, uuid(`workbook ${i}`), member],
      )
      await client.query('insert into snapshot (firm_id, workbook_id, seq, body) values ($1, $2, 0, $3)', [
        firm,
        uuid(`workbook ${i}`),
        snapshot,
      ])
    }
  })
}

interface Client {
  readonly workbook: string
  head: number
  /** Appends one edit at `head`, gives the new head. */
  readonly append: (head: number) => Promise<number>
}

/** Appends a second; each client waits for its answer before it sends the next edit to its own workbook. */
async function rateOf(clients: readonly Client[]): Promise<number> {
  let count = 0
  const started = performance.now()
  const until = started + seconds * 1000
  await Promise.all(
    clients.map(async (client) => {
      while (performance.now() < until) {
        client.head = await client.append(client.head)
        count++
      }
    }),
  )
  return (1000 * count) / (performance.now() - started)
}

/** The SQL function, each client on a connection of its own. */
async function bareFunction(url: string, count: number): Promise<number> {
  const connections = Array.from({ length: count }, () => new pg.Client({ connectionString: url }))
  try {
    const clients = await Promise.all(
      connections.map(async (connection, i): Promise<Client> => {
        connection.on('error', () => {})
        await connection.connect()
        const workbook = uuid(`workbook ${i}`)
        const append = (head: number) => appendOne(connection, workbook, head)
        return { workbook, head: await headOf(connection, workbook), append }
      }),
    )
    return await rateOf(clients)
  } finally {
    await Promise.all(connections.map((connection) => connection.end()))
  }
}

/** All that the server does between the parsed request and its answer: rights, checks, the model, the log, snapshots. */
async function throughAccess(url: string, count: number): Promise<number> {
  process.env.APP_DATABASE_URL = url
  const actor: Actor = {
    memberId: member,
    firmId: firm,
    firmName: 'Bench',
    name: 'Bench',
    email: 'bench@example.test',
    role: 'estimator',
    sessionId: uuid('session'),
  }
  const clients = await withClient(url, (connection) =>
    inOrder(count, async (i): Promise<Client> => {
      const workbook = uuid(`workbook ${i}`)
      const append = async (base: number) => {
        const sent = { id: crypto.randomUUID(), batch: crypto.randomUUID(), op: edit }
        const answer = await appendOperations(actor, workbook, { base, operations: [sent] })
        if (!answer.ok) throw new Error(`an append failed: ${answer.failure.text}`)
        if (!('accepted' in answer.value)) throw new Error('an append was behind')
        return answer.value.seq
      }
      // The first one loads the workbook into the server's memory; it is not counted.
      return { workbook, head: await append(await headOf(connection, workbook)), append }
    }),
  )
  return rateOf(clients)
}

async function inOrder<T>(count: number, work: (i: number) => Promise<T>): Promise<T[]> {
  const done: T[] = []
  for (let i = 0; i < count; i++) done.push(await work(i))
  return done
}

async function headOf(client: pg.Client, workbook: string): Promise<number> {
  await client.query("select set_config('app.firm', $1, false)", [firm])
  const found = await client.query<{ seq: number }>('select seq from workbook where id = $1', [workbook])
  return found.rows[0]?.seq ?? 0
}

async function appendOne(client: pg.Client, workbook: string, head: number): Promise<number> {
  const { rows } = await client.query<{ outcome: string; head: number }>({
    name: 'append',
    text: 'select outcome, head from append_operations($1, $2, $3, $4, $5, $6, $7)',
    values: [firm, workbook, member, head, [crypto.randomUUID()], [crypto.randomUUID()], [body]],
  })
  const row = rows[0]
  if (row?.outcome !== 'appended') throw new Error(`an append ended as ${row?.outcome}`)
  return row.head
}

/** The same name, the same UUID. */
function uuid(name: string): string {
  const hex = createHash('sha256').update(name).digest('hex')
  return `${hex.slice(0, 8)}-${hex.slice(8, 12)}-4${hex.slice(13, 16)}-8${hex.slice(17, 20)}-${hex.slice(20, 32)}`
}
