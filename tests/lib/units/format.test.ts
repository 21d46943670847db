import { describe, expect, test } from 'vitest'
import { editText, formatQuantity, numberFormat, type Quantity, type UnitSystem, unitOf } from '@/lib/units'

describe('[N5] printed quantities', () => {
  const rows: readonly (readonly [number, Quantity, UnitSystem, string])[] = [
    [150.5 / 12, 'length', 'us', `12' 6 1/2"`],
    [24, 'length', 'us', `24' 0"`],
    [0.5, 'length', 'us', '6"'],
    [-3.5, 'length', 'us', `-3' 6"`],
    [11.999, 'length', 'us', `12' 0"`],
    [-0.001, 'length', 'us', '0"'],
    [1250, 'length', 'us', `1,250' 0"`],
    [3.81, 'length', 'si', '3.810 m'],
    [-0.0001, 'length', 'si', '0.000 m'],
    [47.875, 'small-length', 'us', '47 7/8"'],
    [0.006, 'small-length', 'us', '0.006 in'],
    [16, 'small-length', 'si', '16.0 mm'],
    [1250.55, 'area', 'si', '1,250.55 m²'],
    [26.565051, 'angle', 'us', '26.57°'],
    [-10, 'temperature', 'us', '-10.0 °F'],
    [-0, 'temperature', 'si', '0.0 °C'],
    [0.4, 'u-value', 'us', '0.400 Btu/(h·ft²·°F)'],
    [0.3, 'ratio', 'us', '30.0%'],
    [12, 'count', 'us', '12'],
    [12.5, 'count', 'us', '12.5'],
    [12.25, 'text', 'us', '12.25'],
    [6.5e-5, 'expansion', 'si', '6.50e-5 /K'],
    [0.75, 'air-changes', 'us', '0.75 /h'],
    [1, 'boolean', 'us', 'yes'],
    [47588, 'date', 'us', '2030-04-15'],
    [Number.NaN, 'area', 'us', ''],
    [Number.NEGATIVE_INFINITY, 'money', 'us', ''],
    [1250.5, 'money', 'us', '$1,250.50'],
    [-0.001, 'money', 'us', '$0.00'],
    [-3, 'money', 'us', '-$3.00'],
    [2.95, 'money-per-area', 'us', '$2.95/ft²'],
  ]
  test.each(rows)('[N5] %d as %s in %s', (value, quantity, system, text) => {
    expect(formatQuantity(value, quantity, system, { currency: 'USD' })).toBe(text)
  })

  test('[N5] digits, units and currencies as asked', () => {
    expect(formatQuantity(12.54167, 'length', 'us', { digits: 2 })).toBe('12.54 ft')
    expect(formatQuantity(3.81, 'length', 'si', { unit: false })).toBe('3.810')
    expect(formatQuantity(2.95, 'money-per-area', 'si', { currency: 'EUR', unit: false })).toBe('€2.95')
    expect(formatQuantity(1250.5, 'money', 'si', { currency: 'JPY' })).toBe('¥1,251')
    expect(formatQuantity(1250.5, 'money', 'si')).toBe('1,250.50')
    expect(formatQuantity(1250.555, 'money', 'us', { currency: 'USD', digits: 3 })).toBe('$1,250.555')
    expect(unitOf('money-per-area', 'us', 'USD').symbol).toBe('USD/ft²')
    expect(unitOf('money-per-area', 'us').symbol).toBe('/ft²')
  })
})

describe('[N6] texts for the editor', () => {
  test.each([
    [150.5 / 12, 'length', 'us', `12' 6 1/2"`],
    [12.54, 'length', 'us', '12.54'],
    [0.006, 'small-length', 'us', '0.006 in'],
    [3.81, 'length', 'si', '3.81'],
    [0.3, 'ratio', 'us', '30%'],
    [1 / 3, 'ratio', 'us', '0.3333333333333333'],
    [1250.5, 'money', 'us', '1250.5'],
    [-10, 'temperature', 'us', '-10'],
    [0, 'boolean', 'us', 'no'],
    [Number.NaN, 'number', 'us', ''],
  ] as const)('[N6] %d as %s in %s', (value, quantity, system, text) => {
    expect(editText(value, quantity, system)).toBe(text)
  })
})

describe('[N7] number format codes', () => {
  test.each([
    ['area', 'si', undefined, '#,##0.00" m²"'],
    ['area', 'si', 0, '#,##0" m²"'],
    ['length', 'us', undefined, '#,##0.000" ft"'],
    ['angle', 'us', undefined, '#,##0.00"°"'],
    ['ratio', 'us', 2, '0.00%'],
    ['money', 'us', undefined, '[$$-409]#,##0.00'],
    ['money-per-area', 'us', undefined, '[$$-409]#,##0.00"/ft²"'],
    ['count', 'us', undefined, 'General'],
    ['years', 'us', undefined, 'General" years"'],
    ['expansion', 'si', undefined, '0.00E+00" /K"'],
    ['text', 'us', undefined, '@'],
    ['date', 'us', undefined, 'yyyy-mm-dd'],
    ['boolean', 'us', undefined, 'General'],
  ] as const)('[N7] %s in %s with %s digits', (quantity, system, digits, code) => {
    expect(numberFormat(quantity, system, 'USD', digits)).toBe(code)
  })

  test('[N7] other currencies and units of a cell', () => {
    expect(numberFormat('money', 'si', 'EUR')).toBe('[$€]#,##0.00')
    expect(numberFormat('money', 'si', 'JPY')).toBe('[$¥]#,##0')
    expect(numberFormat('money', 'si', 'NOK')).toBe('[$NOK] #,##0.00')
    expect(numberFormat('number', 'us', 'USD', 1, 'gal')).toBe('#,##0.0" gal"')
    expect(numberFormat('number', 'us', 'USD', 1, 'a"b')).toBe('#,##0.0" ab"')
  })
})
