import { bestFilling } from './knapsack'
import type { Instance, Pattern } from './problem'

/** For each stock option the most valuable filling: its pattern when it is worth more than `floors`, and a bound on the value. */
export interface Priced {
  readonly patterns: readonly Pattern[]
  /** By stock option: no filling is worth more. */
  readonly upper: readonly number[]
}

export type Pricer = (
  values: ArrayLike<number>,
  demands: readonly number[],
  floors: readonly number[],
) => Priced

const mostCells = 24_000

/**
 * C16 Patterns are priced exactly: by one table over all lengths where sizes lie on a common measure (sixteenths,
 * millimetres), which serves every stock length at once; by depth-first search otherwise.
 */
export function pricerOf(instance: Instance): Pricer {
  const measure = instance.nests.some((nest) => nest !== undefined) ? undefined : commonMeasure(instance)
  return measure === undefined ? searchPricer(instance) : tablePricer(instance, measure)
}

function searchPricer(instance: Instance): Pricer {
  return (values, demands, floors) => {
    const patterns: Pattern[] = []
    const list = Array.from(values)
    const upper = instance.stock.map((option, s) => {
      const floor = floors[s] ?? 0
      const { weights, tolerance, nests } = instance
      const filling = bestFilling(list, weights, demands, option.capacity, floor, tolerance, nests)
      if (filling.counts && filling.value > floor) patterns.push({ stock: s, counts: filling.counts })
      return filling.upper
    })
    return { patterns, upper }
  }
}

function tablePricer(instance: Instance, measure: number): Pricer {
  const cells = (size: number) => Math.round(size / measure)
  const weights = instance.weights.map(cells)
  const capacities = instance.stock.map((option) => cells(option.capacity))
  const most = Math.max(...capacities)
  const best = new Float64Array(most + 1)
  return (values, demands, floors) => {
    // A bounded number of each is split into 1, 2, 4 … and the rest.
    const items: { readonly type: number; readonly count: number }[] = []
    weights.forEach((weight, type) => {
      let left = (values[type] ?? 0) > 1e-12 ? Math.min(demands[type] ?? 0, Math.floor(most / weight)) : 0
      for (let share = 1; left > 0; share *= 2) {
        const count = Math.min(share, left)
        items.push({ type, count })
        left -= count
      }
    })
    best.fill(0)
    const taken = new Uint8Array(items.length * (most + 1))
    items.forEach(({ type, count }, k) => {
      const weight = (weights[type] ?? 0) * count
      const value = (values[type] ?? 0) * count
      const base = k * (most + 1)
      for (let cell = most; cell >= weight; cell -= 1) {
        const other = (best[cell - weight] ?? 0) + value
        if (other > (best[cell] ?? 0)) {
          best[cell] = other
          taken[base + cell] = 1
        }
      }
    })
    const patterns: Pattern[] = []
    const upper = capacities.map((capacity, s) => {
      const value = best[capacity] ?? 0
      if (value > (floors[s] ?? 0)) {
        const counts = new Array<number>(weights.length).fill(0)
        let cell = capacity
        for (let k = items.length - 1; k >= 0; k -= 1) {
          const item = items[k]
          if (!item || taken[k * (most + 1) + cell] !== 1) continue
          counts[item.type] = (counts[item.type] ?? 0) + item.count
          cell -= (weights[item.type] ?? 0) * item.count
        }
        patterns.push({ stock: s, counts })
      }
      return Math.max(value, floors[s] ?? 0)
    })
    return { patterns, upper }
  }
}

/** The length that all weights and capacities are multiples of, when the longest bar is not too many of them. */
function commonMeasure({ weights, stock }: Instance): number | undefined {
  const sizes = [...weights, ...stock.map((option) => option.capacity)]
  const most = Math.max(...sizes)
  const slack = 1e-7 * most
  let measure = 0
  for (const size of sizes) {
    let [a, b] = [size, measure]
    while (b > slack) [a, b] = [b, Math.abs(a - b * Math.round(a / b))]
    measure = a
    if (!(measure > slack) || most / measure > mostCells) return undefined
  }
  const exact = sizes.every((size) => Math.abs(size / measure - Math.round(size / measure)) < 1e-6)
  return exact ? measure : undefined
}
