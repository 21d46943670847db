// Plain Node, so that a command works before anything is installed: it sees to the modules, then runs the entry
// named first (a file of lib) with the words after it.
import { spawnSync } from 'node:child_process'
import { existsSync } from 'node:fs'
import { dirname, join } from 'node:path'
import { fileURLToPath, pathToFileURL } from 'node:url'

const here = dirname(fileURLToPath(import.meta.url))
const prepare = join(here, '..', 'db', 'server', 'prepare.mjs')
if (existsSync(prepare)) {
  const { ensureDependencies } = await import(pathToFileURL(prepare).href)
  await ensureDependencies()
}
const [entry = '', ...words] = process.argv.slice(2)
const run = spawnSync(
  process.execPath,
  ['--import', import.meta.resolve('tsx'), join(here, entry), ...words],
  {
    stdio: 'inherit',
  },
)
process.exitCode = run.status ?? 1
