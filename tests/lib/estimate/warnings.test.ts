import { afterAll, describe, expect, test, vi } from 'vitest'
import { buildWorkbook, overridesInUse, templateChecks, type Warning, warningsOf } from '@/lib/estimate'
import { estimate } from '@/lib/estimate/estimate'
import { openLive } from './compute'

vi.setConfig({ testTimeout: 60_000 })

const us = openLive({ system: 'us' })
afterAll(() => us.close())

const calm = {
  roof_covering: 'PC-TWIN-8',
  daily_light_target: 1,
  inside_relative_humidity: 0.2,
  purlin_spacing: 1,
  fixing_spacing: 1,
  frame_type: 'gable',
  ridge_height: 14,
}
const warnings = (): readonly Warning[] => {
  const all = us.all()
  return warningsOf(us.workbook, (name) => all.get(name))
}

describe('[D3] warnings', () => {
  test('a house with nothing wrong has none', () => {
    us.set(calm)
    expect(warnings()).toEqual([])
  })

  const cases: readonly [string, Record<string, number | string>, string, Warning['severity'], RegExp][] = [
    [
      'a bend too tight',
      { frame_type: 'hoop', ridge_height: 20, roof_covering: 'PC-TRIPLE-16', frame_width: 10 },
      'roof_covering',
      'error',
      /tighter than the covering may be bent/,
    ],
    ['purlins too wide', { purlin_spacing: 30 }, 'purlin_spacing', 'error', /wider than the screen allows/],
    ['fixings too wide', { fixing_spacing: 20 }, 'fixing_spacing', 'error', /fixings stand wider/],
    [
      'condensation',
      { inside_relative_humidity: 0.95 },
      'inside_relative_humidity',
      'warning',
      /wets inside/,
    ],
    [
      'too little light',
      { daily_light_target: 60 },
      'daily_light_target',
      'warning',
      /less light than the crop/,
    ],
    ['a clear covering', { roof_covering: 'GLASS-1' }, 'roof_covering', 'note', /is clear/],
    ['scorching', { roof_covering: 'GLASS-1' }, 'roof_covering', 'warning', /scorch/],
  ]
  test.each(cases)('%s is said, with its severity and its cell', (_, inputs, name, severity, message) => {
    us.set({ ...calm, frame_width: 24, ...inputs })
    const said = warnings().find((one) => one.name === name && message.test(one.message))
    expect(said?.severity).toBe(severity)
    const area = us.workbook.names.get(name)?.area
    const sheet = us.workbook.sheets.find(({ id }) => id === area?.sheet)
    expect(said?.cell.replaceAll("'", '')).toBe(`${sheet?.name}!B${(area?.row ?? 0) + 1}`)
    us.set({ ...calm, frame_width: 24 })
  })

  test('errors come before warnings, and warnings before notes', () => {
    us.set({ ...calm, roof_covering: 'GLASS-1', purlin_spacing: 30 })
    // Purlins so wide fail for the sheets and for the fixings; the glass sweats and scorches.
    expect(warnings().map(({ severity }) => severity)).toEqual([
      'error',
      'error',
      'warning',
      'warning',
      'note',
    ])
    us.set(calm)
  })

  test('a U-value that is typed far from its covering’s in the table is a warning', () => {
    const own = openLive({ system: 'us' })
    own.set(calm)
    const said = () =>
      warningsOf(own.workbook, (name) => own.all().get(name)).filter(({ name }) => name === 'surface_u_value')
    const u = own.numbersOf('surface_u_value')
    own.setCell('surface_u_value', 0, (u[0] ?? 0) * 1.15)
    expect(said()).toEqual([])
    own.setCell('surface_u_value', 0, (u[0] ?? 0) * 1.3)
    expect(said()).toHaveLength(1)
    expect(said()[0]).toMatchObject({ severity: 'warning', cell: 'Surfaces!O2' })
    own.close()
  })

  test('an override is a note that names table, code and column; so is a row that is added', () => {
    const made = estimate({
      inputs: { side_covering: 'NEW' },
      overrides: {
        Coverings: { 'PC-TWIN-8': { price: 2 }, NEW: { resistance: 2, price: 1 } },
        Fuels: { PROPANE: { price: 3 } },
      },
    })
    if (!made.ok) throw new Error(made.failure.text)
    made.value.engine.destroy()
    const notes = made.value.report.warnings.filter(({ severity }) => severity === 'note')
    expect(notes.map(({ name, message }) => [name, message])).toEqual([
      ['coverings', 'Coverings, PC-TWIN-8: price is overridden'],
      ['coverings', 'Coverings, NEW: a row of this job’s own'],
      ['fuels', 'Fuels, PROPANE: price is overridden'],
    ])
    expect(notes[2]?.cell).toBe('Fuels!F3')
    const plain = buildWorkbook({ system: 'si' })
    expect(plain.ok && overridesInUse(plain.value)).toEqual([])
  })

  test('every check is about a name of the workbook', () => {
    for (const { name, about } of templateChecks) expect(us.workbook.names.has(about), name).toBe(true)
  })
})
