import { describe, expect, test } from 'vitest'
import { parseQuantity, parseValue, type Quantity, type UnitSystem } from '@/lib/units'

type Row = readonly [text: string, quantity: Quantity, system: UnitSystem, value: number]

describe('[N3] what people type', () => {
  const rows: readonly Row[] = [
    [`12' 6 1/2"`, 'length', 'us', 150.5 / 12],
    ['12-6 1/2', 'length', 'us', 150.5 / 12],
    [`12-6 1/2"`, 'length', 'si', 3.8227],
    ['12 ft 6 1/2 in', 'length', 'us', 150.5 / 12],
    ['12ft-6in', 'length', 'us', 12.5],
    [`12'6`, 'length', 'us', 12.5],
    ['12’ 6½”', 'length', 'us', 150.5 / 12],
    [`-3' 6"`, 'length', 'us', -3.5],
    ['11-15/16', 'small-length', 'us', 11.9375],
    ['5/8', 'small-length', 'us', 0.625],
    ['2 1/2 ft', 'length', 'us', 2.5],
    ['1,250', 'length', 'us', 1250],
    [`1,250' 6"`, 'length', 'us', 1250.5],
    ['3.81 m', 'length', 'us', 12.5],
    ['381 cm', 'length', 'us', 12.5],
    ['381 cm', 'length', 'si', 3.81],
    ['3,81 m', 'length', 'si', 3.81],
    ['3,81 m', 'length', 'us', 12.5],
    ['3,81', 'length', 'si', 3.81],
    ['0,125', 'length', 'si', 0.125],
    ['1,250', 'length', 'si', 1250],
    ['1.250', 'length', 'si', 1.25],
    ['1.250,50', 'number', 'si', 1250.5],
    ['1 250,5', 'number', 'si', 1250.5],
    ['150 mm', 'length', 'si', 0.15],
    ['150 mm', 'small-length', 'si', 150],
    ['6:12', 'angle', 'us', (Math.atan(0.5) * 180) / Math.PI],
    ['6/12', 'angle', 'us', (Math.atan(0.5) * 180) / Math.PI],
    ['26.57°', 'angle', 'us', 26.57],
    ['26.57 deg', 'angle', 'si', 26.57],
    ['R-2.5', 'thermal-resistance', 'us', 2.5],
    ['R 0.44', 'thermal-resistance', 'si', 0.44],
    ['r2.5 h·ft²·°F/Btu', 'thermal-resistance', 'si', 0.44027545945],
    ['U 0.4', 'u-value', 'us', 0.4],
    ['U 0.4', 'thermal-resistance', 'us', 2.5],
    ['R-2.5', 'u-value', 'us', 0.4],
    ['R-2.5', 'u-value', 'si', 0.4],
    ['2.3 W/m2K', 'u-value', 'si', 2.3],
    ['1 BTU/hr-ft2-F', 'u-value', 'si', 5.678263341113],
    ['1 Btu/(h·°F·ft²)', 'u-value', 'us', 1],
    ['-10 °F', 'temperature', 'us', -10],
    ['-10 °F', 'temperature', 'si', -210 / 9],
    ['−10', 'temperature', 'si', -10],
    ['5 C', 'temperature', 'us', 41],
    ['300 K', 'temperature', 'si', 300 - 273.15],
    ['20 °F', 'temperature-difference', 'si', 100 / 9],
    ['$2.95/ft²', 'money-per-area', 'us', 2.95],
    ['2.95/ft2', 'money-per-area', 'us', 2.95],
    ['2.95 per sq ft', 'money-per-area', 'us', 2.95],
    ['2.95 USD/ft²', 'money-per-area', 'si', 2.95 / 0.09290304],
    ['$2.95', 'money-per-area', 'us', 2.95],
    ['-$1,250.50', 'money', 'us', -1250.5],
    ['$-3', 'money', 'us', -3],
    ['USD 12', 'money', 'us', 12],
    ['30 %', 'ratio', 'us', 0.3],
    ['0.3', 'ratio', 'us', 0.3],
    ['12,5 %', 'ratio', 'si', 0.125],
    ['1,250.50', 'number', 'us', 1250.5],
    ['1/3', 'number', 'us', 1 / 3],
    ['6.5e-5', 'expansion', 'si', 6.5e-5],
    ['6.5e-5 /K', 'expansion', 'us', 6.5e-5 / 1.8],
    ['1.440 kN/m2', 'pressure', 'si', 1.44],
    ['30 psf', 'pressure', 'si', 30 * 0.04788025898],
    ['30 lb/ft²', 'pressure', 'us', 30],
    ['90 mph', 'speed', 'us', 90],
    ['90 mph', 'speed', 'si', 40.2336],
    ['5 kW', 'heat-rate', 'si', 5000],
    ['3 kWh', 'energy', 'si', 3],
    ['2 MMBtu', 'energy', 'us', 20],
    [
      '0.018 Btu/(ft³·°F)',
      'volumetric-heat-capacity',
      'si',
      (0.018 * 1055.05585262) / 3600 / 0.028316846592 / (5 / 9),
    ],
    ['0.75 1/h', 'air-changes', 'us', 0.75],
    ['0.75 ach', 'air-changes', 'us', 0.75],
    ['6 months', 'years', 'us', 0.5],
    ['true', 'boolean', 'us', 1],
    ['No', 'boolean', 'si', 0],
    ['2030-04-15', 'date', 'us', 47588],
    ['1900-03-01', 'date', 'us', 61],
  ]
  test.each(rows)('[N3] %s as %s in %s', (text, quantity, system, value) => {
    const read = parseQuantity(text, quantity, system, { currency: 'USD' })
    if (!read.ok) throw new Error(read.failure.text)
    expect(Math.abs(read.value - value)).toBeLessThanOrEqual(1e-9 * Math.abs(value))
  })
})

describe('[N4] what is refused, and what was expected', () => {
  const length = `Expected a length such as 12' 6 1/2" or 3.81 m`
  const rows: readonly (readonly [text: string, Quantity, UnitSystem, message: string])[] = [
    ['5 °F', 'length', 'us', `${length}; °F is a temperature.`],
    ['$5', 'length', 'us', `${length}; $5 is money.`],
    ['5 USD', 'length', 'us', `${length}; USD is money.`],
    ['R-2.5', 'length', 'us', `${length}; R-2.5 is a thermal resistance.`],
    ['', 'length', 'us', `${length}.`],
    ['   ', 'length', 'us', `${length}.`],
    ['abc', 'length', 'us', `${length}.`],
    ['NaN', 'length', 'us', `${length}.`],
    ['Infinity', 'length', 'si', `${length}.`],
    ['1e999', 'length', 'si', `${length}.`],
    ['12 parsecs', 'length', 'us', `${length}; “parsecs” is no unit of it.`],
    [`12' 14"`, 'length', 'us', `${length}; inches beside feet stay below 12.`],
    [`5'-`, 'length', 'us', `${length}; the inches are missing.`],
    [`3.5' 6"`, 'length', 'us', `${length}; feet beside inches are whole.`],
    [`5" 3'`, 'length', 'us', `${length}; “5" 3'” is not a number of feet.`],
    [
      '11-15/16',
      'length',
      'us',
      `${length}; “11-15/16” could be feet or inches: write 11' 15/16" or 11 15/16".`,
    ],
    ['12-6 1/2', 'length', 'si', `${length}; “-6 1/2” is no unit of it.`],
    ['3,81', 'length', 'us', `${length}; a comma groups thousands here (1,250.5).`],
    ['1,2,3', 'number', 'si', 'Expected a number such as 1,250.50.'],
    ['1.2.3', 'number', 'si', 'Expected a number such as 1,250.50.'],
    ['1,25,000', 'number', 'us', 'Expected a number such as 1,250.50.'],
    ['5 m', 'area', 'si', 'Expected an area such as 240 ft² or 22.3 m²; m is a length.'],
    [
      'R 0',
      'u-value',
      'us',
      'Expected a U-value such as U 0.4, 2.3 W/(m²·K) or R 2.5; its reciprocal needs a number above 0.',
    ],
    ['7/5', 'angle', 'us', 'Expected an angle such as 26.57° or a pitch of 6:12; a pitch is written 6:12.'],
    ['6:0', 'angle', 'us', 'Expected an angle such as 26.57° or a pitch of 6:12.'],
    ['€5', 'money', 'us', 'Expected an amount of money such as 1,250.50; the workbook counts in USD, not €.'],
    [
      '5 EUR',
      'money',
      'us',
      'Expected an amount of money such as 1,250.50; the workbook counts in USD, not EUR.',
    ],
    [
      '2.95/kg',
      'money-per-area',
      'us',
      'Expected a price per area such as 2.95/ft² or 31.75/m²; “/kg” is no unit of it.',
    ],
    ['maybe', 'boolean', 'us', 'Expected true, false, yes or no.'],
    ['2030-02-30', 'date', 'us', 'Expected a date such as 2030-04-15.'],
  ]
  test.each(rows)('[N4] %s as %s in %s', (text, quantity, system, message) => {
    const read = parseQuantity(text, quantity, system, { currency: 'USD' })
    expect(read.ok ? read.value : read.failure.text).toBe(message)
  })

  test('[N4] an overlong text is refused before it is looked at', () => {
    expect(parseQuantity('1'.repeat(201), 'number', 'us').ok).toBe(false)
  })
})

describe('[N3] values of cells', () => {
  test.each([
    ['yes', 'boolean', true],
    ['FALSE', 'boolean', false],
    ['=not read', 'text', '=not read'],
    ['30 %', 'ratio', 0.3],
  ] as const)('[N3] %s as %s', (text, quantity, value) => {
    expect(parseValue(text, quantity, 'us')).toEqual({ ok: true, value })
  })
})
