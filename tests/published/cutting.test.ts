import { describe, expect, it } from 'vitest'
import { type CuttingProblem, solveCutting } from '../../lib/glazing'
import { loadIntegerProgram } from '../../lib/glazing/cutting/highs.node'

interface Instance {
  readonly id: string
  readonly source: string
  readonly status: string
  readonly length: number
  readonly pieces: readonly (readonly [length: number, count: number])[]
  readonly optimum: number
  /** Bars above the optimum that are let pass. */
  readonly over: number
  readonly bound: number
}

const single = (lengths: string): [number, number][] =>
  lengths.split(' ').map((length) => [Number(length), 1])

const instances: Instance[] = [
  {
    id: 'SB1',
    source: 'Chvátal, Linear Programming (1983), chapter 13',
    status: 'read in another public file',
    length: 100,
    pieces: [
      [45, 97],
      [36, 610],
      [31, 395],
      [14, 211],
    ],
    optimum: 453,
    over: 0,
    bound: 452.25,
  },
  {
    id: 'SB2',
    source: 'Scholl, Klein and Jürgens 1997, N1C1W1_A',
    status: 'read',
    length: 100,
    pieces: single(
      '99 99 96 96 92 92 91 88 87 86 85 76 74 72 69 67 67 62 61 56 52 51 49 46 44 42 40 40 33 33 30 30 29 28 28 27 25 24 23 22 21 20 17 14 13 11 10 7 7 3',
    ),
    optimum: 25,
    over: 0,
    bound: 24.34,
  },
  {
    id: 'SB3',
    source: 'Scholl, Klein and Jürgens 1997, N1C1W1_B',
    status: 'read',
    length: 100,
    pieces: single(
      '100 99 97 97 97 93 93 92 92 88 83 83 79 76 76 75 72 71 70 69 67 66 63 62 62 61 61 51 50 44 44 43 43 40 39 37 37 30 23 20 19 18 17 15 14 13 13 12 8 8',
    ),
    optimum: 31,
    over: 0,
    bound: 28,
  },
  {
    id: 'SB4',
    source: 'Falkenauer u120_00, OR-Library binpack1',
    status: 'read',
    length: 150,
    pieces: single(
      '42 69 67 57 93 90 38 36 45 42 33 79 27 57 44 84 86 92 46 38 85 33 82 73 49 70 59 23 57 72 74 69 33 42 28 46 30 64 29 74 41 49 55 98 80 32 25 38 82 30 35 39 57 84 62 50 55 27 30 36 20 78 47 26 45 41 58 98 91 96 73 84 37 93 91 43 73 85 81 79 71 80 76 83 41 78 70 23 42 87 43 84 60 55 49 78 73 62 36 44 94 69 32 96 70 84 58 78 25 80 58 66 83 24 98 60 42 43 43 39',
    ),
    optimum: 48,
    over: 1,
    bound: 47,
  },
  {
    id: 'SB5',
    source: 'Fieldhouse 1990: the rounded-up relaxation cannot be reached',
    status: 'from memory, verified by hand: no two bars can carry 59 of 60',
    length: 30,
    pieces: [
      [15, 1],
      [10, 2],
      [6, 4],
    ],
    optimum: 3,
    over: 0,
    bound: 59 / 30,
  },
  {
    id: 'SB6',
    source: 'textbook exercise, probably Chvátal chapter 13',
    status: 'relaxation read in a public test',
    length: 20,
    pieces: [
      [9, 511],
      [8, 301],
      [7, 263],
      [6, 383],
    ],
    optimum: 601,
    over: 0,
    bound: 600.375,
  },
]

const problemOf = ({ length, pieces }: Instance): CuttingProblem => ({
  kerf: 0,
  stock: [{ length, price: 1 }],
  pieces: pieces.map(([piece, count]) => ({ length: piece, count })),
})

describe('published cutting stock instances', () => {
  it.each(instances)('[C1] $id, $source ($status): $optimum bars', async (instance) => {
    const integerProgram = await loadIntegerProgram()
    const result = solveCutting(problemOf(instance), integerProgram)
    if (!result.ok) throw new Error(result.failure.text)
    const { bars, cost, bound, proven } = result.value
    expect(bars.length).toBeGreaterThanOrEqual(instance.optimum)
    expect(bars.length).toBeLessThanOrEqual(instance.optimum + instance.over)
    expect(cost).toBe(bars.length)
    expect(bound).toBeGreaterThanOrEqual(Math.floor(instance.bound))
    expect(bound).toBeLessThanOrEqual(instance.optimum + 1e-6)
    if (instance.over === 0) expect(proven).toBe(true)
    for (const bar of bars)
      expect(bar.pieces.reduce((sum, piece) => sum + piece, 0)).toBeLessThanOrEqual(instance.length)
  })

  it.each(instances)(
    '[C2] $id without the integer program stays within half a percent or one bar',
    (instance) => {
      const result = solveCutting(problemOf(instance))
      if (!result.ok) throw new Error(result.failure.text)
      expect(result.value.bars.length).toBeLessThanOrEqual(
        Math.max(instance.optimum + 1, Math.ceil(instance.optimum * 1.005)),
      )
      expect(result.value.bound).toBeLessThanOrEqual(instance.optimum + 1e-6)
    },
  )
})
