import { chmodSync, mkdtempSync, rmSync } from 'node:fs'
import { join } from 'node:path'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { appendOperations, openWorkbook, operationsAfter } from '@/db/access/workbooks'
import { closeDatabase } from '@/db/connection'
import { migrate } from '@/db/migrate'
import { initCluster, serverProcess, startCluster, stopCluster } from '@/db/server/cluster.mjs'
import { password } from '@/db/server/local.mjs'
import { appUrl, ensureRolesAndDatabase, ownerUrl } from '@/db/server/roles.mjs'
import { withClient } from '@/db/server/sql.mjs'
import { expectOk, makeFirm, type TestFirm } from '../_support/database'
import { addRows, appendNow, makeWorkbook, sent, setCell, stateOf } from '../_support/workbooks'

const place = mkdtempSync('/var/tmp/panewright-durable-')
chmodSync(place, 0o711)
const folder = join(place, 'pg')
let access = { port: 26_432, adminPassword: password(), ownerPassword: password(), appPassword: password() }
let firm: TestFirm

async function start(): Promise<void> {
  const { port } = await startCluster({ folder }, access.port)
  access = { ...access, port }
  process.env.APP_DATABASE_URL = appUrl(access, 'durable')
}

function killServer(): void {
  const pid = serverProcess(folder)
  if (pid === undefined) throw new Error('the server is not running')
  process.kill(pid, 'SIGKILL')
}

beforeAll(async () => {
  await initCluster({ folder }, access.adminPassword)
  await start()
  await ensureRolesAndDatabase(access, 'durable')
  await migrate(ownerUrl(access, 'durable'))
  firm = await makeFirm()
}, 60_000)

afterAll(async () => {
  await closeDatabase()
  await stopCluster({ folder })
  rmSync(place, { recursive: true, force: true })
})

describe('acknowledged means committed', () => {
  test('it runs with the settings that make it so', async () => {
    const rows = await withClient(appUrl(access, 'durable'), async (client) => {
      const names = ['fsync', 'synchronous_commit', 'full_page_writes']
      return (
        await client.query('select name, setting from pg_settings where name = any ($1) order by 1', [names])
      ).rows
    })
    expect(rows.map((row) => row.setting)).toEqual(['on', 'on', 'on'])
  })

  test('six times killed with SIGKILL amid appends to four workbooks: every acknowledged one is there, once', async () => {
    const { estimator } = firm.actors
    const ids = await Promise.all([0, 1, 2, 3].map(() => makeWorkbook(estimator)))
    for (const id of ids) await appendNow(estimator, id, [addRows()])
    const acknowledged = new Map(ids.map((id) => [id, new Map<string, number>()]))
    for (let round = 0; round < 6; round++) {
      let count = 0
      const client = async (id: string) => {
        let base = expectOk(await openWorkbook(estimator, id)).seq
        for (let edit = 0; ; edit++) {
          const operations = [sent(setCell(round * 1000 + edit)), sent(setCell(edit, 41))]
          const answer = await appendOperations(estimator, id, { base, operations })
          if (!answer.ok) {
            expect(answer.failure.code).toBe('unavailable')
            return
          }
          if (!('accepted' in answer.value)) throw new Error('behind, though nobody else appends')
          for (const one of answer.value.accepted) acknowledged.get(id)?.set(one.id, one.seq)
          base = answer.value.seq
          count += 1
          // At a different point of the work each time.
          if (count === 30 + round * 7) killServer()
        }
      }
      await Promise.all(ids.map(client))
      await start()
      for (const id of ids) {
        const logged = expectOk(await operationsAfter(estimator, id, 0))
        expect(logged.map((one) => one.seq)).toEqual(logged.map((_, i) => i + 1))
        const bySeq = new Map(logged.map((one) => [one.seq, one.id]))
        const lost = [...(acknowledged.get(id) ?? [])].filter(([one, seq]) => bySeq.get(seq) !== one)
        expect(lost).toEqual([])
        stateOf(expectOk(await openWorkbook(estimator, id)))
      }
    }
    const total = [...acknowledged.values()].reduce((sum, one) => sum + one.size, 0)
    expect(total).toBeGreaterThan(500)
  }, 120_000)

  test('killed at once after the answer, then sent again as if the answer was lost', async () => {
    const { estimator } = firm.actors
    const id = await makeWorkbook(estimator)
    let base = await appendNow(estimator, id, [addRows()])
    for (let round = 0; round < 3; round++) {
      const request = { base, operations: [sent(setCell(round))] }
      const first = expectOk(await appendOperations(estimator, id, request))
      killServer()
      await start()
      expect(expectOk(await appendOperations(estimator, id, request))).toEqual(first)
      base = first.seq
    }
    expect(base).toBe(4)
  }, 60_000)
})

describe('the local server', () => {
  test('a second start and a second stop change nothing', async () => {
    const pid = serverProcess(folder)
    expect(await startCluster({ folder }, access.port)).toEqual({ port: access.port, started: false })
    expect(serverProcess(folder)).toBe(pid)
    await stopCluster({ folder })
    await stopCluster({ folder })
    await start()
    expectOk(await openWorkbook(firm.actors.owner, await makeWorkbook(firm.actors.owner)))
  })

  test('while it is away, the answer is `unavailable`, and the process lives', async () => {
    await stopCluster({ folder })
    expect(await openWorkbook(firm.actors.owner, '00000000-0000-4000-8000-000000000000')).toMatchObject({
      failure: { code: 'unavailable' },
    })
    await start()
  })

  test('takes the next free port when a stranger has its own', async () => {
    await stopCluster({ folder })
    const { createServer } = await import('node:net')
    const stranger = createServer()
    await new Promise<void>((resolve) => stranger.listen(access.port, '127.0.0.1', resolve))
    const taken = access.port
    try {
      await start()
      expect(access.port).toBeGreaterThan(taken)
      await makeWorkbook(firm.actors.owner)
    } finally {
      await new Promise((resolve) => stranger.close(resolve))
    }
  })
})
