import { Kysely, Migrator, PostgresDialect } from 'kysely'
import pg from 'pg'
import { migrationProvider } from './migrations'

/**
 * Brings the database that `ownerUrl` names up to the newest migration; two at once wait for one another.
 * Gives the names of what was applied. Throws when a migration fails; that one leaves nothing behind.
 */
export async function migrate(ownerUrl: string): Promise<readonly string[]> {
  const pool = new pg.Pool({ connectionString: ownerUrl, max: 2 })
  pool.on('error', () => {})
  const db = new Kysely<unknown>({ dialect: new PostgresDialect({ pool }) })
  try {
    const { error, results } = await new Migrator({ db, provider: migrationProvider }).migrateToLatest()
    if (error) throw error
    return (results ?? []).map((result) => result.migrationName)
  } finally {
    await db.destroy()
  }
}
