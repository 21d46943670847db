import { spawnSync } from 'node:child_process'
import { copyFileSync, mkdirSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { dirname, join } from 'node:path'
import { describe, expect, it } from 'vitest'

const root = join(import.meta.dirname, '../..')
const biome = join(root, 'node_modules/.bin/biome')

/** A file is planted where it may not import from, and the linter has to name the rule and say what to do instead. */
const planted: readonly (readonly [path: string, source: string, words: RegExp])[] = [
  ['lib/units/planted.ts', "import { limits } from '../workbook/limits'", /lib\/units stands at the bottom/],
  ['lib/units/planted.ts', "import 'react'", /lib\/units stands at the bottom/],
  ['lib/failures.ts', "import { readFileSync } from 'node:fs'", /lib\/units stands at the bottom/],
  ['lib/glazing/planted.ts', "import { cellAt } from '../workbook'", /lib\/glazing is pure geometry/],
  ['lib/workbook/planted.ts', "import { HyperFormula } from 'hyperformula'", /engine folder alone/],
  ['lib/workbook/planted.ts', "import { buildWorkbook } from '../estimate'", /lib\/workbook is pure/],
  ['lib/workbook/engine/planted.ts', "import { buildWorkbook } from '../../estimate'", /engine is pure/],
  ['lib/estimate/planted.ts', "import { readFileSync } from 'node:fs'", /\*\.node\.ts entry/],
  ['lib/estimate/planted.ts', "import { pool } from '@/db/connection'", /lib\/estimate is pure/],
  ['lib/commands/planted.ts', "import { useState } from 'react'", /operations or a view change/],
  ['db/access/planted.ts', "import { cookies } from 'next/headers'", /db knows nothing of the web/],
  ['db/access/planted.ts', "export { auth } from '@/app/_server/auth'", /db knows nothing of the web/],
  ['app/_ui/planted.tsx', "import { buildWorkbook } from '@/lib/estimate'", /generic pieces/],
  [
    'app/(office)/workbooks/[workbookId]/_editor/planted.ts',
    "import type { Actor } from '@/db/access/members'",
    /runs in the browser/,
  ],
  [
    'app/(office)/workbooks/[workbookId]/_grid/planted.ts',
    "const loaded = import('hyperformula')\nexport { loaded }",
    /runs in the browser/,
  ],
]

/** Plants the files in a tree of their own, with the project's configuration, and lints them in one run. */
function lint(files: Readonly<Record<string, string>>): string {
  const folder = mkdtempSync(join(tmpdir(), 'planted-'))
  try {
    const { vcs: _ignoreFile, ...config } = JSON.parse(readFileSync(join(root, 'biome.json'), 'utf8'))
    writeFileSync(join(folder, 'biome.json'), JSON.stringify(config))
    copyFileSync(join(root, 'tsconfig.json'), join(folder, 'tsconfig.json'))
    for (const [path, source] of Object.entries(files)) {
      mkdirSync(dirname(join(folder, path)), { recursive: true })
      writeFileSync(join(folder, path), `${source}\n`)
    }
    const { stdout, stderr } = spawnSync(biome, ['lint', '--max-diagnostics=200', '--colors=off', '.'], {
      cwd: folder,
      encoding: 'utf8',
    })
    return `${stdout}${stderr}`
  } finally {
    rmSync(folder, { recursive: true, force: true })
  }
}

/** The part of the linter's report that is about one file. */
function about(report: string, path: string): string {
  return report
    .split(/\n(?=\S+:\d+:\d+ |\S+ \S+ ━)/)
    .filter((part) => part.trimStart().startsWith(path))
    .join('\n')
    .replace(/\s+/g, ' ')
}

const named = planted.map(
  ([path, source, words], k) => [path.replace('planted', `planted-${k}`), source, words] as const,
)

describe('folder boundaries', () => {
  const report = lint({
    ...Object.fromEntries(named.map(([path, source]) => [path, source])),
    'lib/units/good.ts': 'export const one = 1',
    'lib/units/a.ts': "import { b } from './b'\nexport const a = () => b",
    'lib/units/b.ts': "import { a } from './a'\nexport const b = () => a",
  })

  it.each(named)('[L1] %s may not hold: %s', (path, _, words) => {
    const found = about(report, path)
    expect(found).toMatch(/noRestrictedImports/)
    expect(found).toMatch(words)
  })

  it('[L2] a file without a banned import is not reported', () => {
    expect(about(report, 'lib/units/good.ts')).toBe('')
  })

  it('[L3] two modules that import each other are refused', () => {
    expect(about(report, 'lib/units/a.ts')).toMatch(/noImportCycles/)
  })
})
