import { randomBytes } from 'node:crypto'
import { existsSync } from 'node:fs'
import { join } from 'node:path'
import { initCluster, startCluster, stopCluster } from './cluster.mjs'
import { joinUsers, leaveUsers, withLock } from './lock.mjs'
import { databasePlace } from './place.mjs'
import { dataFolder, ensureDataFolder, Obstacle, readJson, writePrivateJson } from './project.mjs'
import { appUrl, ensureRolesAndDatabase, ownerUrl } from './roles.mjs'

const database = 'panewright'
const firstPort = 15432

/**
 * Addresses of the two roles' connections. `ownerUrl` migrates, `appUrl` is what the application gets.
 * @typedef {{ ownerUrl: string, appUrl: string, outside: boolean, release: () => Promise<void> }} OpenDatabase
 */

/**
 * The database to work with: the one that `DATABASE_URL` names, else the local one, started if it is not running.
 * `release` stops the local one when no other process of this project still uses it.
 * @returns {Promise<OpenDatabase>}
 */
export async function openDatabase() {
  const outside = process.env.DATABASE_URL
  if (outside) {
    const appUrl = process.env.APP_DATABASE_URL ?? outside
    return { ownerUrl: outside, appUrl, outside: true, release: async () => {} }
  }
  return openLocal()
}

/** @returns {Promise<OpenDatabase>} */
async function openLocal() {
  ensureDataFolder()
  const place = databasePlace()
  const folder = join(place, 'pg')
  const lock = join(dataFolder, 'database.lock')
  const users = join(dataFolder, 'database-users')
  const access = await withLock(lock, async () => {
    const known = await knownAccess(folder)
    joinUsers(users)
    const { port } = await startCluster({ folder }, known.port)
    const access = { ...known, port }
    if (port !== known.port) writePrivateJson(connectionFile(), access)
    await ensureRolesAndDatabase(access, database)
    return access
  })
  return {
    ownerUrl: ownerUrl(access, database),
    appUrl: appUrl(access, database),
    outside: false,
    release: () =>
      withLock(lock, async () => {
        if (leaveUsers(users) === 0) await stopCluster({ folder })
      }),
  }
}

/** Passwords and port of the local cluster, made at the first start. */
async function knownAccess(/** @type {string} */ folder) {
  const known = readJson(connectionFile())
  if (existsSync(join(folder, 'PG_VERSION'))) {
    if (known) return known
    throw new Obstacle(
      `The database in ${folder} is there, but its passwords (${connectionFile()}) are gone. ` +
        'Put that file back, or start afresh with `npm run db:reset -- --yes` (all data is lost).',
    )
  }
  const access = {
    port: firstPort,
    adminPassword: password(),
    ownerPassword: password(),
    appPassword: password(),
  }
  // Before the cluster is complete, so that a finished cluster always has its passwords.
  writePrivateJson(connectionFile(), access)
  await initCluster({ folder }, access.adminPassword)
  return access
}

export function connectionFile() {
  return join(dataFolder, 'conn.json')
}

export function password() {
  return randomBytes(24).toString('base64url')
}
