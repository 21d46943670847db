// Measures the goals of performance against raw baselines: `npm run bench`, or `npm run bench -- engine export`.
import { spawn } from 'node:child_process'
import { existsSync } from 'node:fs'
import { fileURLToPath, pathToFileURL } from 'node:url'

const root = fileURLToPath(new URL('../../', import.meta.url))
const prepare = `${root}db/server/prepare.mjs`

if (existsSync(prepare)) {
  const { ensureDependencies } = await import(pathToFileURL(prepare).href)
  await ensureDependencies(root)
}

const child = spawn(
  process.execPath,
  ['--import', 'tsx', `${root}tests/bench/main.ts`, ...process.argv.slice(2)],
  { cwd: root, stdio: 'inherit', env: { ...process.env, NEXT_TELEMETRY_DISABLED: '1' } },
)
// The child stops its own servers on these; the parent only waits for it.
for (const signal of ['SIGINT', 'SIGTERM']) process.on(signal, () => child.kill(signal))
child.on('exit', (code) => process.exit(code ?? 1))
