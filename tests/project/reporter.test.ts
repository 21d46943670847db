import { spawnSync } from 'node:child_process'
import { mkdirSync, mkdtempSync, rmSync, symlinkSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { expect, test } from 'vitest'
import { root } from '@/db/server/project.mjs'

const good = "import { test, expect } from 'vitest'\ntest('a', () => expect(1).toBe(1))\n"

/** Runs vitest on files of its own with the project's reporter; gives the last line and the status. */
function runOn(files: Record<string, string>): { last: string | undefined; status: number | null } {
  const folder = mkdtempSync(join(tmpdir(), 'panewright-reporter-'))
  try {
    symlinkSync(join(root, 'node_modules'), join(folder, 'node_modules'))
    mkdirSync(join(folder, 'files'))
    for (const [name, text] of Object.entries(files)) writeFileSync(join(folder, 'files', name), text)
    const reporter = join(root, 'tests/_support/reporter.ts')
    writeFileSync(
      join(folder, 'vitest.config.mjs'),
      `export default { test: { reporters: ['default', '${reporter}'] } }`,
    )
    const { COUNTS_FILE: _, ...env } = process.env
    const run = spawnSync(process.execPath, [join(root, 'node_modules/vitest/vitest.mjs'), 'run'], {
      cwd: folder,
      encoding: 'utf8',
      env,
    })
    return { last: run.stdout.trimEnd().split('\n').at(-1), status: run.status }
  } finally {
    rmSync(folder, { recursive: true, force: true })
  }
}

test.each([
  [
    'all good',
    { 'a.test.js': good, 'b.test.js': `${good}test.skip('s', () => {})` },
    '2 passed, 0 failed, 1 skipped',
    0,
  ],
  [
    'one wrong',
    { 'a.test.js': `${good}test('b', () => expect(1).toBe(2))` },
    '1 passed, 1 failed, 0 skipped',
    1,
  ],
  [
    'a file that cannot be loaded',
    { 'a.test.js': good, 'b.test.js': "import './none'" },
    '1 passed, 1 failed, 0 skipped',
    1,
  ],
  [
    'an error outside of tests',
    { 'a.test.js': `${good}Promise.reject(new Error('loose'))` },
    '1 passed, 1 failed, 0 skipped',
    1,
  ],
])('%s: the last line counts it', (_what, files, last, status) => {
  expect(runOn(files)).toEqual({ last, status })
})
