import { Kysely, PostgresDialect, sql, type Transaction } from 'kysely'
import pg from 'pg'
import type { DB } from './schema'

export type Database = Kysely<DB>
export type FirmTransaction = Transaction<DB>

/** Written limits: a statement 10 s, a transaction left idle 15 s, ten connections a process, 5 s to get one. */
const limits = {
  statement_timeout: 10_000,
  idle_in_transaction_session_timeout: 15_000,
  max: 10,
  connectionTimeoutMillis: 5_000,
}

// A calendar date stays its text: as a Date it would shift with the server's time zone.
pg.types.setTypeParser(pg.types.builtins.DATE, (text) => text)

/** Opens a pool as the application's role; the caller destroys it. */
export function connect(
  url: string,
  options: { readonly role?: string; readonly max?: number } = {},
): Database {
  const pool = new pg.Pool({
    connectionString: url,
    ...limits,
    max: options.max ?? limits.max,
    application_name: 'panewright',
    ...(options.role ? { options: `-c role=${options.role}` } : {}),
  })
  // Without listeners, a connection that the server ends would end this process: the pool's is for idle ones, each
  // connection's own for when it is in use (its next query fails anyway).
  pool.on('error', () => {})
  pool.on('connect', (client) => client.on('error', () => {}))
  return new Kysely<DB>({ dialect: new PostgresDialect({ pool }) })
}

const shared = globalThis as { panewrightDatabase?: { readonly url: string; readonly db: Database } }

/**
 * This process's pool, as the application's role: `APP_DATABASE_URL`, or `DATABASE_URL` with its role put aside
 * for the application's. One for all bundles of the process, and reopened when the address changes.
 */
export function database(): Database {
  const app = process.env.APP_DATABASE_URL
  const url = app ?? process.env.DATABASE_URL
  if (!url)
    throw new Error(
      'neither APP_DATABASE_URL nor DATABASE_URL is set: start with `npm start` or `npm run dev`',
    )
  if (shared.panewrightDatabase?.url !== url) {
    void shared.panewrightDatabase?.db.destroy()
    shared.panewrightDatabase = { url, db: connect(url, app ? {} : { role: 'panewright_app' }) }
  }
  return shared.panewrightDatabase.db
}

/** Ends this process's pool, if it was opened. */
export async function closeDatabase(): Promise<void> {
  const open = shared.panewrightDatabase
  delete shared.panewrightDatabase
  await open?.db.destroy()
}

/**
 * The one way to a firm's rows: a transaction in which row-level security shows and takes that firm's rows alone.
 * The setting ends with the transaction, so a pooled connection never carries it on.
 */
export function withFirm<T>(
  db: Database,
  firmId: string,
  work: (trx: FirmTransaction) => Promise<T>,
): Promise<T> {
  return db.transaction().execute(async (trx) => {
    await sql`select set_config('app.firm', ${firmId}, true)`.execute(trx)
    return work(trx)
  })
}
