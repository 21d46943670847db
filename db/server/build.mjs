import { createHash } from 'node:crypto'
import { existsSync, readdirSync, readFileSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { runChild } from './children.mjs'
import { withLock } from './lock.mjs'
import { ensureDataFolder, Obstacle, root, say } from './project.mjs'
import { ensureSecrets } from './secrets.mjs'

const folders = ['app', 'lib', 'db']
const files = [
  'next.config.ts',
  'package-lock.json',
  'postcss.config.mjs',
  'proxy.ts',
  'instrumentation.ts',
  'tsconfig.json',
]

/** Runs beside the application, never in it. */
const beside = 'db/server'

/** A hash of every source the build reads; times are not looked at, since a fresh copy has new ones. */
export function sourcesHash() {
  const hash = createHash('sha256')
  const add = (/** @type {string} */ path) => {
    hash.update(`${path}\0`)
    hash.update(readFileSync(join(root, path)))
  }
  const walk = (/** @type {string} */ folder) => {
    const entries = readdirSync(join(root, folder), { withFileTypes: true })
    for (const entry of entries.sort((a, b) => (a.name < b.name ? -1 : 1))) {
      const path = `${folder}/${entry.name}`
      if (path === beside) continue
      if (entry.isDirectory()) walk(path)
      else add(path)
    }
  }
  for (const folder of folders) walk(folder)
  for (const file of files) if (existsSync(join(root, file))) add(file)
  return hash.digest('hex')
}

/** Builds the web application unless the last build is of these very sources. */
export async function ensureBuilt() {
  await withLock(join(ensureDataFolder(), 'build.lock'), async () => {
    const stamp = join(root, '.next/built-from')
    const sources = sourcesHash()
    const built = existsSync(join(root, '.next/BUILD_ID')) && existsSync(stamp)
    if (built && readFileSync(stamp, 'utf8') === sources) return
    say('Building …')
    const status = await runChild(process.execPath, [nextProgram(), 'build'], {
      NODE_ENV: 'production',
      NEXT_TELEMETRY_DISABLED: '1',
      NEXT_SERVER_ACTIONS_ENCRYPTION_KEY: ensureSecrets().NEXT_SERVER_ACTIONS_ENCRYPTION_KEY,
    })
    if (status !== 0) throw new Obstacle(`next build failed (status ${status}). Its messages are above.`)
    writeFileSync(stamp, sources)
  })
}

export function nextProgram() {
  return join(root, 'node_modules/next/dist/bin/next')
}
