import type { Migration, MigrationProvider } from 'kysely'
import * as m001 from './001_firms_and_members'
import * as m002 from './002_door'
import * as m003 from './003_workbooks'

/** In order; named here one by one, since a bundle or a test runner has no folder to list. */
export const migrations: Record<string, Migration> = {
  '001_firms_and_members': m001,
  '002_door': m002,
  '003_workbooks': m003,
}

export const migrationProvider: MigrationProvider = { getMigrations: async () => migrations }
