import { spawnSync } from 'node:child_process'
import { mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, describe, expect, test } from 'vitest'
import { estimateNames } from '@/lib/estimate'

const folder = mkdtempSync(join(tmpdir(), 'panewright-estimate-'))
afterAll(() => rmSync(folder, { recursive: true, force: true }))
const wait = 60_000

function run(...words: string[]) {
  const { status, stdout, stderr } = spawnSync(
    process.execPath,
    ['lib/run.mjs', 'estimate/estimate.node.ts', ...words],
    { encoding: 'utf8', cwd: join(import.meta.dirname, '../../..') },
  )
  return { status, stdout, stderr }
}

function file(name: string, content: unknown): string {
  const path = join(folder, name)
  writeFileSync(path, typeof content === 'string' ? content : JSON.stringify(content))
  return path
}

describe('the estimate command', () => {
  test(
    'prints every named value as JSON and writes the workbook',
    () => {
      const out = join(folder, 'house.xlsx')
      const input = file('house.json', { inputs: { unit_system: 'si', frame_width: `30'`, ridge_height: 6 } })
      const { status, stdout, stderr } = run('--input', input, '--json', '--xlsx', out)
      expect(stderr).toBe('')
      expect(status).toBe(0)
      const printed = JSON.parse(stdout)
      expect(printed.unit_system).toBe('si')
      expect(printed.values.frame_width).toEqual({ value: 9.144, unit: 'm' })
      expect(printed.values.roof_slope_length.value).toBeGreaterThan(4.572)
      expect(Object.keys(printed.values)).toEqual(expect.arrayContaining(estimateNames.slice(0, 5)))
      expect(Array.isArray(printed.warnings)).toBe(true)
      expect(readFileSync(out).subarray(0, 2).toString()).toBe('PK')
      expect(readdirSync(folder).filter((name) => name.includes('.part'))).toEqual([])
    },
    wait,
  )

  test(
    'refuses an impossible house in one line, with exit 2, and writes nothing',
    () => {
      const out = join(folder, 'never.xlsx')
      const input = file('impossible.json', { inputs: { eave_height: 20 } })
      const { status, stdout, stderr } = run('--input', input, '--json', '--xlsx', out)
      expect([status, stdout]).toEqual([2, ''])
      expect(stderr).toMatch(/^ridge_height: expected a ridge height above the eave height\.\n$/)
      expect(readdirSync(folder)).not.toContain('never.xlsx')
    },
    wait,
  )

  test(
    'refuses what it cannot read or write in one line, with exit 2',
    () => {
      const input = file('blank.json', {})
      const cases: [string[], RegExp][] = [
        [['--input', join(folder, 'missing.json')], /^Expected a JSON file in UTF-8 that can be read: .*\n$/],
        [['--input', file('damaged.json', '{"inputs":')], /^Expected a JSON file.*\n$/],
        [['--input', input, '--xlsx', join(folder, 'no/such/folder/a.xlsx')], /^Expected a place .*\n$/],
        [['--input', input, '--xml'], /^Expected npm run .* nearest to "--xml" is --xlsx\.\n$/],
      ]
      for (const [words, expected] of cases) {
        const { status, stdout, stderr } = run(...words)
        expect([status, stdout]).toEqual([2, ''])
        expect(stderr).toMatch(expected)
      }
    },
    wait,
  )
})
