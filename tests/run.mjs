import { spawnSync } from 'node:child_process'
import { mkdtempSync, readFileSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { ensureDependencies, ensurePackages } from '../db/server/prepare.mjs'
import { root, runMain } from '../db/server/project.mjs'

/** `npm test`: lint, types and every test; the last line says how many passed, failed and were skipped. */
runMain(async () => {
  await ensureDependencies()
  await ensurePackages(['postgresql', 'chromium', 'libreoffice-calc', 'poppler-utils'])
  let failed = 0
  for (const [what, ...command] of [
    ['lint', 'node_modules/@biomejs/biome/bin/biome', 'ci', '.'],
    ['typecheck', 'node_modules/typescript/bin/tsc', '--noEmit'],
    ['typecheck of lib', 'node_modules/typescript/bin/tsc', '-p', 'lib'],
  ]) {
    const ok = node(command) === 0
    console.log(`${what}: ${ok ? 'in order' : 'FAILED'}\n`)
    if (!ok) failed += 1
  }
  const counts = runTests()
  failed += counts.failed
  console.log(`${counts.passed} passed, ${failed} failed, ${counts.skipped} skipped`)
  process.exitCode = failed > 0 ? 1 : 0
})

/** Arguments after `--` go to vitest. Its reporter leaves the counts in a file, so that this can have the last word. */
function runTests() {
  const folder = mkdtempSync(join(tmpdir(), 'panewright-counts-'))
  const file = join(folder, 'counts.json')
  try {
    const status = node(['node_modules/vitest/vitest.mjs', 'run', ...process.argv.slice(2)], {
      COUNTS_FILE: file,
    })
    const counts = readCounts(file)
    // Whatever ended the run early is a failure, even if no test could say so.
    if (status !== 0 && counts.failed === 0) counts.failed = 1
    return counts
  } finally {
    rmSync(folder, { recursive: true, force: true })
  }
}

function readCounts(/** @type {string} */ file) {
  try {
    return JSON.parse(readFileSync(file, 'utf8'))
  } catch {
    return { passed: 0, failed: 1, skipped: 0 }
  }
}

function node(/** @type {string[]} */ args, env = {}) {
  const [program = '', ...rest] = args
  const options = {
    cwd: root,
    stdio: 'inherit',
    env: { ...process.env, NEXT_TELEMETRY_DISABLED: '1', VITE_CONFIG_NATIVE_IGNORE_WARNING: 'true', ...env },
  }
  return spawnSync(process.execPath, [join(root, program), ...rest], /** @type {any} */ (options)).status ?? 1
}
