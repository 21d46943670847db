import { randomUUID } from 'node:crypto'
import { join } from 'node:path'
import { encode } from 'next-auth/jwt'
import { afterAll, beforeAll, describe, expect, test, vi } from 'vitest'
import { closeCalculator } from '@/app/_server/calculator/calculator'
import { stopKeeping } from '@/app/_server/calculator/keep-values'
import { sessionCookie } from '@/app/_server/session'
import type { Role } from '@/db/access/members'
import { createWorkbook, openWorkbook } from '@/db/access/workbooks'
import { expectOk, makeFirm, signInAs, type TestFirm } from '../_support/database'
import { handlersOf, routeFiles } from '../_support/endpoints'

/**
 * Every route handler against every role, nobody, and another firm's owner; a handler that is not in the table fails.
 * Server actions have the same table in tests/browser/server-actions.test.ts.
 */
type Asker = Role | 'nobody' | 'stranger'
type Handler = (request: Request, context: { params: Promise<Record<string, string>> }) => Promise<Response>

interface Row {
  readonly handler: string
  readonly query?: string
  readonly body?: (ids: { readonly sheet: string; readonly locked: string }) => unknown
  /** Whose workbook it is about. */
  readonly madeBy?: Role
  readonly what?: string
  readonly expected: Readonly<Record<Asker, number>>
}

const everybody = { owner: 200, manager: 200, estimator: 200, viewer: 200, nobody: 200, stranger: 200 }
const readers = { ...everybody, nobody: 401, stranger: 404 }
const writers = { ...readers, viewer: 403 }

const rows: readonly Row[] = [
  { handler: 'GET /api/health/live', expected: everybody },
  { handler: 'GET /api/health/ready', expected: everybody },
  { handler: 'DELETE /api/session', expected: { ...everybody, nobody: 401 } },
  { handler: 'GET /api/workbooks', expected: { ...everybody, nobody: 401 } },
  {
    handler: 'POST /api/workbooks',
    body: () => ({ title: 'A house', frame: 'gable', system: 'us' }),
    expected: { owner: 201, manager: 201, estimator: 201, viewer: 403, nobody: 401, stranger: 201 },
  },
  { handler: 'GET /api/workbooks/[id]', expected: readers },
  { handler: 'PATCH /api/workbooks/[id]', body: () => ({ title: 'Another title' }), expected: writers },
  {
    handler: 'DELETE /api/workbooks/[id]',
    what: 'somebody else’s',
    expected: { ...writers, estimator: 403 },
  },
  { handler: 'DELETE /api/workbooks/[id]', what: 'an estimator’s', madeBy: 'estimator', expected: writers },
  { handler: 'GET /api/workbooks/[id]/operations', query: '?after=0', expected: readers },
  {
    handler: 'POST /api/workbooks/[id]/operations',
    what: 'in an open sheet',
    body: ({ sheet }) => edit(sheet),
    expected: writers,
  },
  {
    handler: 'POST /api/workbooks/[id]/operations',
    what: 'in a locked table',
    body: ({ locked }) => edit(locked),
    expected: { ...writers, estimator: 403 },
  },
  { handler: 'GET /api/workbooks/[id]/xlsx', expected: readers },
]

const askers = Object.keys(everybody) as Asker[]
const handlers = new Map<string, Handler>()
let firm: TestFirm
let elsewhere: TestFirm

beforeAll(async () => {
  vi.spyOn(process.stdout, 'write').mockReturnValue(true)
  process.env.AUTH_SECRET = randomUUID() + randomUUID()
  firm = await makeFirm('Here')
  elsewhere = await makeFirm('Elsewhere')
  const app = join(process.cwd(), 'app')
  for (const { file, path } of routeFiles(app)) {
    const module = (await import(/* @vite-ignore */ join(app, file))) as Record<string, Handler>
    for (const name of handlersOf(path, Object.keys(module))) {
      const handler = module[name.split(' ')[0] ?? '']
      if (handler) handlers.set(name, handler)
    }
  }
})
afterAll(() => {
  stopKeeping()
  closeCalculator()
  vi.restoreAllMocks()
})

test('the table has every handler of the tree, and no other', () => {
  expect([...new Set(rows.map((row) => row.handler))].sort()).toEqual([...handlers.keys()].sort())
})

describe.each(rows)('$handler $what', (row) => {
  test.each(askers)('asked by %s', async (asker) => {
    const workbook = await makeWorkbook(row.madeBy ?? 'owner')
    // Signing out ends its session, so that it gets one of its own.
    const cookie = await cookieOf(asker, { fresh: row.handler === 'DELETE /api/session' })
    const response = await ask(row, workbook, cookie)
    const text = await response.text()
    expect([response.status, response.status < 300 ? '' : text]).toEqual([
      row.expected[asker],
      response.status < 300 ? '' : expect.any(String),
    ])
    expect(response.headers.get('cache-control')).toBe('no-store')
    if (asker === 'stranger' || asker === 'nobody') expect(text).not.toContain(workbook.id)
  })
})

describe.each(rows.filter(({ handler }) => !handler.startsWith('GET')))('$handler $what', (row) => {
  test.each([
    ['another site', { origin: 'http://evil.example' }, 403],
    ['no page at all', { origin: '' }, 403],
  ])('asked by %s with the owner’s cookie is refused', async (_who, headers, status) => {
    const workbook = await makeWorkbook('owner')
    const response = await ask(row, workbook, await cookieOf('owner'), headers)
    expect(response.status).toBe(status)
    expect((await openWorkbook(firm.actors.owner, workbook.id)).ok).toBe(true)
  })

  if (!row.body) return
  test('as a form with the owner’s cookie is refused', async () => {
    const response = await ask(row, await makeWorkbook('owner'), await cookieOf('owner'), {
      'content-type': 'text/plain',
    })
    expect(response.status).toBe(400)
  })
})

test('another firm’s workbook, a removed one and one that never was are answered alike', async () => {
  const cookie = await cookieOf('owner')
  const there = await makeWorkbook('owner', elsewhere)
  const removed = await makeWorkbook('owner')
  await ask({ handler: 'DELETE /api/workbooks/[id]' }, removed, cookie)
  for (const { handler, query, body } of rows.filter((row) => row.handler.includes('[id]'))) {
    const answers = await Promise.all(
      [there, removed, { ...removed, id: randomUUID() }, { ...removed, id: 'not-an-id' }].map(
        async (workbook) => {
          const response = await ask(
            { handler, ...(query && { query }), ...(body && { body }) },
            workbook,
            cookie,
          )
          return `${response.status} ${await response.text()}`
        },
      ),
    )
    expect(new Set(answers).size, answers.join('\n')).toBe(1)
    expect(answers[0]).toMatch(/^404 /)
  }
})

test('the list of one firm holds nothing of another', async () => {
  const workbook = await makeWorkbook('owner')
  const list = async (asker: Asker) =>
    (await ask({ handler: 'GET /api/workbooks' }, workbook, await cookieOf(asker))).text()
  expect(await list('viewer')).toContain(workbook.id)
  expect(await list('stranger')).not.toContain(workbook.id)
})

test('a signed-out cookie is worth nothing, on every handler that asks who it is', async () => {
  const { token } = await signInAs(firm.emails.manager)
  const cookie = await cookieFor(token)
  const workbook = await makeWorkbook('owner')
  const out = await ask({ handler: 'DELETE /api/session' }, workbook, cookie)
  expect(out.headers.get('set-cookie')).toMatch(/Max-Age=0; HttpOnly; SameSite=Lax/)
  for (const row of rows.filter(({ expected }) => expected.nobody === 401)) {
    expect([row.handler, (await ask(row, workbook, cookie)).status]).toEqual([row.handler, 401])
  }
})

test.each([
  ['made with another secret', () => cookieFor('x', 'another secret, just as long as ours is')],
  ['with a token that is no session', () => cookieFor('x')],
  ['that is noise', async () => `${sessionCookie().name}=noise`],
])('a cookie %s is nobody’s', async (_what, cookie) => {
  const response = await ask({ handler: 'GET /api/workbooks' }, await makeWorkbook('owner'), await cookie())
  expect(response.status).toBe(401)
})

async function makeWorkbook(by: Role, where = firm) {
  const request = { title: 'House', frame: 'gable', system: 'us' as const }
  const at = { now: () => new Date(), newId: () => randomUUID() }
  const { id } = expectOk(await createWorkbook(where.actors[by], request, at))
  const { workbook } = expectOk(await openWorkbook(where.actors[by], id)).snapshot
  const sheet = workbook.sheets.find((one) => one.lock === undefined)?.id
  const locked = workbook.sheets.find((one) => one.lock !== undefined)?.id
  if (!sheet || !locked) throw new Error('the template has no open sheet or no locked one')
  return { id, sheet, locked }
}

function edit(sheet: string) {
  const op = { kind: 'set-cells', sheet, cells: [{ row: 3, column: 4, note: 'asked about it' }] }
  return { base: 0, operations: [{ id: randomUUID(), batch: randomUUID(), op }] }
}

async function cookieOf(asker: Asker, { fresh = false } = {}): Promise<string> {
  if (asker === 'nobody') return ''
  const [where, role] = asker === 'stranger' ? [elsewhere, 'owner' as const] : [firm, asker]
  return cookieFor(fresh ? (await signInAs(where.emails[role])).token : where.tokens[role])
}

async function cookieFor(session: string, secret = process.env.AUTH_SECRET ?? ''): Promise<string> {
  const { name } = sessionCookie()
  return `${name}=${await encode({ token: { session }, secret, salt: name })}`
}

function ask(
  { handler, query = '', body }: Pick<Row, 'handler' | 'query' | 'body'>,
  workbook: { readonly id: string; readonly sheet: string; readonly locked: string },
  cookie: string,
  headers: Record<string, string> = {},
): Promise<Response> {
  const [method = '', path = ''] = handler.split(' ')
  const run = handlers.get(handler)
  if (!run) throw new Error(`no handler ${handler}`)
  const request = new Request(`http://localhost:3100${path.replace('[id]', workbook.id)}${query}`, {
    method,
    headers: {
      host: 'localhost:3100',
      origin: 'http://localhost:3100',
      cookie,
      ...(body ? { 'content-type': 'application/json' } : {}),
      ...headers,
    },
    ...(body ? { body: JSON.stringify(body(workbook)) } : {}),
  })
  return run(request, { params: Promise.resolve({ id: workbook.id }) })
}
