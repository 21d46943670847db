import { describe, expect, test, vi } from 'vitest'
import { buildWorkbook, type WorkbookRequest } from '@/lib/estimate'
import { convert } from '@/lib/units'
import { compute, openLive } from './compute'

vi.setConfig({ testTimeout: 60_000 })

describe('[P3] what a code fills in', () => {
  test('a place fills the climate, and what is typed stays', () => {
    const request: WorkbookRequest = {
      system: 'us',
      inputs: { site_code: 'highbarrow', ground_snow_load: 44 },
    }
    compute(request, ({ number, numbers }) => {
      expect(number('latitude')).toBe(42.6)
      expect(number('site_elevation')).toBe(1900)
      expect(number('outside_design_temperature')).toBe(-14)
      expect(number('basic_wind_speed')).toBe(115)
      expect(number('ground_snow_load')).toBe(44)
      expect(numbers('monthly_mean_temperature')[6]).toBe(67)
      expect(numbers('monthly_irradiation')[11]).toBe(440)
    })
    const metric = compute({ system: 'si', inputs: { site_code: 'HIGHBARROW' } }, ({ number, numbers }) => [
      number('outside_design_temperature'),
      number('ground_snow_load'),
      numbers('monthly_irradiation')[0],
    ])
    expect(metric[0]).toBeCloseTo(-230 / 9, 10)
    expect(metric[1]).toBeCloseTo(convert(60, 'pressure', 'us', 'si'), 10)
    expect(metric[2]).toBeCloseTo(convert(540, 'irradiation', 'us', 'si'), 10)
  })

  test('a place of the job’s own has to say its climate', () => {
    const built = buildWorkbook({
      system: 'us',
      inputs: { site_code: 'HERE' },
      overrides: { Sites: { HERE: { latitude: 44, design_temperature: -5, ground_snow_load: 40 } } },
    })
    expect(built.ok ? '' : built.failure.text).toBe(
      'Sites HERE: expected wind_speed, because the row is new.',
    )
  })

  test('[H2] the heater is the smallest size that is enough, and several where the largest is not', () => {
    const live = openLive({ system: 'us', overrides: { Heaters: { 'UNIT-110': { output: 110_000 } } } })
    for (const [loss, count, size] of [
      [0, 1, 30_000],
      [79_900, 1, 100_000],
      [80_000, 1, 100_000],
      [80_100, 1, 110_000],
      [320_000, 1, 400_000],
      [321_000, 2, 250_000],
      [1_000_000, 4, 350_000],
    ]) {
      live.set({ design_heat_loss: loss ?? 0, heater_allowance: 0.25 })
      expect([live.number('heater_count'), live.number('heater_size')], `${loss}`).toEqual([count, size])
    }
    live.close()
  })

  test('[P5] carriage is a charge and a rate by zone, and steps for long sheets', () => {
    const live = openLive({ system: 'us', inputs: { side_covering: 'FILM-1', end_covering: 'FILM-1' } })
    const cents = (value: number): number => Math.round(value * 100) / 100
    for (const [zone, charge, rate] of [
      ['NEAR', 95, 0.2],
      ['FAR', 290, 0.6],
    ] as const) {
      live.set({ freight_zone: zone, roof_covering: 'FILM-2' })
      expect(live.number('longest_carried')).toBe(0)
      expect(live.number('freight_cost')).toBe(cents(charge + cents(rate * live.number('sheet_weight'))))
    }
    // Twelve feet is not over twelve.
    for (const [covering, length, adds] of [
      ['PC-CORR', 12, 0],
      ['ACRYL-TWIN-16', undefined, undefined],
      ['PC-TRIPLE-16', 24, 210],
    ] as const) {
      live.set({ roof_covering: covering })
      const carried = live.number('longest_carried')
      expect(carried).toBe(length ?? carried)
      const steps = [12, 16, 20].map((over, step) => (carried > over ? [60, 60, 90][step] : 0) ?? 0)
      expect(live.number('long_load_charge')).toBe(adds ?? steps.reduce((sum, one) => sum + one, 0))
    }
    live.set({ freight_zone: 'COLLECTED' })
    expect(live.number('freight_cost')).toBe(0)
    live.close()
  })

  test('[P1] the total is rounded to the step, and the rounding is a line of its own', () => {
    const live = openLive({ system: 'us' })
    const sum = live.number('total_cost') + live.number('markup_amount') + live.number('tax_amount')
    expect(live.number('rounding_amount')).toBe(0)
    expect(live.number('quotation_total')).toBeCloseTo(sum, 9)
    for (const step of [0.05, 1, 5, 10, 100]) {
      live.set({ rounding_step: step })
      expect(live.number('quotation_total')).toBeCloseTo(Math.round(sum / step) * step, 9)
      expect(live.number('rounding_amount')).toBeCloseTo(live.number('quotation_total') - sum, 9)
      expect(Math.abs(live.number('rounding_amount'))).toBeLessThanOrEqual(step / 2 + 1e-9)
    }
    live.close()
  })
})

describe('the allowable purlin spacing', () => {
  const load = { 'span 1': 0.5, 'load 1': 4, 'span 2': 1, 'load 2': 2, 'span 3': 1.5, 'load 3': 0.5 }
  const live = openLive({ system: 'si', overrides: { 'Allowable loads': { 'PC-TRIPLE-16': load } } })
  test.each([
    [0.25, 1.5, 'beyond the longest span nothing is said'],
    [0.5, 1.5, 'the last point'],
    [1.25, 1.25, 'between the second and the third'],
    [2, 1, 'the second point'],
    [3, 0.75, 'between the first and the second'],
    [4, 0.5, 'the first point'],
    [8, 0.25, 'above the first load'],
  ])('[P6] at %d kPa the table of loads allows %d m: %s', (pressure, spacing) => {
    live.set({ roof_design_pressure: pressure })
    expect(live.number('table_spacing')).toBeCloseTo(spacing, 12)
  })
  test('[P6] the smallest governs, and says which', () => {
    live.set({ roof_design_pressure: 2 })
    expect(live.text('spacing_governed_by')).toBe('table of loads')
    expect(live.number('allowable_purlin_spacing')).toBeCloseTo(1, 12)
    live.setRow('coverings', 'PC-TRIPLE-16', 'span by stiffness', 0.8)
    expect(live.text('spacing_governed_by')).toBe('stiffness')
    expect(live.number('allowable_purlin_spacing')).toBe(live.number('stiffness_spacing'))
    live.setRow('coverings', 'PC-TRIPLE-16', 'span by strength', 0.2)
    expect(live.text('spacing_governed_by')).toBe('strength')
    live.set({ roof_covering: 'PC-TWIN-8' })
    expect(live.number('table_spacing')).toBe(0)
    expect(live.text('spacing_governed_by')).toBe('stiffness')
    live.close()
  })
})
