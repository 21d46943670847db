import { type Instance, oddOnes } from './problem'

/**
 * The most valuable filling of one bar: max Σ value·count, Σ weight·count ≤ capacity, count ≤ bound.
 * Depth first over items by value per length, cut off by the fractional bound; weights may be any reals.
 * Slanted pieces (`nests`) without a partner need their whole length; the fractional bound holds all the same.
 * Only fillings worth more than `floor` are looked for. `exact` is false when `nodeLimit` ended the search;
 * `upper` is then the fractional bound, otherwise the best value (or `floor` when none is better).
 */
export function bestFilling(
  values: readonly number[],
  weights: readonly number[],
  bounds: readonly number[],
  capacity: number,
  floor: number,
  tolerance: number,
  nests: Instance['nests'] = [],
  nodeLimit = 60_000,
): { readonly counts: number[] | undefined; readonly value: number; readonly upper: number } {
  const order = values
    .map((value, i) => ({ i, value, weight: weights[i] ?? 1, bound: bounds[i] ?? 0 }))
    .filter((item) => item.value > 1e-12 && item.bound > 0 && item.weight <= capacity + tolerance)
    .sort((a, b) => b.value / b.weight - a.value / a.weight || b.weight - a.weight || a.i - b.i)
  const density = order.map((item) => item.value / item.weight)
  const count = new Array<number>(order.length).fill(0)
  let best = floor
  let bestCount: number[] | undefined
  let nodes = 0

  const slanted = nests.some((nest) => nest !== undefined)
  const oddAlone = (): number => {
    const counts = new Array<number>(nests.length).fill(0)
    order.forEach((item, depth) => {
      counts[item.i] = count[depth] ?? 0
    })
    return oddOnes({ nests }, counts)
  }

  const visit = (depth: number, room: number, value: number): void => {
    nodes += 1
    if (value > best + 1e-12 && (!slanted || room + tolerance >= oddAlone())) {
      best = value
      bestCount = [...count]
    }
    const item = order[depth]
    if (!item || nodes > nodeLimit) return
    if (value + room * (density[depth] ?? 0) <= best + 1e-12) return
    const most = Math.min(item.bound, Math.floor((room + tolerance) / item.weight))
    for (let taken = most; taken >= 0; taken -= 1) {
      count[depth] = taken
      const left = Math.max(0, room - taken * item.weight)
      const reach = value + taken * item.value + left * (density[depth + 1] ?? 0)
      // Fewer of this item only lowers what can be reached, for the next are worth less a length.
      if (reach <= best + 1e-12 && value + taken * item.value <= best + 1e-12) break
      visit(depth + 1, left, value + taken * item.value)
    }
    count[depth] = 0
  }
  visit(0, capacity, 0)

  const fractional = capacity * (density[0] ?? 0)
  const upper = nodes > nodeLimit ? Math.max(best, fractional) : best
  if (!bestCount) return { counts: undefined, value: floor, upper }
  const counts = new Array<number>(values.length).fill(0)
  order.forEach((item, depth) => {
    counts[item.i] = bestCount?.[depth] ?? 0
  })
  return { counts, value: best, upper }
}
