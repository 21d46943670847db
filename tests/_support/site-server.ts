import { spawnSync } from 'node:child_process'
import { randomBytes } from 'node:crypto'
import { closeSync, mkdirSync, openSync } from 'node:fs'
import { join } from 'node:path'
import { freePort } from '@/db/server/ports.mjs'
import { root } from '@/db/server/project.mjs'
import { serve } from '@/db/server/serve.mjs'
import { type ClonedDatabase, cloneDatabase, type TestCluster } from './test-cluster'

export interface Site {
  readonly address: string
  readonly database: ClonedDatabase
  /** Kills the web server with SIGKILL, and starts another on the same database and secret. */
  killAndServeAgain(): Promise<Site>
  stop(): Promise<void>
}

/**
 * The application as the set-up of the `browser` project built it, on a free port, with a seeded database of its own.
 * Its log is in `.data/test-logs`.
 */
export async function startSite(cluster: TestCluster, name: string): Promise<Site> {
  const database = await cloneDatabase(cluster)
  try {
    seed(database)
    return await serveSite(database, name, randomBytes(32).toString('base64url'))
  } catch (error) {
    await database.drop()
    throw error
  }
}

async function serveSite(database: ClonedDatabase, name: string, secret: string): Promise<Site> {
  const folder = join(root, '.data/test-logs')
  mkdirSync(folder, { recursive: true })
  const output = openSync(join(folder, `${name}.log`), 'a')
  const server = await serve({
    port: await freePort(33_000),
    env: { APP_DATABASE_URL: database.appUrl, AUTH_SECRET: secret },
    output,
  }).finally(() => closeSync(output))
  return {
    address: server.address,
    database,
    killAndServeAgain: async () => {
      server.child.kill('SIGKILL')
      await server.ended
      return serveSite(database, name, secret)
    },
    stop: async () => {
      await server.stop()
      await database.drop()
    },
  }
}

/** In a process of its own, so that this one's environment stays as it is. */
function seed(database: ClonedDatabase): void {
  const script = join(root, 'tests/_support/seed-site.ts')
  const env = { ...process.env, APP_DATABASE_URL: database.appUrl }
  const { status } = spawnSync(process.execPath, ['--import', 'tsx', script], {
    cwd: root,
    env,
    stdio: 'inherit',
  })
  if (status !== 0) throw new Error(`seeding ended with ${status}`)
}
