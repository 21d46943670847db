import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import {
  convert,
  editText,
  formatQuantity,
  isNumeric,
  parseQuantity,
  type Quantity,
  quantities,
  type UnitSystem,
  unitOf,
  unitSystems,
} from '@/lib/units'

const numeric = quantities.filter(isNumeric)
const anyQuantity = fc.constantFrom<Quantity[]>(...numeric)
const anySystem = fc.constantFrom<UnitSystem[]>(...unitSystems)
const size = fc.double({ min: -1e9, max: 1e9, noNaN: true })

function read(text: string, quantity: Quantity, system: UnitSystem): number {
  const result = parseQuantity(text, quantity, system, { currency: 'USD' })
  if (!result.ok) throw new Error(`${text}: ${result.failure.text}`)
  return result.value
}

describe('[N8] laws', () => {
  test('[N8] there and back is the same number to 1e-12', () => {
    fc.assert(
      fc.property(size, anyQuantity, anySystem, (value, quantity, from) => {
        const to = from === 'us' ? 'si' : 'us'
        const back = convert(convert(value, quantity, from, to), quantity, to, from)
        expect(Math.abs(back - value)).toBeLessThanOrEqual(1e-12 * Math.max(1, Math.abs(value)))
      }),
      { numRuns: 2000 },
    )
  })

  test('[N8] a printed quantity reads back to what prints the same', () => {
    fc.assert(
      fc.property(size, anyQuantity, anySystem, (value, quantity, system) => {
        const printed = formatQuantity(value, quantity, system, { currency: 'USD' })
        const again = read(printed, quantity, system)
        expect(formatQuantity(again, quantity, system, { currency: 'USD' })).toBe(printed)
      }),
      { numRuns: 2000 },
    )
  })

  test('[N8] every sixteenth of an inch prints and reads back exactly', () => {
    fc.assert(
      fc.property(fc.integer({ min: -2_000_000, max: 2_000_000 }), (sixteenths) => {
        const inches = sixteenths / 16
        const small = formatQuantity(inches, 'small-length', 'us')
        expect(read(small, 'small-length', 'us')).toBe(inches)
        const long = formatQuantity(inches / 12, 'length', 'us')
        expect(Math.round(read(long, 'length', 'us') * 192)).toBe(sixteenths)
      }),
    )
  })

  test('[N8] every millimetre prints and reads back exactly', () => {
    fc.assert(
      fc.property(fc.integer({ min: -1_000_000, max: 1_000_000 }), (mm) => {
        expect(read(formatQuantity(mm / 1000, 'length', 'si'), 'length', 'si')).toBe(mm / 1000)
      }),
    )
  })

  test('[N8] the editor text is the number, exactly', () => {
    const any = fc.oneof(size, fc.double({ noNaN: true, noDefaultInfinity: true }))
    fc.assert(
      fc.property(any, anyQuantity, anySystem, (value, quantity, system) => {
        expect(read(editText(value, quantity, system), quantity, system)).toBe(value === 0 ? 0 : value)
      }),
      { numRuns: 3000 },
    )
  })

  test('[N8] a number beside its unit is that number', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0, max: 1e6, noNaN: true }),
        anyQuantity,
        anySystem,
        (value, quantity, system) => {
          const { symbol } = unitOf(quantity, system, 'USD')
          expect(read(`${value} ${symbol}`, quantity, system)).toBe(value)
        },
      ),
    )
  })

  test('[N8] no text makes it throw or give a number that is not one', () => {
    const text = fc.oneof(
      fc.string({ unit: 'binary', maxLength: 30 }),
      fc.string({ unit: fc.constantFrom(...`0123456789.,-'"/ :%$RUftinm²·()eE`), maxLength: 14 }),
    )
    fc.assert(
      fc.property(text, fc.constantFrom<Quantity[]>(...quantities), anySystem, (typed, quantity, system) => {
        const result = parseQuantity(typed, quantity, system, { currency: 'USD' })
        if (result.ok) expect(Number.isFinite(result.value)).toBe(true)
        else expect(result.failure.text).toMatch(/^Expected /)
      }),
      { numRuns: 4000 },
    )
  })
})
