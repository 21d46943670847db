import { type Instance, type Pattern, used } from './problem'

/** Bars as patterns, one entry a bar; `undefined` when the limited stock does not suffice. */
export type Bars = Pattern[]

/**
 * Best-fit decreasing: each piece goes into the open bar it fits tightest; when none has room, a bar of the stock
 * option `opening` is opened (or the cheapest that is left and long enough). `order` lists piece types, one entry a piece.
 */
export function bestFit(
  instance: Instance,
  order: readonly number[],
  opening: number,
  left: readonly number[],
): Bars | undefined {
  const { stock, weights, nests, tolerance } = instance
  // `alone` holds the slopes that have a piece without a partner in the bar.
  const open: { stock: number; room: number; counts: number[]; alone: Set<number> }[] = []
  const remaining = [...left]
  for (const type of order) {
    const nest = nests[type]
    const half = nest?.half ?? 0
    const whole = (weights[type] ?? 0) + half
    let target: (typeof open)[number] | undefined
    for (const bar of open) {
      if (bar.room >= (target?.room ?? Number.POSITIVE_INFINITY)) continue
      const need = nest && bar.alone.has(nest.slope) ? whole - 2 * half : whole
      if (bar.room + tolerance >= need) target = bar
    }
    if (!target) {
      const s = stockFor(instance, whole, opening, remaining)
      if (s === undefined) return undefined
      remaining[s] = (remaining[s] ?? 0) - 1
      target = { stock: s, room: stock[s]?.capacity ?? 0, counts: weights.map(() => 0), alone: new Set() }
      open.push(target)
    }
    target.counts[type] = (target.counts[type] ?? 0) + 1
    if (nest && target.alone.delete(nest.slope)) target.room -= whole - 2 * half
    else {
      target.room -= whole
      if (nest) target.alone.add(nest.slope)
    }
  }
  return open.map(({ stock: s, counts }) => ({ stock: s, counts }))
}

function stockFor(
  instance: Instance,
  weight: number,
  opening: number,
  left: readonly number[],
): number | undefined {
  const fits = (s: number) =>
    (left[s] ?? 0) > 0 && (instance.stock[s]?.capacity ?? 0) + instance.tolerance >= weight
  if (fits(opening)) return opening
  let best: number | undefined
  instance.stock.forEach((option, s) => {
    if (fits(s) && (best === undefined || option.price < (instance.stock[best]?.price ?? 0))) best = s
  })
  return best
}

/** Each bar bought in the cheapest (then shortest) stock that still holds its pieces. */
export function downsize(instance: Instance, bars: Bars, left: readonly number[]): Bars {
  const remaining = [...left]
  for (const bar of bars) remaining[bar.stock] = (remaining[bar.stock] ?? 0) - 1
  return bars.map((bar) => {
    const need = used(instance, bar.counts)
    let best = bar.stock
    instance.stock.forEach((option, s) => {
      const now = instance.stock[best]
      if (!now || s === best || (remaining[s] ?? 0) <= 0) return
      if (option.capacity + instance.tolerance < need) return
      if (option.price < now.price || (option.price === now.price && option.length < now.length)) best = s
    })
    remaining[bar.stock] = (remaining[bar.stock] ?? 0) + 1
    remaining[best] = (remaining[best] ?? 0) - 1
    return { stock: best, counts: bar.counts }
  })
}

/** Rounded to twelve digits: a sum of prices keeps no noise of binary fractions. */
export function costOf(instance: Instance, bars: Bars): number {
  return Number(bars.reduce((sum, bar) => sum + (instance.stock[bar.stock]?.price ?? 0), 0).toPrecision(12))
}

/** The cheapest of best-fit decreasing over every opening stock, and over reproducible shuffles of the order. */
export function constructive(
  instance: Instance,
  demands: readonly number[],
  left: readonly number[],
  shuffles: number,
): Bars | undefined {
  const decreasing = demands.flatMap((count, type) => new Array<number>(count).fill(type))
  let best: Bars | undefined
  const consider = (order: readonly number[]) => {
    instance.stock.forEach((_, s) => {
      const bars = bestFit(instance, order, s, left)
      if (!bars) return
      const smaller = downsize(instance, bars, left)
      if (!best || costOf(instance, smaller) < costOf(instance, best) - 1e-9) best = smaller
    })
  }
  consider(decreasing)
  const next = sequence(decreasing.length + 1)
  for (let k = 0; k < shuffles; k += 1) consider(jitter(decreasing, next, 0.08 + 0.3 * (k / shuffles)))
  return best
}

/** The decreasing order with neighbours swapped within a reach of `spread` of its length. */
function jitter(order: readonly number[], next: () => number, spread: number): number[] {
  return order
    .map((type, i) => ({ type, key: i + next() * spread * order.length }))
    .sort((a, b) => a.key - b.key)
    .map((entry) => entry.type)
}

/** A linear congruential sequence in [0, 1): the same plan for the same input. */
function sequence(seed: number): () => number {
  let state = (seed * 2_654_435_761) >>> 0
  return () => {
    state = (Math.imul(state, 1_664_525) + 1_013_904_223) >>> 0
    return state / 4_294_967_296
  }
}

/**
 * First-fit decreasing bar by bar, each filled bar repeated as often as the demand lets it: for jobs of so many pieces
 * that they are not looked at one by one. The cheapest over every stock length; `undefined` when the stock does not suffice.
 */
export function repeatedFilling(
  instance: Instance,
  left: readonly number[],
  demands: readonly number[] = instance.demands,
): Bars | undefined {
  let best: Bars | undefined
  instance.stock.forEach((_, s) => {
    const bars = fillFrom(instance, s, left, demands)
    if (!bars) return
    const smaller = downsize(instance, bars, left)
    if (!best || costOf(instance, smaller) < costOf(instance, best) - 1e-9) best = smaller
  })
  return best
}

function fillFrom(
  instance: Instance,
  opening: number,
  left: readonly number[],
  demands: readonly number[],
): Bars | undefined {
  const { weights, nests, stock, tolerance } = instance
  const asked = [...demands]
  const remaining = [...left]
  const bars: Bars = []
  let first = 0
  while (first < asked.length) {
    if ((asked[first] ?? 0) === 0) {
      first += 1
      continue
    }
    const longest = (weights[first] ?? 0) + (nests[first]?.half ?? 0)
    const s = stockFor(instance, longest, opening, remaining)
    if (s === undefined) return undefined
    let room = stock[s]?.capacity ?? 0
    const counts = weights.map(() => 0)
    for (let type = first; type < asked.length; type += 1) {
      // A slanted piece is counted whole: what partners save is left to the search.
      const weight = (weights[type] ?? 0) + (nests[type]?.half ?? 0)
      const count = Math.min(asked[type] ?? 0, Math.floor((room + tolerance) / weight))
      counts[type] = count
      room -= count * weight
    }
    let times = remaining[s] ?? 0
    counts.forEach((count, type) => {
      if (count > 0) times = Math.min(times, Math.floor((asked[type] ?? 0) / count))
    })
    counts.forEach((count, type) => {
      asked[type] = (asked[type] ?? 0) - count * times
    })
    remaining[s] = (remaining[s] ?? 0) - times
    for (let k = 0; k < times; k += 1) bars.push({ stock: s, counts })
  }
  return bars
}
