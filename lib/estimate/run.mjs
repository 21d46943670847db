// Plain Node, so that the command works before anything is installed: it sees to the modules, then runs the entry.
import { spawnSync } from 'node:child_process'
import { existsSync } from 'node:fs'
import { dirname, join } from 'node:path'
import { fileURLToPath, pathToFileURL } from 'node:url'

const here = dirname(fileURLToPath(import.meta.url))
const prepare = join(here, '..', '..', 'db', 'server', 'prepare.mjs')
if (existsSync(prepare)) {
  const { ensureDependencies } = await import(pathToFileURL(prepare).href)
  await ensureDependencies()
}
const run = spawnSync(
  process.execPath,
  ['--import', import.meta.resolve('tsx'), join(here, 'estimate.node.ts'), ...process.argv.slice(2)],
  { stdio: 'inherit' },
)
process.exitCode = run.status ?? 1
