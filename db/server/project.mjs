import { createHash } from 'node:crypto'
import { chmodSync, mkdirSync, readFileSync, renameSync, writeFileSync } from 'node:fs'
import { dirname, join } from 'node:path'
import { fileURLToPath } from 'node:url'

/** The project's folder; every path below is under it. */
export const root = dirname(dirname(dirname(fileURLToPath(import.meta.url))))

/** Everything a running copy keeps: the database, its passwords, locks. Git-ignored. */
export const dataFolder = join(root, '.data')

/** Creates `.data`; others may pass through it (the database's own user must), but not list it. */
export function ensureDataFolder() {
  mkdirSync(dataFolder, { recursive: true })
  chmodSync(dataFolder, 0o711)
  return dataFolder
}

/**
 * Reads a JSON file.
 * @param {string} path
 * @returns {any} undefined when there is none or it is not JSON
 */
export function readJson(path) {
  try {
    return JSON.parse(readFileSync(path, 'utf8'))
  } catch {
    return undefined
  }
}

/**
 * Writes a file that only its owner may read, whole or not at all.
 * @param {string} path
 * @param {unknown} value
 */
export function writePrivateJson(path, value) {
  const partial = `${path}.${process.pid}.partial`
  writeFileSync(partial, `${JSON.stringify(value, null, 2)}\n`, { mode: 0o600 })
  renameSync(partial, path)
}

/** A short name for this copy of the project, the same at every start. */
export function projectHash() {
  return createHash('sha256').update(root).digest('hex').slice(0, 12)
}

/** Says something to the person at the terminal; standard output is left to results. */
export function say(/** @type {string} */ text) {
  process.stderr.write(`${text}\n`)
}

/** An expected obstacle: shown as its sentence, without a stack. */
export class Obstacle extends Error {}

/**
 * Runs a command's main function; an `Obstacle` ends it with its sentence and status 1.
 * @param {() => Promise<void> | void} main
 */
export function runMain(main) {
  Promise.resolve()
    .then(main)
    .catch((error) => {
      say(error instanceof Obstacle ? error.message : (error?.stack ?? String(error)))
      process.exit(1)
    })
}
