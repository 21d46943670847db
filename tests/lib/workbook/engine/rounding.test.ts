import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import { createEngine } from '@/lib/workbook/engine'
import { floorDecimal, roundDecimal } from '@/lib/workbook/engine/rounding'
import { bookJson } from '../books'
import { known, roundingCases } from './rounding-cases'

const engine = createEngine(bookJson({ Sums: {} }))

function evaluate(formula: string): unknown {
  engine.apply([{ kind: 'set-cells', sheet: 'sums', cells: [{ row: 0, column: 0, input: `=${formula}` }] }])
  return engine.value({ sheet: 'sums', row: 0, column: 0 })
}

describe('rounding the decimal value', () => {
  test.each([...roundingCases, ...known.map(([formula, ours]) => [formula, ours] as const)])(
    '[E1 E2] %s is %d',
    (formula, value) => {
      expect(evaluate(formula)).toBe(value)
    },
  )

  test('[E1] agrees with whole-number arithmetic on 15 digits, at every place', () => {
    const digits = fc.integer({ min: 1, max: 999_999_999 })
    fc.assert(
      fc.property(
        digits,
        fc.integer({ min: 0, max: 6 }),
        fc.integer({ min: 0, max: 6 }),
        (whole, scale, places) => {
          // `whole` is the number times 10^scale, so the right answer needs no binary fraction.
          const value = Number(`${whole}e-${scale}`)
          const up =
            scale <= places
              ? BigInt(whole)
              : (BigInt(whole) * 2n + 10n ** BigInt(scale - places)) / (2n * 10n ** BigInt(scale - places))
          const expected = scale <= places ? value : Number(`${up}e-${places}`)
          expect(roundDecimal(value, places, 'half')).toBe(expected)
          expect(roundDecimal(-value, places, 'half')).toBe(expected === 0 ? 0 : -expected)
        },
      ),
      { numRuns: 5000 },
    )
  })

  test('[E1] up and down enclose the value and lie at most one unit apart', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -1e9, max: 1e9, noNaN: true }),
        fc.integer({ min: -3, max: 6 }),
        (value, places) => {
          const down = Math.abs(roundDecimal(value, places, 'down'))
          const up = Math.abs(roundDecimal(value, places, 'up'))
          expect(down).toBeLessThanOrEqual(Math.abs(value) * (1 + 1e-14))
          expect(up).toBeGreaterThanOrEqual(Math.abs(value) * (1 - 1e-14))
          expect(up - down).toBeLessThanOrEqual(10 ** -places * (1 + 1e-6) + Math.abs(value) * 1e-14)
        },
      ),
      { numRuns: 3000 },
    )
  })

  test.each([
    [1e300, 400, 1e300],
    [1.5, -400, 0],
    [5e-324, 2, 0],
    [123, -3, 0],
    [523, -3, 1000],
  ])('[E1] extreme places: %d to %d is %d', (value, places, expected) => {
    expect(roundDecimal(value, places, 'half')).toBe(expected)
  })

  test('[E2] the floor of a negative number lies below it', () => {
    expect([-1.5, -1, -0.1, 0, 2.9].map(floorDecimal)).toEqual([-2, -1, -1, 0, 2])
  })
})
