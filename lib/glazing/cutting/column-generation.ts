import { bestFilling } from './knapsack'
import type { Instance, Pattern } from './problem'

/**
 * The linear relaxation by column generation (Gilmore and Gomory 1961): a revised simplex over the patterns
 * in the basis, new patterns priced by a knapsack for every stock length. Rows: one a length (at least the
 * demand), then one a stock option of limited number (at most what there is).
 */
export interface Relaxation {
  /** Patterns of the basis with how many bars of each (fractions). */
  readonly solution: readonly { readonly pattern: Pattern; readonly bars: number }[]
  /** A proven lower bound on the cost of every plan, from dual values. */
  readonly bound: number
  /** Every pattern that was priced in, for an integer program. */
  readonly pool: readonly Pattern[]
}

interface BasisColumn {
  readonly kind: 'pattern' | 'slack' | 'artificial'
  readonly entries: readonly (readonly [row: number, value: number])[]
  readonly cost: number
  readonly pattern?: Pattern
}

export function relax(instance: Instance, start: readonly Pattern[] = []): Relaxation {
  const { demands, stock } = instance
  const pieceRows = demands.length
  const limited = stock.flatMap((option, s) => (Number.isFinite(option.available) ? [s] : []))
  const rowOfStock = new Map(limited.map((s, k) => [s, pieceRows + k]))
  const rows = pieceRows + limited.length
  const right = [...demands, ...limited.map((s) => stock[s]?.available ?? 0)]
  const dearest = Math.max(1e-9, ...stock.map((option) => option.price))
  const penalty = 1e4 * dearest

  const basis: BasisColumn[] = right.map((_, row) => ({
    kind: row < pieceRows ? 'artificial' : 'slack',
    entries: [[row, 1]],
    cost: row < pieceRows ? penalty : 0,
  }))
  const inverse = right.map((_, row) => right.map((__, column): number => (row === column ? 1 : 0)))
  // A hair more demand, growing with the row, keeps ties out of the ratio test; the bound uses the true demand.
  const level = right.map((value, row) => value + (1e-7 * (row + 1)) / rows)
  const duals = new Array<number>(rows).fill(0)
  const pool: Pattern[] = []

  const column = (pattern: Pattern): BasisColumn => {
    const entries: [number, number][] = []
    pattern.counts.forEach((count, row) => {
      if (count > 0) entries.push([row, count])
    })
    const row = rowOfStock.get(pattern.stock)
    if (row !== undefined) entries.push([row, 1])
    return { kind: 'pattern', entries, cost: stock[pattern.stock]?.price ?? 0, pattern }
  }
  const reduced = (candidate: BasisColumn) =>
    candidate.cost - candidate.entries.reduce((sum, [row, value]) => sum + value * (duals[row] ?? 0), 0)

  const price = () => {
    for (let c = 0; c < rows; c += 1) {
      let sum = 0
      for (let r = 0; r < rows; r += 1) sum += (basis[r]?.cost ?? 0) * (inverse[r]?.[c] ?? 0)
      duals[c] = sum
    }
  }
  const enter = (entering: BasisColumn): boolean => {
    const direction = inverse.map((line) =>
      entering.entries.reduce((sum, [row, value]) => sum + value * (line[row] ?? 0), 0),
    )
    let leaving = -1
    let step = Number.POSITIVE_INFINITY
    direction.forEach((d, r) => {
      if (d <= 1e-9) return
      const ratio = (level[r] ?? 0) / d
      if (ratio < step - 1e-13) {
        step = ratio
        leaving = r
      }
    })
    if (leaving < 0) return false
    const pivot = direction[leaving] ?? 1
    const pivotLine = (inverse[leaving] ?? []).map((value) => value / pivot)
    inverse[leaving] = pivotLine
    for (let r = 0; r < rows; r += 1) {
      const d = direction[r] ?? 0
      if (r === leaving || d === 0) continue
      const line = inverse[r] ?? []
      for (let c = 0; c < rows; c += 1) line[c] = (line[c] ?? 0) - d * (pivotLine[c] ?? 0)
      level[r] = Math.max(0, (level[r] ?? 0) - d * step)
    }
    level[leaving] = step
    basis[leaving] = entering
    return true
  }

  const starters = start.map(column)
  let bound = 0
  for (let round = 0; round < 40 * rows + 400; round += 1) {
    price()
    const slack = cheapestSlack(duals, pieceRows)
    const ready = starters
      .map((candidate) => ({ candidate, cost: reduced(candidate) }))
      .reduce<{ candidate: BasisColumn; cost: number } | undefined>(
        (best, next) => (next.cost < (best?.cost ?? -1e-7) ? next : best),
        undefined,
      )
    if (slack && !enter(slack)) break
    if (slack) continue
    if (ready && enter(ready.candidate)) continue
    const { pattern, shrink } = pricePatterns(instance, duals, rowOfStock)
    const worth = right.reduce(
      (sum, value, row) => sum + (duals[row] ?? 0) * value * (row < pieceRows ? shrink : 1),
      0,
    )
    // Dual values made feasible by shrinking (Farley 1990) bound every plan from below.
    bound = Math.max(bound, worth)
    if (!pattern) break
    pool.push(pattern)
    if (!enter(column(pattern))) break
  }
  const solution = basis.flatMap((entry, row) =>
    entry.pattern ? [{ pattern: entry.pattern, bars: level[row] ?? 0 }] : [],
  )
  return { solution, bound, pool: [...start, ...pool] }
}

/** A surplus (more pieces than asked) or an unused limited stock that would lower the cost. */
function cheapestSlack(duals: readonly number[], pieceRows: number): BasisColumn | undefined {
  let worst = -1e-9
  let found: BasisColumn | undefined
  duals.forEach((dual, row) => {
    const cost = row < pieceRows ? dual : -dual
    if (cost < worst) {
      worst = cost
      found = { kind: 'slack', entries: [[row, row < pieceRows ? -1 : 1]], cost: 0 }
    }
  })
  return found
}

function pricePatterns(
  instance: Instance,
  duals: readonly number[],
  rowOfStock: ReadonlyMap<number, number>,
): { readonly pattern: Pattern | undefined; readonly shrink: number } {
  const values = instance.demands.map((_, row) => Math.max(0, duals[row] ?? 0))
  let pattern: Pattern | undefined
  let gain = 1e-7
  let shrink = 1
  instance.stock.forEach((option, s) => {
    const row = rowOfStock.get(s)
    const cost = option.price - (row === undefined ? 0 : (duals[row] ?? 0))
    const filling = bestFilling(
      values,
      instance.weights,
      instance.demands,
      option.capacity,
      cost,
      instance.tolerance,
      instance.nests,
    )
    if (filling.upper > cost * (1 + 1e-12))
      shrink = Math.min(shrink, Math.max(0, cost) / Math.max(1e-12, filling.upper))
    if (filling.counts && filling.value - cost > gain) {
      gain = filling.value - cost
      pattern = { stock: s, counts: filling.counts }
    }
  })
  return { pattern, shrink }
}
