import type { CuttingProblem } from '@/lib/glazing'

/** Jobs as they come to a saw: 10 to 40 lengths in sixteenths of an inch, four stock lengths, longer ones a little cheaper by length. */
export function sawJob(seed: number): CuttingProblem {
  let state = (seed * 2_654_435_761 + 12_345) >>> 0
  const next = () => {
    state = (Math.imul(state, 1_664_525) + 1_013_904_223) >>> 0
    return state / 4_294_967_296
  }
  const stock = [96, 144, 192, 288].map((length) => ({
    length,
    price: Math.round(length * (1.62 - length / 1200 + next() * 0.16) * 100) / 100,
  }))
  const count = 10 + Math.floor(next() * 31)
  const pieces = Array.from({ length: count }, () => ({
    length: Math.round((8 + next() * 150) * 16) / 16,
    count: 1 + Math.floor(next() * 40),
  }))
  return { kerf: 0.125, stock, pieces }
}
