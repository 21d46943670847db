import { existsSync, readdirSync, readFileSync } from 'node:fs'
import { join } from 'node:path'

const needed = ['initdb', 'pg_ctl', 'postgres']

/** The folder of the newest PostgreSQL's programs, `PG_BIN` first; undefined when there is none. */
export function postgresBinaries() {
  const named = process.env.PG_BIN
  if (named) return isComplete(named) ? named : undefined
  const base = '/usr/lib/postgresql'
  if (!existsSync(base)) return undefined
  return readdirSync(base)
    .filter((version) => /^\d+$/.test(version))
    .sort((a, b) => Number(b) - Number(a))
    .map((version) => join(base, version, 'bin'))
    .find(isComplete)
}

function isComplete(/** @type {string} */ folder) {
  return needed.every((name) => existsSync(join(folder, name)))
}

/**
 * Whom the database server runs as. PostgreSQL refuses root, so root hands over to `postgres` (or `nobody`).
 * @returns {{ uid: number, gid: number } | undefined} undefined: as whoever runs this
 */
export function serverUser() {
  if (process.getuid?.() !== 0) return undefined
  const lines = readFileSync('/etc/passwd', 'utf8').split('\n')
  for (const wanted of ['postgres', 'nobody']) {
    const fields = lines.find((line) => line.startsWith(`${wanted}:`))?.split(':')
    if (fields) return { uid: Number(fields[2]), gid: Number(fields[3]) }
  }
  throw new Error('neither user `postgres` nor `nobody` in /etc/passwd')
}
