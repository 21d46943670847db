import { chmodSync, lstatSync, mkdirSync, statSync } from 'node:fs'
import { dirname, join } from 'node:path'
import { serverUser } from './postgres-binaries.mjs'
import { ensureDataFolder, Obstacle, projectHash } from './project.mjs'

/**
 * Where the database's folder goes: `.data`, or, when the server's own user cannot reach into it
 * (a project under a private home), a folder of this project in /var/tmp.
 */
export function databasePlace() {
  const here = ensureDataFolder()
  const user = serverUser()
  if (!user || isReachable(here)) return here
  const place = join('/var/tmp', `panewright-${projectHash()}`)
  mkdirSync(place, { recursive: true, mode: 0o711 })
  const found = lstatSync(place)
  // Anyone may write to /var/tmp: a folder that a stranger put there first is not ours.
  if (!found.isDirectory() || found.uid !== 0) {
    throw new Obstacle(
      `${place} belongs to somebody else. Move the project where user postgres can reach it.`,
    )
  }
  chmodSync(place, 0o711)
  return place
}

/** Whether everybody may pass through every folder on the way. */
export function isReachable(/** @type {string} */ folder) {
  for (let at = folder; ; at = dirname(at)) {
    if ((statSync(at).mode & 0o001) === 0) return false
    if (at === dirname(at)) return true
  }
}
