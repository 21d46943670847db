import psychrolib from 'psychrolib'
import { afterAll, describe, expect, test, vi } from 'vitest'
import { openLive } from '../lib/estimate/compute'

vi.setConfig({ testTimeout: 60_000 })

const si = openLive({ system: 'si' })
afterAll(() => si.close())

describe('dew point against psychrolib 2.5 (ASHRAE Fundamentals 2017; over ice below freezing)', () => {
  psychrolib.SetUnitSystem(psychrolib.SI)
  test.each([-20, -5, 0.5, 5, 12, 20, 30, 40])('air of %d °C', (air) => {
    for (const humidity of [0.1, 0.3, 0.5, 0.75, 0.95, 1]) {
      si.set({ inside_night_temperature: air, inside_relative_humidity: humidity })
      const theirs = psychrolib.GetTDewPointFromRelHum(air, humidity)
      expect(Math.abs(si.number('dew_point_temperature') - theirs), `${humidity}`).toBeLessThanOrEqual(0.1)
    }
  })

  test('the humidity that starts to wet a surface has its dew point there', () => {
    for (const outside of [-25, -10, 0, 8]) {
      si.set({ inside_night_temperature: 18, outside_design_temperature: outside, roof_covering: 'GLASS-1' })
      const theirs = psychrolib.GetTDewPointFromRelHum(18, si.number('condensation_humidity'))
      expect(Math.abs(si.number('inside_surface_temperature') - theirs), `${outside}`).toBeLessThanOrEqual(
        0.1,
      )
    }
  })

  test('SC5: 40 °C at the 14 % of example 1 has a dew point of 7 °C (ASHRAE Fundamentals 2017, chapter 1; read-2)', () => {
    si.set({ inside_night_temperature: 40, inside_relative_humidity: 0.14 })
    expect(Math.abs(si.number('dew_point_temperature') - 7)).toBeLessThanOrEqual(0.5)
  })
})
