import { execFile } from 'node:child_process'
import { mkdirSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { promisify } from 'node:util'
import { postgresBinaries } from '@/db/server/postgres-binaries.mjs'
import { benchFolder } from './empty-app'

const execute = promisify(execFile)

/**
 * Transactions a second of one prepared statement, by PostgreSQL's own load generator, without any of our code.
 * Throws when a transaction fails.
 */
export async function pgbench(options: {
  readonly url: string
  readonly statement: string
  readonly clients: number
  readonly seconds: number
}): Promise<number> {
  const folder = postgresBinaries()
  if (!folder) throw new Error('PostgreSQL is not installed')
  mkdirSync(benchFolder, { recursive: true })
  const script = join(benchFolder, 'insert.sql')
  writeFileSync(script, `${options.statement};\n`)
  const { port, username, password, pathname } = new URL(options.url)
  const { stdout } = await execute(
    join(folder, 'pgbench'),
    [
      ...['-n', '-M', 'prepared', '-f', script, '-c', String(options.clients), '-j', '1'],
      ...['-T', String(options.seconds), '-h', '127.0.0.1', '-p', port, '-U', username, pathname.slice(1)],
    ],
    { env: { ...process.env, PGPASSWORD: decodeURIComponent(password) } },
  )
  const rate = /tps = ([\d.]+)/.exec(stdout)?.[1]
  if (!rate || /failed transactions: [1-9]/.test(stdout)) throw new Error(`pgbench failed:\n${stdout}`)
  return Number(rate)
}
