import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { slantedKerf } from '@/lib/glazing/cutting/arrange'
import { loadIntegerProgram } from '@/lib/glazing/cutting/highs.node'
import type { SheetPiece } from '@/lib/glazing/cutting/problem'
import { cutSheets, type SheetStock } from '@/lib/glazing/cutting/sheets'

const kerf = 0.125
const width = 48

const pieces = fc
  .array(
    fc.record({
      width: fc.constantFrom(48, 47.5, 30, 23.9, 18, 12),
      length: fc.integer({ min: 20, max: 140 }),
      rise: fc.constantFrom(0, 0, 1, -1),
    }),
    { minLength: 1, maxLength: 6 },
  )
  .map((list) =>
    list.map(({ rise, ...piece }, i): SheetPiece => {
      const mark = `P${i}`
      const slanted = rise * piece.width * 0.4
      return rise === 0 || piece.length <= Math.abs(slanted)
        ? { mark, ...piece }
        : { mark, ...piece, rise: slanted }
    }),
  )
const stock: readonly SheetStock[] = [
  { width, length: 144, price: 41 },
  { width, length: 192, price: 55.5 },
]

/** Every way to part a list into groups. */
function partitions<T>(list: readonly T[]): T[][][] {
  const [first, ...rest] = list
  if (first === undefined) return [[]]
  return partitions(rest).flatMap((groups) => [
    [[first], ...groups],
    ...groups.map((_, i) => groups.map((group, k) => (k === i ? [first, ...group] : group))),
  ])
}

/** What a pair of one slope saves in this job: the least rise of the slope, as the rule says. */
function saving(all: readonly SheetPiece[], a: SheetPiece, b: SheetPiece): number {
  const slope = (one: SheetPiece) => ((one.rise ?? 0) / one.width).toFixed(6)
  if (!a.rise || !b.rise || slope(a) !== slope(b)) return 0
  const alike = all.filter((one) => one.rise && slope(one) === slope(a))
  return Math.min(
    ...alike.map((one) => Math.abs(one.rise ?? 0) - slantedKerf(one.width, one.rise ?? 0, kerf) + kerf),
  )
}

/** Shortest levels that hold the pieces, each with the saw cut after it; tried over all groupings. */
function shortest(all: readonly SheetPiece[], some: readonly SheetPiece[]): number {
  let least = Number.POSITIVE_INFINITY
  for (const groups of partitions(some)) {
    let length = 0
    for (const group of groups) {
      const [a, b] = group
      const abreast = group.reduce((sum, one) => sum + one.width + kerf, -kerf)
      const nested = a && b && group.length === 2 ? saving(all, a, b) : 0
      if (abreast <= width) length += Math.max(...group.map((one) => one.length)) + kerf
      else if (a && b && nested > 0) length += a.length + b.length + 2 * kerf - nested
      else length = Number.POSITIVE_INFINITY
    }
    least = Math.min(least, length)
  }
  return least
}

/** The least cost over all ways to share the pieces out among sheets. */
function exhaustive(all: readonly SheetPiece[]): number {
  const full = 2 ** all.length - 1
  const priceOf = Array.from({ length: full + 1 }, (_, mask) => {
    const length = shortest(
      all,
      all.filter((__, i) => (mask >> i) % 2 === 1),
    )
    return stock.reduce(
      (least, sheet) => (length <= sheet.length + kerf + 1e-9 ? Math.min(least, sheet.price) : least),
      Number.POSITIVE_INFINITY,
    )
  })
  const least = new Array<number>(full + 1).fill(Number.POSITIVE_INFINITY)
  least[0] = 0
  for (let mask = 1; mask <= full; mask += 1)
    for (let part = mask; part > 0; part = (part - 1) & mask)
      least[mask] = Math.min(least[mask] ?? 0, (priceOf[part] ?? 0) + (least[mask ^ part] ?? 0))
  return least[full] ?? 0
}

describe('the bound of a sheet plan', { timeout: 60_000 }, () => {
  it('[C12] is at most the least cost that trying everything finds; what is called proven is that cost', async () => {
    const integerProgram = await loadIntegerProgram()
    let proven = 0
    fc.assert(
      fc.property(pieces, (list) => {
        const plan = cutSheets(list, stock, kerf, integerProgram)
        if (!plan.ok) throw new Error(plan.failure.text)
        const optimum = exhaustive(list)
        expect(plan.value.bound).toBeLessThanOrEqual(optimum + 1e-6)
        expect(plan.value.cost).toBeGreaterThanOrEqual(optimum - 1e-6)
        if (plan.value.proven) {
          proven += 1
          expect(plan.value.cost).toBeCloseTo(optimum, 6)
        }
      }),
      { numRuns: 120, seed: 5 },
    )
    expect(proven).toBeGreaterThan(60)
  })

  it('[C12] holds where no integer program proves it', () => {
    fc.assert(
      fc.property(pieces, (list) => {
        const plan = cutSheets(list, stock, kerf)
        if (!plan.ok) throw new Error(plan.failure.text)
        expect(plan.value.bound).toBeLessThanOrEqual(exhaustive(list) + 1e-6)
      }),
      { numRuns: 80, seed: 6 },
    )
  })
})
