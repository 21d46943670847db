import { afterAll, describe, expect, test, vi } from 'vitest'
import { openLive } from '../lib/estimate/compute'

vi.setConfig({ testTimeout: 60_000 })

const si = openLive({ system: 'si' })
afterAll(() => si.close())

describe('[L1] daily light', () => {
  test.each([
    ['SL1: a micromole a second for 24 h is 0.0864 mol (Purdue HO-238-W; read)', 0.0864, 24, 1],
    ['SL2: 300 µmol for 16 h are 17.28 mol (arithmetic; computed)', 17.28, 16, 300],
  ])('%s', (_, light, hours, flux) => {
    si.set({ light_shortfall: light, lamp_hours: hours })
    expect(si.number('lamp_photon_flux')).toBeCloseTo(flux, 10)
  })

  test('SL5: a clear summer day of 25 to 29 MJ/m² is 50 to 60 mol outside (supplier page, read; the days from memory)', () => {
    const outside = (megajoules: number): number => {
      si.set({ monthly_irradiation: Array.from({ length: 12 }, () => megajoules / 3.6) })
      return si.numbers('outside_daily_light')[6] ?? 0
    }
    expect(outside(25)).toBeGreaterThanOrEqual(50)
    expect(outside(29)).toBeLessThanOrEqual(60)
  })

  test.each([
    ['FOLIAGE', 5, 10],
    ['BEDDING', 10, 15],
    ['GERANIUM', 12, 20],
    ['LETTUCE', 12, 17],
    ['TOMATO', 20, 30],
  ])('SL6: %s asks for %d to %d mol a day (Purdue HO-238-W; Cornell CEA; from memory)', (crop, low, high) => {
    si.set({ crop })
    expect(si.number('daily_light_target')).toBeGreaterThanOrEqual(low)
    expect(si.number('daily_light_target')).toBeLessThanOrEqual(high)
  })
})
