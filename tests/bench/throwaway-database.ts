import { rmSync } from 'node:fs'
import { join } from 'node:path'
import { migrate } from '@/db/migrate'
import { initCluster, startCluster, stopCluster } from '@/db/server/cluster.mjs'
import { password } from '@/db/server/local.mjs'
import { databasePlace } from '@/db/server/place.mjs'
import { adminUrl, appUrl, ensureRolesAndDatabase, ownerUrl } from '@/db/server/roles.mjs'

/** A migrated database on a durable cluster of its own: on disk, with fsync, as a firm would run it. */
export interface ThrowawayDatabase {
  readonly adminUrl: string
  readonly ownerUrl: string
  readonly appUrl: string
  /** Stops the server and deletes its data. */
  stop(): Promise<void>
}

const database = 'bench'
const firstPort = 47_432

export async function startThrowawayDatabase(name: string): Promise<ThrowawayDatabase> {
  const folder = join(databasePlace(), `bench-${name}`)
  const stop = async () => {
    await stopCluster({ folder })
    rmSync(folder, { recursive: true, force: true })
  }
  await stop()
  const passwords = { adminPassword: password(), ownerPassword: password(), appPassword: password() }
  try {
    await initCluster({ folder, durable: true }, passwords.adminPassword)
    const { port } = await startCluster({ folder }, firstPort)
    const access = { port, ...passwords }
    await ensureRolesAndDatabase(access, database)
    await migrate(ownerUrl(access, database))
    return {
      adminUrl: adminUrl(access, database),
      ownerUrl: ownerUrl(access, database),
      appUrl: appUrl(access, database),
      stop,
    }
  } catch (error) {
    await stop()
    throw error
  }
}
