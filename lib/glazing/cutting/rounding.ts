import { relax } from './column-generation'
import { type Bars, constructive, costOf, downsize, repeatedFilling } from './constructive'
import type { Pricer } from './pricing'
import type { Instance, Pattern } from './problem'

/** How a dive goes down: which fractions are rounded up together, and how much of the rest is tried otherwise. */
export interface Dive {
  /** Fractions above this are rounded up at once; the largest always is. */
  readonly together: number
  /** Among fractions of about the same size, the one to take: by part alone, or by how full its bar is. */
  readonly by: 'part' | 'filling'
  readonly shuffles: number
}

/**
 * C17 Whole bars from the relaxation: whole parts are kept, then fractions are rounded up and the rest is relaxed
 * again with the patterns that are known and a few new ones. At every step the rest is also finished constructively,
 * and the cheapest plan of all is returned; it stops when a plan costs no more than `enough`.
 */
export function roundRelaxation(
  instance: Instance,
  first: {
    readonly solution: readonly { readonly pattern: Pattern; readonly bars: number }[]
    readonly pool: readonly Pattern[]
  },
  pricer: Pricer,
  dive: Dive,
  enough: number,
): Bars | undefined {
  let demands = [...instance.demands]
  let left = instance.stock.map((option) => option.available)
  const kept: Bars = []
  let solution = first.solution
  let pool = first.pool
  let best: Bars | undefined

  const take = (pattern: Pattern, bars: number): void => {
    const { counts: full, stock } = pattern
    let whole = Math.min(bars, left[stock] ?? 0)
    full.forEach((count, i) => {
      if (count > 0) whole = Math.min(whole, Math.floor((demands[i] ?? 0) / count))
    })
    demands = demands.map((demand, i) => demand - whole * (full[i] ?? 0))
    left = left.map((value, s) => (s === stock ? value - whole : value))
    for (let k = 0; k < whole; k += 1) kept.push(pattern)
    for (let k = whole; k < bars; k += 1) {
      const counts = pattern.counts.map((count, i) => Math.min(count, demands[i] ?? 0))
      if (counts.every((count) => count === 0) || (left[pattern.stock] ?? 0) <= 0) return
      demands = demands.map((demand, i) => demand - (counts[i] ?? 0))
      left = left.map((value, s) => (s === pattern.stock ? value - 1 : value))
      kept.push({ stock: pattern.stock, counts })
    }
  }
  const finish = (shuffles: number): boolean => {
    const many = demands.reduce((sum, demand) => sum + demand, 0)
    const rest =
      many > 3_000
        ? repeatedFilling(instance, left, demands)
        : constructive(instance, demands, left, shuffles)
    if (rest) {
      const whole = downsize(
        instance,
        [...kept, ...rest],
        instance.stock.map((option) => option.available),
      )
      if (!best || costOf(instance, whole) < costOf(instance, best) - 1e-9) best = whole
    }
    return best !== undefined && costOf(instance, best) <= enough
  }

  for (let round = 0; round < 200 && demands.some((demand) => demand > 0); round += 1) {
    for (const { pattern, bars } of solution) take(pattern, Math.floor(bars + 1e-6))
    if (finish(dive.shuffles)) return best
    if (demands.every((demand) => demand === 0)) break
    const fractions = solution
      .map(({ pattern, bars }) => ({ pattern, part: bars - Math.floor(bars + 1e-6) }))
      .filter(({ part }) => part > 1e-4)
      .map((one) => ({
        ...one,
        rank: dive.by === 'part' ? one.part : one.part * usefulOf(instance, one.pattern, demands),
      }))
      .sort((a, b) => b.rank - a.rank)
    const up = fractions.filter(({ part }, k) => k === 0 || part > dive.together)
    if (up.length === 0) break
    for (const { pattern } of up) take(pattern, 1)
    const rest = subInstance(instance, demands, left)
    if (!rest) break
    const start = clipped(pool, demands)
    const again = relax(rest, { start, pricer, pricings: 3 })
    solution = again.solution
    pool = again.pool
  }
  finish(dive.shuffles)
  return best
}

/** Share of the bar that is still asked for. */
function usefulOf(instance: Instance, pattern: Pattern, demands: readonly number[]): number {
  const capacity = instance.stock[pattern.stock]?.capacity ?? 1
  const useful = pattern.counts.reduce(
    (sum, count, i) => sum + Math.min(count, demands[i] ?? 0) * (instance.weights[i] ?? 0),
    0,
  )
  return (useful / capacity) ** 3
}

/** The patterns with no more of a length than is still asked for, each once. */
function clipped(pool: readonly Pattern[], demands: readonly number[]): Pattern[] {
  const seen = new Set<string>()
  const kept: Pattern[] = []
  for (const { stock, counts } of pool) {
    const clip = counts.map((count, i) => Math.min(count, demands[i] ?? 0))
    if (clip.every((count) => count === 0)) continue
    const key = `${stock}:${clip.join()}`
    if (seen.has(key)) continue
    seen.add(key)
    kept.push({ stock, counts: clip })
  }
  return kept
}

/** The same lengths with what is still to be cut and bought; undefined when nothing is. */
function subInstance(
  instance: Instance,
  demands: readonly number[],
  left: readonly number[],
): Instance | undefined {
  if (demands.every((demand) => demand === 0)) return undefined
  return {
    ...instance,
    demands,
    stock: instance.stock.map((option, s) => ({ ...option, available: left[s] ?? option.available })),
  }
}
