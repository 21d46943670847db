import { spawn } from 'node:child_process'
import {
  appendFileSync,
  chownSync,
  existsSync,
  mkdirSync,
  readdirSync,
  readFileSync,
  readlinkSync,
  renameSync,
  rmSync,
  writeFileSync,
} from 'node:fs'
import { connect } from 'node:net'
import { dirname, join } from 'node:path'
import { setTimeout as sleep } from 'node:timers/promises'
import { freePort } from './ports.mjs'
import { postgresBinaries, serverUser } from './postgres-binaries.mjs'
import { Obstacle } from './project.mjs'

/**
 * One PostgreSQL data directory and the server on it: loopback only, password only, no socket file.
 * @typedef {{ folder: string, durable?: boolean }} Cluster
 */

/** The cluster's superuser; only this folder's code signs in as it. */
export const adminUser = 'panewright_admin'

/**
 * Makes the data directory unless it is there. Killed half-way, it starts afresh next time.
 * @param {Cluster} cluster
 * @param {string} password the superuser's
 */
export async function initCluster({ folder, durable = true }, password) {
  if (existsSync(join(folder, 'PG_VERSION'))) return
  const making = `${folder}.making`
  const passwordFile = `${folder}.password`
  rmSync(making, { recursive: true, force: true })
  mkdirSync(dirname(folder), { recursive: true })
  mkdirSync(making, { mode: 0o700 })
  const user = serverUser()
  try {
    writeFileSync(passwordFile, password, { mode: 0o600 })
    if (user) {
      chownSync(making, user.uid, user.gid)
      chownSync(passwordFile, user.uid, user.gid)
    }
    const args = ['-D', making, '-U', adminUser, `--pwfile=${passwordFile}`, '--auth=scram-sha-256']
    await run('initdb', [...args, '-E', 'UTF8', '--locale=C.UTF-8', ...(durable ? [] : ['--no-sync'])])
  } finally {
    rmSync(passwordFile, { force: true })
  }
  const settings = ["listen_addresses = '127.0.0.1'", "unix_socket_directories = ''", 'max_connections = 60']
  // Recovery first writes the data directory out: in one call rather than a thousand files one by one (seconds).
  if (process.platform === 'linux') settings.push('recovery_init_sync_method = syncfs')
  if (!durable) settings.push('fsync = off', 'synchronous_commit = off', 'full_page_writes = off')
  appendFileSync(join(making, 'postgresql.conf'), `\n${settings.join('\n')}\n`)
  renameSync(making, folder)
}

/**
 * Starts the server unless it answers already.
 * @param {Cluster} cluster
 * @param {number} port where it was last; the next free one is taken if a stranger is there
 * @returns {Promise<{ port: number, started: boolean }>}
 */
export async function startCluster({ folder }, port) {
  const running = runningPort(folder)
  if (running !== undefined && (await answers(running)) && (await isRunning(folder))) {
    return { port: running, started: false }
  }
  // After a hard kill the server's children take a moment to end: try for ten seconds.
  for (let attempt = 1; ; attempt += 1) {
    clearUnreaped(folder)
    const chosen = await freePort(port)
    const log = join(folder, 'server.log')
    const status = await runQuietly('pg_ctl', [
      'start',
      '-D',
      folder,
      '-l',
      log,
      '-o',
      `-p ${chosen}`,
      '-w',
      '-t',
      '30',
    ])
    if (status === 0 && (await answers(chosen))) return { port: chosen, started: true }
    if (attempt === 40) throw new Obstacle(`PostgreSQL did not start. Its log: ${log}`)
    await sleep(250)
  }
}

/**
 * A killed server keeps its process number until the system's first process reaps it, which some never do, and
 * PostgreSQL takes that for a running one. Its pid file is removed once no process works in the data directory.
 */
function clearUnreaped(/** @type {string} */ folder) {
  const pid = serverProcess(folder)
  if (pid === undefined || !existsSync(`/proc/${pid}/stat`)) return
  const stat = readFileSync(`/proc/${pid}/stat`, 'utf8')
  if (stat[stat.lastIndexOf(')') + 2] !== 'Z') return
  for (const name of readdirSync('/proc').filter((entry) => /^\d+$/.test(entry))) {
    try {
      if (readlinkSync(`/proc/${name}/cwd`) === folder) return
    } catch {
      // It ended meanwhile, or it is not ours to look at: then it is no child of this server either.
    }
  }
  rmSync(join(folder, 'postmaster.pid'), { force: true })
}

/** Stops the server; open sessions are ended. Nothing to do when none runs. */
export async function stopCluster(/** @type {Cluster} */ { folder }) {
  if (!existsSync(join(folder, 'postmaster.pid'))) return
  await runQuietly('pg_ctl', ['stop', '-D', folder, '-m', 'fast', '-w', '-t', '20'])
}

/** The server's process number, while its pid file is there. */
export function serverProcess(/** @type {string} */ folder) {
  const pid = Number(pidFile(folder)[0])
  return Number.isInteger(pid) && pid > 0 ? pid : undefined
}

function runningPort(/** @type {string} */ folder) {
  const port = Number(pidFile(folder)[3])
  return Number.isInteger(port) && port > 0 ? port : undefined
}

function pidFile(/** @type {string} */ folder) {
  try {
    return readFileSync(join(folder, 'postmaster.pid'), 'utf8').split('\n')
  } catch {
    return []
  }
}

async function isRunning(/** @type {string} */ folder) {
  return (await runQuietly('pg_ctl', ['status', '-D', folder])) === 0
}

/**
 * Asks the port for encryption, as any client may; a PostgreSQL server answers with one letter.
 * @param {number} port
 * @returns {Promise<boolean>}
 */
export function answers(port) {
  return new Promise((resolve) => {
    const socket = connect({ port, host: '127.0.0.1', timeout: 1000 })
    const finish = (/** @type {boolean} */ result) => {
      socket.destroy()
      resolve(result)
    }
    socket.once('connect', () => socket.write(Buffer.from([0, 0, 0, 8, 4, 210, 22, 47])))
    socket.once('data', (data) => finish(data[0] === 0x4e || data[0] === 0x53))
    socket.once('error', () => finish(false))
    socket.once('timeout', () => finish(false))
    socket.once('close', () => finish(false))
  })
}

async function run(/** @type {string} */ program, /** @type {string[]} */ args) {
  const { status, output } = await spawned(program, args, 'pipe')
  if (status !== 0) throw new Error(`${program} ended with ${status}: ${output.trim()}`)
}

async function runQuietly(/** @type {string} */ program, /** @type {string[]} */ args) {
  return (await spawned(program, args, 'ignore')).status
}

/**
 * @param {string} program
 * @param {string[]} args
 * @param {'pipe' | 'ignore'} output a server must not inherit a pipe, or it would never close
 * @returns {Promise<{ status: number, output: string }>}
 */
function spawned(program, args, output) {
  const folder = postgresBinaries()
  if (!folder)
    throw new Obstacle('PostgreSQL is not installed: sudo apt-get install -y postgresql (or set PG_BIN)')
  return new Promise((resolve, reject) => {
    // The server's user may not be able to read the folder this was called from.
    const child = spawn(join(folder, program), args, {
      cwd: '/',
      stdio: ['ignore', output, output],
      detached: true,
      ...serverUser(),
    })
    let text = ''
    child.stdout?.on('data', (data) => {
      text += data
    })
    child.stderr?.on('data', (data) => {
      text += data
    })
    child.once('error', reject)
    child.once(output === 'pipe' ? 'close' : 'exit', (code) => resolve({ status: code ?? 1, output: text }))
  })
}
