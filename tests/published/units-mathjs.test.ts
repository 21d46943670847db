import { unit } from 'mathjs'
import { describe, expect, test } from 'vitest'
import { convert, type Quantity } from '@/lib/units'

/**
 * Conversions against mathjs 15, by the units that it knows. Its Btu is the International Table's to ten figures; its
 * temperatures and its foot, pound and mile are exact.
 */
const cases: readonly (readonly [Quantity, us: string, si: string, tolerance: number])[] = [
  ['length', 'ft', 'm', 1e-14],
  ['small-length', 'in', 'mm', 1e-14],
  ['area', 'ft^2', 'm^2', 1e-14],
  ['volume', 'ft^3', 'm^3', 1e-14],
  ['angle', 'deg', 'deg', 1e-14],
  ['mass', 'lbm', 'kg', 1e-14],
  ['speed', 'mi/h', 'm/s', 1e-14],
  ['pressure', 'lbf/ft^2', 'kPa', 1e-12],
  ['mass-per-area', 'lbm/ft^2', 'kg/m^2', 1e-14],
  ['heat-rate', 'BTU/h', 'W', 1e-9],
  ['conductance', 'BTU/(h degR)', 'W/K', 1e-9],
  ['u-value', 'BTU/(h ft^2 degR)', 'W/(m^2 K)', 1e-9],
  ['linear-conductance', 'BTU/(h ft degR)', 'W/(m K)', 1e-9],
  ['volumetric-heat-capacity', 'BTU/(ft^3 degR)', 'W h/(m^3 K)', 1e-9],
  ['heat-capacity', 'BTU/degR', 'kW h/K', 1e-9],
  ['irradiation', 'BTU/ft^2', 'kW h/m^2', 1e-9],
  ['temperature-difference', 'degR', 'K', 1e-14],
  ['expansion', 'degR^-1', 'K^-1', 1e-14],
]

describe('[N1] conversions agree with mathjs', () => {
  test.each(cases)('%s: %s in %s', (quantity, us, si, tolerance) => {
    for (const value of [1, 0.37, 12_345.678]) {
      const theirs = unit(value, us).toNumber(si)
      expect(Math.abs(convert(value, quantity, 'us', 'si') / theirs - 1)).toBeLessThanOrEqual(tolerance)
      expect(Math.abs(convert(theirs, quantity, 'si', 'us') / value - 1)).toBeLessThanOrEqual(tolerance)
    }
  })

  test('energy: 10⁵ BTU in kW h; resistance turns the other way', () => {
    const therm = unit(1e5, 'BTU').toNumber('kW h')
    expect(Math.abs(convert(1, 'energy', 'us', 'si') / therm - 1)).toBeLessThanOrEqual(1e-9)
    const resistance = unit(1, 'h ft^2 degR/BTU').toNumber('m^2 K/W')
    expect(Math.abs(convert(1, 'thermal-resistance', 'us', 'si') / resistance - 1)).toBeLessThanOrEqual(1e-9)
  })

  test.each([-40, 0, 32, 65, 212])('temperature: %d °F', (value) => {
    const theirs = unit(value, 'degF').toNumber('degC')
    expect(convert(value, 'temperature', 'us', 'si')).toBeCloseTo(theirs, 10)
  })
})
