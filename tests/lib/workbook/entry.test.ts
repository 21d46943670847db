import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import { type CellFormat, displayText, editText, parseEntry } from '@/lib/workbook'

const length: CellFormat = { quantity: 'length' }

describe('typing into a cell', () => {
  test.each<[string, CellFormat | undefined, unknown]>([
    ['', undefined, null],
    ['   ', length, null],
    ['=A1+1', undefined, '=A1+1'],
    [' =A1+1 ', length, '=A1+1'],
    ["'=A1", undefined, "'=A1"],
    ["'12", undefined, '12'],
    ["''x", undefined, "''x"],
    ['12', undefined, 12],
    ['-12.5', undefined, -12.5],
    ['1e3', undefined, 1000],
    ['12%', undefined, 0.12],
    ['1,234.50', undefined, 1234.5],
    ['-0', undefined, 0],
    ['007', undefined, '007'],
    ['1.2.3', undefined, '1.2.3'],
    ['3/4/2026', undefined, '3/4/2026'],
    ['TRUE', undefined, true],
    ['false', undefined, false],
    ['north wall', undefined, 'north wall'],
    ['#REF!', undefined, '#REF!'],
    ['12\' 6"', length, 12.5],
    ['3 ft', length, 3],
    ['12', { quantity: 'text' }, '12'],
    ['yes', { quantity: 'boolean' }, true],
    ['30%', { quantity: 'ratio' }, 0.3],
    ['GABLE', { choices: ['gable', 'hoop'] }, 'gable'],
  ])('[W21 W22 W23] %j into %j is %j', (text, format, input) => {
    expect(parseEntry(text, format, 'us', 'USD')).toEqual({ ok: true, value: input })
  })

  test.each<[string, CellFormat | undefined, RegExp]>([
    ['=', undefined, /after =/],
    [`=${'('.repeat(65)}1${')'.repeat(65)}`, undefined, /65 deep; at most 64/],
    ['wide', length, /Expected/],
    ['barn', { choices: ['gable', 'hoop'] }, /one of gable, hoop; found barn/],
    ['x'.repeat(40_000), undefined, /32767/],
  ])('[W21 W22] refuses %.20j with words', (text, format, words) => {
    const read = parseEntry(text, format, 'us')
    expect(read.ok).toBe(false)
    if (!read.ok) expect(read.failure.text).toMatch(words)
  })

  test('[W24] what the editor opens with reads back to the same input', () => {
    const input = fc.oneof(
      fc
        .double({ noNaN: true, noDefaultInfinity: true, min: -1e12, max: 1e12 })
        .map((n) => (n === 0 ? 0 : n)),
      fc.integer(),
      fc.boolean(),
      fc.string({ minLength: 1 }).filter((text) => text.trim() === text && !/^['=]/.test(text)),
      fc.constantFrom('12', 'true', '5%', "'=x", '0,5', '1 234', '=A1', "''"),
    )
    const format = fc.constantFrom<CellFormat | undefined>(undefined, { quantity: 'text' })
    fc.assert(
      fc.property(input, format, fc.constantFrom('us' as const, 'si' as const), (value, form, system) => {
        if (form && typeof value !== 'string') return
        expect(parseEntry(editText(value, form, system), form, system)).toEqual({ ok: true, value })
      }),
      { numRuns: 2000 },
    )
  })

  test('[W24] numbers of every kind open as a text that reads back', () => {
    const format = fc.constantFrom<CellFormat>(
      length,
      { quantity: 'money' },
      { quantity: 'ratio' },
      { quantity: 'temperature' },
      { quantity: 'u-value' },
    )
    fc.assert(
      fc.property(
        fc.integer({ min: 0, max: 1e7 }),
        format,
        fc.constantFrom('us' as const, 'si' as const),
        (n, form, system) => {
          const value = n / 1000
          expect(parseEntry(editText(value, form, system), form, system)).toEqual({ ok: true, value })
        },
      ),
    )
  })
})

describe('showing a value', () => {
  test.each([
    [null, undefined, ''],
    [{ error: '#N/A', text: 'A value is not available.' }, length, '#N/A'],
    [true, undefined, 'TRUE'],
    [false, { quantity: 'boolean' as const }, 'no'],
    ['text', length, 'text'],
    [1234.5, undefined, '1,234.5'],
    [0.3, { quantity: 'ratio' as const, digits: 0 }, '30%'],
    [3, { unit: 'gal' }, '3 gal'],
  ])('[W22] %j as %j shows %j', (value, format, text) => {
    expect(displayText(value, format, 'us', 'USD')).toBe(text)
  })
})
