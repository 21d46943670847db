import { existsSync } from 'node:fs'
import { delimiter, join } from 'node:path'
import { runChild } from './children.mjs'
import { withLock } from './lock.mjs'
import { postgresBinaries } from './postgres-binaries.mjs'
import { ensureDataFolder, Obstacle, readJson, root, say } from './project.mjs'

/**
 * What must be there before anything else of the project can run. These files need Node and npm only; all they say
 * goes to standard error, so that a command's results stay alone on standard output.
 */

/** Installs `node_modules` when it does not match `package-lock.json`. */
export async function ensureDependencies() {
  checkNode()
  if (dependenciesMatch()) return
  await withLock(join(ensureDataFolder(), 'install.lock'), async () => {
    if (dependenciesMatch()) return
    say('Installing the packages of package-lock.json (npm ci) …')
    // `include=dev`: the build needs TypeScript whatever NODE_ENV says.
    const args = ['ci', '--include=dev', '--no-audit', '--no-fund']
    const status = await runChild('npm', args)
    if (status !== 0) throw new Obstacle(`npm ci failed (status ${status}). Its messages are above.`)
  })
}

function checkNode() {
  const [major = 0] = process.versions.node.split('.').map(Number)
  if (major < 20) throw new Obstacle(`Node 20 or newer is needed; this is ${process.versions.node}.`)
}

/** Compares with the list that npm leaves in `node_modules`; packages for other platforms may be absent. */
export function dependenciesMatch(folder = root) {
  const wanted = readJson(join(folder, 'package-lock.json'))?.packages
  const installed = readJson(join(folder, 'node_modules/.package-lock.json'))?.packages
  if (!wanted) throw new Obstacle('package-lock.json is missing or damaged: fetch the project again.')
  if (!installed) return false
  return Object.entries(wanted).every(([path, entry]) => {
    if (path === '') return true
    const found = installed[path]
    return found ? found.version === entry.version : entry.optional === true || entry.peer === true
  })
}

/** Debian packages by name, and how to tell that one is there. */
const debianPackages = {
  postgresql: () => postgresBinaries() !== undefined,
  chromium: () => onPath('chromium'),
  'libreoffice-calc': () => onPath('soffice') || onPath('libreoffice'),
  'poppler-utils': () => onPath('pdftotext'),
}

function onPath(/** @type {string} */ program) {
  return (process.env.PATH ?? '')
    .split(delimiter)
    .some((folder) => folder && existsSync(join(folder, program)))
}

/**
 * Makes sure Debian packages are there: installs them when this is root, else says exactly how.
 * @param {(keyof typeof debianPackages)[]} names
 */
export async function ensurePackages(names) {
  const missing = names.filter((name) => !debianPackages[name]())
  if (missing.length === 0) return
  const install = ['install', '-y', '--no-install-recommends', ...missing]
  if (process.getuid?.() !== 0 || !onPath('apt-get')) {
    const hint = missing.includes('postgresql') ? ' (PostgreSQL elsewhere: set PG_BIN)' : ''
    throw new Obstacle(
      `Missing: ${missing.join(', ')}. Install with:\n\n` +
        `  sudo apt-get update && sudo apt-get ${install.join(' ')}\n${hint}`,
    )
  }
  say(`Installing Debian packages: ${missing.join(', ')} …`)
  for (const args of [['update'], install]) {
    const status = await runChild('apt-get', args, { DEBIAN_FRONTEND: 'noninteractive' })
    if (status !== 0) throw new Obstacle(`apt-get ${args.join(' ')} failed (status ${status}).`)
  }
  const still = missing.filter((name) => !debianPackages[name]())
  if (still.length > 0) throw new Obstacle(`Installed, but not found afterwards: ${still.join(', ')}.`)
}

/** Reads `.env` into the environment; what is set already stays. */
export function loadEnvironment() {
  const file = join(root, '.env')
  if (existsSync(file) && typeof process.loadEnvFile === 'function') process.loadEnvFile(file)
}
