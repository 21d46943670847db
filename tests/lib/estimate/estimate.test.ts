import { describe, expect, test, vi } from 'vitest'
import { estimateNames, inOrder, templateChecks, templateInputs } from '@/lib/estimate'
import { readCommandLine } from '@/lib/estimate/command-line'
import { type EstimateReport, estimate } from '@/lib/estimate/estimate'
import { parseStrictJson } from '@/lib/estimate/strict-json'

vi.setConfig({ testTimeout: 60_000 })

function report(json: unknown): EstimateReport {
  const made = estimate(json)
  if (!made.ok) throw new Error(made.failure.text)
  made.value.engine.destroy()
  return made.value.report
}

function refusal(json: unknown): string {
  const made = estimate(json)
  if (!made.ok) return made.failure.text
  made.value.engine.destroy()
  return ''
}

const inputs = (given: Record<string, unknown>) => ({ inputs: given })
const twelve = (value: unknown, count = 12) => Array.from({ length: count }, () => value)

describe('the estimate of a request', () => {
  const blank = report({})

  test('prints every input and result of the template', () => {
    expect(blank.unit_system).toBe('us')
    const printed = Object.keys(blank.values)
    expect(estimateNames.filter((name) => !printed.includes(name))).toEqual(['unit_system'])
    expect(blank.values.frame_width).toEqual({ value: 24, unit: 'ft' })
    expect(blank.values.monthly_mean_temperature?.value).toHaveLength(12)
    expect(blank.values.waste_allowance?.unit).toBe('1')
    expect(blank.values.fuel_price).toEqual({ value: 1.3, unit: 'USD/therm' })
  })

  test('[G4] the blank template has no error; its warnings are those that its checks say', () => {
    for (const { name, severity } of templateChecks) {
      if (severity !== 'warning') expect(blank.values[name]?.value, name).toBe(inOrder)
    }
    const said = templateChecks.filter(({ name }) => blank.values[name]?.value !== inOrder)
    expect(blank.warnings.map(({ name, message, severity }) => ({ name, message, severity }))).toEqual(
      said.map(({ name, about, severity }) => ({
        name: about,
        message: blank.values[name]?.value,
        severity,
      })),
    )
  })

  test('strings carry any unit of the kind', () => {
    const { values } = report(
      inputs({
        unit_system: 'si',
        frame_width: `24'`,
        ridge_height: '14 ft',
        outside_design_temperature: '0 °F',
        knee_wall_resistance: 'R 10 h·ft²·°F/Btu',
        tax_rate: '7 %',
        currency: 'EUR',
      }),
    )
    expect(values.frame_width?.value).toBeCloseTo(7.3152, 12)
    expect(values.outside_design_temperature?.value).toBeCloseTo(-17.7777777778, 9)
    expect(values.tax_rate?.value).toBe(0.07)
    expect(values.quotation_total?.unit).toBe('EUR')
    expect(values.design_heat_loss?.unit).toBe('W')
  })

  test('[P3] an override changes the row, and a new code adds one', () => {
    const given = {
      inputs: { roof_covering: 'NEW-SHEET', side_covering: 'new-sheet' },
      overrides: {
        Coverings: {
          'NEW-SHEET': { resistance: 4, price: '$2.00/ft²' },
          'PC-TWIN-8': { resistance: 'U 0.5' },
        },
      },
    }
    const { values } = report(given)
    const plain = report({ inputs: {}, overrides: {} }).values
    expect(values.envelope_conductance?.value).toBeCloseTo((1287.97515503988 + 768) / 4 + 528 * 0.5, 6)
    expect(values.envelope_conductance?.value).not.toBe(plain.envelope_conductance?.value)
    expect(values.side_covering?.value).toBe('NEW-SHEET')
  })

  test('openings take their area out of their surface', () => {
    const { values } = report({
      openings: [
        {
          surface: 'Front roof',
          kind: 'vent',
          name: 'Ridge vent',
          width: 4,
          height: '2 ft',
          count: 3,
          u_value: 0.6,
        },
        { surface: 'left end', kind: 'door', width: '3 ft', height: 7, covering: 'PANEL-50' },
        { surface: 'Right end', width: 2, height: 2 },
      ],
    })
    expect(values.opening_area?.value).toBe(24 + 21 + 4)
    expect(values.covering_area?.value).toBeCloseTo(2583.97515503988 - 49, 8)
    const envelope = (1287.97515503988 - 24) / 2.4 + (768 + 528 - 25) / 1.7 + 24 * 0.6 + 21 / 13 + 4 / 1.7
    expect(values.envelope_conductance?.value).toBeCloseTo(envelope, 6)
  })

  test('[P1] printed totals are sums of printed lines', () => {
    const { values } = report(inputs({ markup_rate: 0.333, tax_rate: 0.0825, frame_length: 51.3 }))
    const of = (name: string): number => Number(values[name]?.value)
    const cents = (value: number): number => Math.round(value * 100)
    const cost = ['materials_cost', 'labour_cost', 'freight_cost', 'contingency_cost'].map((name) =>
      cents(of(name)),
    )
    expect(cents(of('total_cost'))).toBe(cost.reduce((a, b) => a + b, 0))
    const parts = cents(of('total_cost')) + cents(of('markup_amount')) + cents(of('tax_amount'))
    expect(cents(of('quotation_total'))).toBe(parts)
    for (const name of ['materials_cost', 'markup_amount', 'tax_amount', 'deposit_amount']) {
      expect(Math.abs(of(name) * 100 - cents(of(name)))).toBeLessThan(1e-6)
    }
    expect(of('margin_rate')).toBeCloseTo(of('markup_amount') / (of('total_cost') + of('markup_amount')), 12)
  })

  test('a text stays a text, whatever it begins with', () => {
    const { values } = report(inputs({ job_title: '=1+1', client_name: "'quoted'" }))
    expect(values.job_title?.value).toBe('=1+1')
    expect(values.client_name?.value).toBe("'quoted'")
  })
})

describe('refusals say what was expected', () => {
  const cases: readonly [string, unknown, RegExp][] = [
    ['no object', 7, /expected a json object/i],
    ['an unknown part', { input: {} }, /nearest to "input" is inputs/],
    ['a name with a slip', inputs({ frame_widht: 3 }), /nearest to "frame_widht" is frame_width/],
    ['a result set as an input', inputs({ roof_area: 3 }), /Expected a named input/],
    ['a name of the prototype', JSON.parse('{"inputs":{"__proto__":{"x":1}}}'), /Expected a named input/],
    ['a constructor', inputs({ constructor: 1 }), /Expected a named input/],
    ['a text for a length', inputs({ frame_width: 'wide' }), /frame_width: expected a length/],
    ['a list for a length', inputs({ frame_width: [3] }), /frame_width: expected a length/],
    ['nothing for a length', inputs({ frame_width: null }), /frame_width: expected a length/],
    ['an area for a length', inputs({ frame_width: '30 ft²' }), /frame_width: expected a length/],
    ['a negative size', inputs({ frame_length: -1 }), /frame_length: expected a value above/],
    ['no size', inputs({ frame_length: 0 }), /frame_length: expected a value above/],
    ['a huge number', inputs({ frame_length: 1e300 }), /frame_length: expected/],
    ['infinity', inputs({ frame_length: JSON.parse('1e999') }), /frame_length: expected a length/],
    ['not a number', inputs({ frame_length: Number.NaN }), /frame_length: expected a length/],
    ['beyond a kilometre', inputs({ unit_system: 'si', frame_length: 1000.1 }), /up to 1/],
    ['half a bay', inputs({ bay_count: 1.5 }), /bay_count: expected a whole number from 1/],
    ['too far north', inputs({ latitude: 67 }), /latitude: expected a value from/],
    ['a ratio above one', inputs({ waste_allowance: 1.1 }), /waste_allowance: expected/],
    ['a markup of a thousand', inputs({ markup_rate: 1000 }), /markup_rate: expected/],
    ['an unknown frame', inputs({ frame_type: 'gabel' }), /nearest to "gabel" is gable/],
    [
      'an unknown covering',
      inputs({ roof_covering: 'PC-TWIN-7' }),
      /a code of coverings; the nearest to "PC-TWIN-7" is PC-TWIN-/,
    ],
    ['an unknown currency', inputs({ currency: 'XXX' }), /currency: expected USD/],
    ['an unknown system', inputs({ unit_system: 'imperial' }), /unit_system: expected us or si/],
    ['eleven months', inputs({ monthly_irradiation: twelve(900, 11) }), /a list of 12 values/],
    ['thirteen months', inputs({ monthly_irradiation: twelve(900, 13) }), /a list of 12 values/],
    ['one value for twelve', inputs({ monthly_irradiation: 900 }), /a list of 12 values/],
    [
      'a bad month',
      inputs({ monthly_irradiation: [...twelve(900, 11), 'x'] }),
      /monthly_irradiation, value 12/,
    ],
    ['a text with a line break', inputs({ job_title: 'a\nb' }), /job_title: expected a text without control/],
    ['a name with a line break', inputs({ 'frame\nwidth': 1 }), /nearest to "frame width" is frame_width/],
    ['a ridge below the eave', inputs({ ridge_height: 5 }), /ridge_height: expected a ridge height above/],
    ['a knee wall above the eave', inputs({ knee_wall_height: 9 }), /knee_wall_height: expected a knee wall/],
    [
      'a low gothic arch',
      inputs({ frame_type: 'gothic', ridge_height: 12 }),
      /ridge_height: expected a gothic arch/,
    ],
    ['two bays of a lean-to', inputs({ frame_type: 'lean-to', bay_count: 2 }), /bay_count: expected one bay/],
    ['a leaning gable front', inputs({ front_wall_tilt: 70 }), /front_wall_tilt: expected an upright/],
    ['openings that are no list', { openings: {} }, /openings: expected a list/],
    ['an opening without a size', { openings: [{ surface: 'Front roof' }] }, /opening 1: expected width/],
    ['an opening nowhere', { openings: [{ surface: 'Roof', width: 1, height: 1 }] }, /nearest to "Roof" is/],
    [
      'an opening with a slip',
      { openings: [{ surface: 'Front roof', widht: 1, height: 1 }] },
      /nearest to "widht" is width/,
    ],
    [
      'an opening larger than its wall',
      { openings: [{ surface: 'Front wall', width: 100, height: 10 }] },
      /opening_area: expected openings no larger/,
    ],
    [
      'an opening of two kinds',
      { openings: [{ surface: 'Front wall', width: 1, height: 1, covering: 'GLASS-1', u_value: 1 }] },
      /either covering or u_value/,
    ],
    ['an unknown table', { overrides: { Covering: {} } }, /nearest to "Covering" is Coverings/],
    [
      'an unknown column',
      { overrides: { Coverings: { 'GLASS-1': { resistence: 1 } } } },
      /nearest to "resistence" is "resistance"/,
    ],
    [
      'a column that follows',
      { overrides: { Coverings: { 'GLASS-1': { u_value: 1 } } } },
      /expected "resistance"/,
    ],
    [
      'a resistance of nothing',
      { overrides: { Coverings: { 'GLASS-1': { resistance: 0 } } } },
      /resistance: expected a value above/,
    ],
    [
      'a new covering without a resistance',
      { overrides: { Coverings: { NEW: { price: 1 } } } },
      /expected resistance/,
    ],
    [
      'a code with a wildcard',
      { overrides: { Coverings: { 'A*': { resistance: 1 } } } },
      /expected a code of letters/,
    ],
    [
      'a prototype as a code',
      { overrides: { Coverings: JSON.parse('{"__proto__":{"resistance":1}}') } },
      /expected a code of letters/,
    ],
    [
      'a code twice',
      { overrides: { Coverings: { NEW: { resistance: 1 }, new: { resistance: 2 } } } },
      /expected/,
    ],
  ]
  test.each(cases)('%s', (_, json, expected) => {
    const text = refusal(json)
    expect(text).toMatch(expected)
    expect(text).not.toMatch(/[\n\r]/)
    expect(text.length).toBeLessThan(300)
  })

  const damaged: readonly [string, string, RegExp][] = [
    ['nothing', '', /JSON/],
    ['half an object', '{"inputs": {', /JSON/],
    ['not a number', '{"inputs": {"latitude": NaN}}', /JSON/],
    ['a name twice', '{"inputs": {"latitude": 1, "latitude": 2}}', /"latitude" is there twice/],
    [
      'a name twice, once escaped',
      '{"inputs": {"latitude": 1, "l\\u0061titude": 2}}',
      /"latitude" is there twice/,
    ],
    ['brackets without end', `${'['.repeat(200_000)}`, /levels deep/],
  ]
  test.each(damaged)('damaged JSON: %s', (_, text, expected) => {
    const read = parseStrictJson(text)
    expect(read.ok ? '' : read.failure.text).toMatch(expected)
  })
  test('well-formed JSON is read as it is', () => {
    const text = '{"a": {"b": [1, {"b": "x:{\\"y"}]}, "b": "\\\\"}'
    expect(parseStrictJson(text)).toEqual({ ok: true, value: JSON.parse(text) })
  })

  const lines: readonly [string[], RegExp][] = [
    [[], /Expected npm run --silent estimate/],
    [['--json'], /Expected npm run --silent estimate/],
    [['--input'], /a file name after --input/],
    [['--input', '--json'], /a file name after --input/],
    [['--input', 'a', '--input', 'b'], /--input once/],
    [['--input', 'a', '--json', '--json'], /--json once/],
    [['--imput', 'a'], /nearest to "--imput" is --input/],
    [['--input', 'a', 'b'], /the nearest to "b" is/],
  ]
  test.each(lines)('command line %j', (words, expected) => {
    const read = readCommandLine(words)
    expect(read.ok ? '' : read.failure.text).toMatch(expected)
  })
})

test('every input of the template has a label, a source and a default that its own limits allow', () => {
  for (const input of templateInputs) {
    expect(input.label, input.name).not.toBe('')
    expect(input.source, input.name).not.toBe('')
  }
})
