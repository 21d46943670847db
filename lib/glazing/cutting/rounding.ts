import { relax } from './column-generation'
import { type Bars, constructive, costOf, downsize } from './constructive'
import type { Instance, Pattern } from './problem'

/**
 * Whole bars from the relaxation: whole parts are kept, then the largest fraction is rounded up and the rest
 * is relaxed again, until what is left is small enough for the constructive heuristic. At every step the rest
 * is also finished constructively, and the cheapest plan of all is returned.
 */
export function roundRelaxation(
  instance: Instance,
  first: { readonly solution: readonly { readonly pattern: Pattern; readonly bars: number }[] },
  shuffles: number,
): Bars | undefined {
  let demands = [...instance.demands]
  let left = instance.stock.map((option) => option.available)
  const kept: Bars = []
  let solution = first.solution
  let best: Bars | undefined

  const take = (pattern: Pattern, bars: number): void => {
    for (let k = 0; k < bars; k += 1) {
      const counts = pattern.counts.map((count, i) => Math.min(count, demands[i] ?? 0))
      if (counts.every((count) => count === 0) || (left[pattern.stock] ?? 0) <= 0) return
      demands = demands.map((demand, i) => demand - (counts[i] ?? 0))
      left = left.map((value, s) => (s === pattern.stock ? value - 1 : value))
      kept.push({ stock: pattern.stock, counts })
    }
  }
  const finish = (tries: number): void => {
    const rest = constructive(instance, demands, left, tries)
    if (!rest) return
    const whole = downsize(
      instance,
      [...kept, ...rest],
      instance.stock.map((option) => option.available),
    )
    if (!best || costOf(instance, whole) < costOf(instance, best) - 1e-9) best = whole
  }

  for (let round = 0; round < 60 && demands.some((demand) => demand > 0); round += 1) {
    for (const { pattern, bars } of solution) take(pattern, Math.floor(bars + 1e-6))
    finish(shuffles)
    if (demands.every((demand) => demand === 0)) break
    const fractions = solution
      .map(({ pattern, bars }) => ({ pattern, part: bars - Math.floor(bars + 1e-6) }))
      .filter(({ part }) => part > 1e-4)
      .sort((a, b) => b.part - a.part)
    const up = fractions.filter(({ part }, k) => k === 0 || part > 0.7)
    if (up.length === 0) break
    for (const { pattern } of up) take(pattern, 1)
    const rest = subInstance(instance, demands, left)
    if (!rest) break
    solution = relax(
      rest,
      fractions.map(({ pattern }) => pattern),
    ).solution
  }
  finish(shuffles)
  return best
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
