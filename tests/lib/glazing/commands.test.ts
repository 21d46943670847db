import { spawnSync } from 'node:child_process'
import { existsSync, mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, describe, expect, it } from 'vitest'
import type { CutsJson } from '@/lib/glazing'

const folder = mkdtempSync(join(tmpdir(), 'panewright-cuts-'))
afterAll(() => rmSync(folder, { recursive: true, force: true }))
const root = join(import.meta.dirname, '../../..')

/** As `npm run` starts it: the working folder is the project's, INIT_CWD where the command was given. */
function run(script: 'estimate' | 'cut', ...words: string[]) {
  const entry = script === 'cut' ? 'glazing/cut.node.ts' : 'estimate/estimate.node.ts'
  const { status, stdout, stderr } = spawnSync(process.execPath, ['lib/run.mjs', entry, ...words], {
    encoding: 'utf8',
    cwd: root,
    env: { ...process.env, npm_lifecycle_event: script, INIT_CWD: folder },
  })
  return { status, stdout, stderr }
}

function file(name: string, content: unknown): string {
  writeFileSync(join(folder, name), typeof content === 'string' ? content : JSON.stringify(content))
  return name
}

describe('the commands', { timeout: 90_000 }, () => {
  it('estimate --cuts writes pieces, the stock they come from and the bound, in the workbook’s length unit', () => {
    const input = file('house.json', {
      inputs: {
        unit_system: 'si',
        frame_type: 'gothic',
        frame_width: 6,
        frame_length: 12,
        eave_height: 1.5,
        ridge_height: 5.5,
        roof_covering: 'PC-TWIN-8',
      },
      openings: [{ surface: 'Left end', kind: 'door', width: 0.9, height: 2 }],
    })
    const { status, stderr } = run('estimate', '--input', input, '--cuts', 'cuts.json')
    expect([status, stderr]).toEqual([0, ''])
    const cuts: CutsJson = JSON.parse(readFileSync(join(folder, 'cuts.json'), 'utf8'))
    expect(Object.keys(cuts)).toEqual(['length_unit', 'surfaces', 'pieces', 'stock', 'profiles', 'plans'])
    expect(cuts.length_unit).toBe('m')
    expect(cuts.surfaces.map((surface) => surface.name)).toEqual([
      'Front roof',
      'Back roof',
      'Front wall',
      'Back wall',
      'Left end',
      'Right end',
    ])
    expect(cuts.surfaces[4]?.openings).toHaveLength(1)
    for (const piece of cuts.pieces) expect(cuts.stock[piece.stock]?.pieces).toContain(piece.mark)
    for (const plan of cuts.plans) expect(plan.cost).toBeGreaterThanOrEqual(plan.bound - 1e-9)
    expect(readdirSync(folder).filter((name) => name.includes('.part'))).toEqual([])
  })

  it.each([
    [
      'a covering that does not bend',
      { inputs: { frame_type: 'hoop', roof_covering: 'GLASS-1' } },
      /^Arch roof: expected a covering that bends; GLASS-1 is for flat surfaces only\.\n$/,
    ],
    [
      'an opening beyond its surface',
      { openings: [{ surface: 'Front wall', name: 'Big vent', width: 3, height: 2, along: 47, up: 1 }] },
      /^Big vent: expected room for it on Front wall, clear of other openings\.\n$/,
    ],
  ])('estimate --cuts refuses %s in one line, with exit 2, and writes nothing', (_, house, words) => {
    const input = file('refused.json', house)
    const { status, stdout, stderr } = run(
      'estimate',
      '--input',
      input,
      '--cuts',
      'never.json',
      '--xlsx',
      'never.xlsx',
    )
    expect([status, stdout]).toEqual([2, ''])
    expect(stderr).toMatch(words)
    expect(existsSync(join(folder, 'never.json'))).toBe(false)
    expect(existsSync(join(folder, 'never.xlsx'))).toBe(false)
  })

  it('cut prints a plan for a saw list that lies where the command was given', () => {
    const input = file('saw.json', {
      kerf: 0.125,
      stock: [{ length: 24, price: 10 }],
      pieces: [{ length: 7, count: 5, mark: 'rail' }],
    })
    const { status, stdout, stderr } = run('cut', '--input', input)
    expect([status, stderr]).toEqual([0, ''])
    // 7 + 7 + 7 and three cuts of an eighth leave 2.625; two bars are the least for 35 ft.
    expect(JSON.parse(stdout)).toEqual({
      bars: [
        { stock: 24, pieces: [7, 7, 7], marks: ['rail', 'rail', 'rail'], offcut: 2.625 },
        { stock: 24, pieces: [7, 7], marks: ['rail', 'rail'], offcut: 9.75 },
      ],
      cost: 20,
      waste: 13,
      bound: 20,
      proven: true,
    })
  })

  it.each([
    [
      'a piece longer than every stock',
      '{"stock":[{"length":8,"price":1}],"pieces":[{"length":9,"count":1,"mark":"A\\nB"}]}',
      /^Piece A B \(9\) is longer than every stock length \(longest 8\)\.\n$/,
    ],
    [
      'no JSON',
      '{"stock":[',
      /^Expected a JSON object with "kerf", "stock" and "pieces"; the file is not JSON\.\n$/,
    ],
    ['brackets without end', '['.repeat(500_000), /^Expected a JSON object .*\n$/],
    [
      'a size beyond numbers',
      '{"kerf":1e999,"stock":[{"length":8,"price":1}],"pieces":[{"length":9,"count":1}]}',
      /^kerf: .*\n$/,
    ],
  ])('cut refuses %s in one line, with exit 2', (_, text, words) => {
    const { status, stdout, stderr } = run('cut', '--input', file('bad.json', text))
    expect([status, stdout]).toEqual([2, ''])
    expect(stderr).toMatch(words)
  })
})
