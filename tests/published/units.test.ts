import { describe, expect, test } from 'vitest'
import { convert, parseQuantity, type Quantity, unitOf } from '@/lib/units'

/**
 * Conversion factors of NIST Special Publication 811 (2008), appendix B.8 and B.9.
 * Status: values from memory, each re-derived here from the exact definitions of foot, pound, pound-force and Btu(IT).
 */
describe('[N1] factors agree with NIST SP 811', () => {
  const foot = 0.3048
  const btu = 1055.05585262
  const cases: readonly (readonly [
    Quantity,
    us: string,
    number,
    si: string,
    derived: number,
    printed: number,
  ])[] = [
    ['length', 'ft', 1, 'm', foot, 0.3048],
    ['small-length', 'in', 1, 'mm', 25.4, 25.4],
    ['area', 'ft²', 1, 'm²', foot ** 2, 0.09290304],
    ['volume', 'ft³', 1, 'm³', foot ** 3, 0.028316846592],
    ['mass', 'lb', 1, 'kg', 0.45359237, 0.45359237],
    ['pressure', 'psf', 1, 'kPa', 4.4482216152605 / foot ** 2 / 1000, 0.04788025898],
    ['speed', 'mph', 1, 'm/s', 1609.344 / 3600, 0.44704],
    ['u-value', 'Btu/(h·ft²·°F)', 1, 'W/(m²·K)', btu / 3600 / foot ** 2 / (5 / 9), 5.678263341],
    ['thermal-resistance', 'h·ft²·°F/Btu', 1, 'm²·K/W', ((3600 / btu) * foot ** 2 * 5) / 9, 0.1761101838],
    ['heat-rate', 'Btu/h', 1, 'W', btu / 3600, 0.29307107],
    ['irradiation', 'Btu/ft²', 1, 'kWh/m²', btu / foot ** 2 / 3.6e6, 11356.5267 / 3.6e6],
    ['linear-conductance', 'Btu/(h·ft·°F)', 1, 'W/(m·K)', btu / 3600 / foot / (5 / 9), 1.730734666],
    ['mass-per-area', 'lb/ft²', 1, 'kg/m²', 0.45359237 / foot ** 2, 4.882427636],
    // The therm here is 10^5 Btu(IT), which the publication calls therm (EC): 105.505585 MJ.
    ['energy', 'therm', 1, 'kWh', (1e5 * btu) / 3.6e6, 105.505585 / 3.6],
    ['temperature-difference', '°F', 1, 'K', 5 / 9, 5 / 9],
  ]
  test.each(cases)('[N1] %s: %s', (quantity, us, value, si, derived, printed) => {
    expect(unitOf(quantity, 'us').symbol).toBe(us)
    expect(unitOf(quantity, 'si').symbol).toBe(si)
    const converted = convert(value, quantity, 'us', 'si')
    expect(Math.abs(converted / derived - 1)).toBeLessThan(4e-16)
    expect(Math.abs(converted / printed - 1)).toBeLessThan(5e-9)
  })

  test('[N1] 1 kWh is 3412.14163 Btu, 1 US gallon 3.785411784 L', () => {
    const btuOfKwh = convert(1, 'energy', 'si', 'us') * 1e5
    expect(btuOfKwh).toBeCloseTo(3412.14163, 5)
    const gallon = parseQuantity('1 gal', 'volume', 'si')
    expect(gallon).toEqual({ ok: true, value: 0.003785411784 })
  })

  test('[N1] the scales of temperature meet at their fixed points exactly', () => {
    expect(convert(32, 'temperature', 'us', 'si')).toBe(0)
    expect(convert(212, 'temperature', 'us', 'si')).toBe(100)
    expect(convert(-40, 'temperature', 'us', 'si')).toBe(-40)
    expect(convert(100, 'temperature', 'si', 'us')).toBe(212)
  })
})

/** Tape and drawing notation; values computed from 1 in = 25.4 mm exactly. */
describe('[N2] feet and inches', () => {
  test.each([
    [`12'-6 1/2"`, 150.5, 3822.7],
    [`5' 11-15/16"`, 71.9375, 1827.2125],
    [`47 7/8"`, 47.875, 1216.025],
    [`24'`, 288, 7315.2],
    [`3.5'`, 42, 1066.8],
    [`6'1/16"`, 72.0625, 1830.3875],
  ])('[N2] %s', (text, inches, millimetres) => {
    expect(parseQuantity(text, 'small-length', 'us')).toEqual({ ok: true, value: inches })
    expect(parseQuantity(text, 'small-length', 'si')).toEqual({ ok: true, value: millimetres })
    const feet = parseQuantity(text, 'length', 'us')
    expect(feet.ok && feet.value * 12).toBeCloseTo(inches, 12)
  })

  test.each([`12' 14"`, `1/0"`, `5'-`, `6 3/5'`])('[N2] %s is refused', (text) => {
    for (const system of ['us', 'si'] as const) {
      const read = parseQuantity(text, 'length', system)
      expect(read.ok).toBe(false)
      expect(!read.ok && read.failure.text).toContain(`Expected a length such as 12' 6 1/2" or 3.81 m`)
    }
  })
})
