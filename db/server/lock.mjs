import { linkSync, mkdirSync, readdirSync, readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs'
import { dirname, join } from 'node:path'
import { setTimeout as sleep } from 'node:timers/promises'
import { Obstacle } from './project.mjs'

/**
 * A process as `id-start`: the start time (Linux clock ticks) tells a process from a later one with its number.
 * @param {number} [pid]
 */
export function processMark(pid = process.pid) {
  return `${pid}-${startTicks(pid) ?? '0'}`
}

function startTicks(/** @type {number} */ pid) {
  try {
    const stat = readFileSync(`/proc/${pid}/stat`, 'utf8')
    const fields = stat.slice(stat.lastIndexOf(')') + 2).split(' ')
    return fields[0] === 'Z' ? undefined : fields[19]
  } catch {
    return undefined
  }
}

/** Whether the process of a mark still runs. */
export function markIsAlive(/** @type {string} */ mark) {
  const [pid, ticks] = mark.split('-')
  const number = Number(pid)
  if (!Number.isInteger(number) || number <= 0) return false
  const now = startTicks(number)
  if (now !== undefined) return ticks === '0' || now === ticks
  if (process.platform === 'linux') return false
  try {
    process.kill(number, 0)
    return true
  } catch {
    return false
  }
}

/**
 * Takes a lock that one process at a time can hold; a dead holder's lock is taken over.
 * @param {string} path the lock's file
 * @param {{ waitMs?: number }} [options] without `waitMs` it does not wait
 * @returns {Promise<(() => void) | undefined>} gives the lock back; undefined when another holds it
 */
export async function takeLock(path, { waitMs = 0 } = {}) {
  const mine = processMark()
  const deadline = Date.now() + waitMs
  mkdirSync(dirname(path), { recursive: true })
  for (;;) {
    try {
      writeFileSync(path, mine, { flag: 'wx', mode: 0o600 })
      return () => {
        if (lockHolder(path) === mine) rmSync(path, { force: true })
      }
    } catch (error) {
      if (/** @type {NodeJS.ErrnoException} */ (error).code !== 'EEXIST') throw error
    }
    const holder = lockHolder(path)
    // An empty file is a lock being written just now, unless it stays so.
    if (holder === '' ? Date.now() > deadline : holder !== undefined && !markIsAlive(holder)) {
      clearDeadLock(path, holder ?? '')
      continue
    }
    if (Date.now() >= deadline) return undefined
    await sleep(100)
  }
}

/** Moves a dead holder's file away first: two that find it dead must not remove each other's new lock. */
function clearDeadLock(/** @type {string} */ path, /** @type {string} */ holder) {
  const aside = `${path}.dead.${process.pid}`
  try {
    renameSync(path, aside)
    if (readFileSync(aside, 'utf8') !== holder) linkSync(aside, path)
  } catch (error) {
    const code = /** @type {NodeJS.ErrnoException} */ (error).code
    if (code !== 'ENOENT' && code !== 'EEXIST') throw error
  } finally {
    rmSync(aside, { force: true })
  }
}

/** The mark of the process that holds a lock, if any. */
export function lockHolder(/** @type {string} */ path) {
  try {
    return readFileSync(path, 'utf8')
  } catch {
    return undefined
  }
}

/**
 * Runs `work` while holding a lock, waiting for it up to two minutes.
 * @template T
 * @param {string} path
 * @param {() => Promise<T>} work
 * @returns {Promise<T>}
 */
export async function withLock(path, work) {
  const release = await takeLock(path, { waitMs: 120_000 })
  if (!release) {
    throw new Obstacle(
      `Another process (${lockHolder(path)}) has held ${path} for two minutes. End it and try again.`,
    )
  }
  try {
    return await work()
  } finally {
    release()
  }
}

/** Notes that this process uses something that the last user closes. */
export function joinUsers(/** @type {string} */ folder) {
  mkdirSync(folder, { recursive: true })
  writeFileSync(join(folder, processMark()), '')
}

/** Takes this process off the list; gives how many live users remain. */
export function leaveUsers(/** @type {string} */ folder) {
  rmSync(join(folder, processMark()), { force: true })
  let alive = 0
  for (const mark of readdirSync(folder)) {
    if (markIsAlive(mark)) alive += 1
    else rmSync(join(folder, mark), { force: true })
  }
  return alive
}
