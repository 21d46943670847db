import type { Pricer } from './pricing'
import { pricerOf } from './pricing'
import type { Instance, Pattern } from './problem'

/**
 * The linear relaxation by column generation (Gilmore and Gomory 1961): a revised simplex over the patterns
 * in the basis, new patterns priced for every stock length. Rows: one a length (at least the demand), then one
 * a stock option of limited number (at most what there is).
 */
export interface Relaxation {
  /** Patterns of the basis with how many bars of each (fractions). */
  readonly solution: readonly { readonly pattern: Pattern; readonly bars: number }[]
  /** A proven lower bound on the cost of every plan, from dual values. */
  readonly bound: number
  /** Every pattern that was priced in, for an integer program and for relaxations of what is left. */
  readonly pool: readonly Pattern[]
}

interface Column {
  readonly rows: readonly number[]
  readonly values: readonly number[]
  readonly cost: number
  readonly pattern?: Pattern
}

export interface RelaxOptions {
  readonly start?: readonly Pattern[]
  readonly pricer?: Pricer
  /** How often patterns may be priced; the bound holds all the same. */
  readonly pricings?: number
}

export function relax(instance: Instance, options: RelaxOptions = {}): Relaxation {
  const { demands, stock } = instance
  const pieceRows = demands.length
  const limited = stock.flatMap((option, s) => (Number.isFinite(option.available) ? [s] : []))
  const rowOfStock = new Map(limited.map((s, k) => [s, pieceRows + k]))
  const rows = pieceRows + limited.length
  const right = [...demands, ...limited.map((s) => stock[s]?.available ?? 0)]
  const dearest = Math.max(1e-9, ...stock.map((option) => option.price))
  const gain = 1e-7 * dearest
  const columnOf = (pattern: Pattern): Column => {
    const at: number[] = []
    const values: number[] = []
    pattern.counts.forEach((count, row) => {
      if (count === 0) return
      at.push(row)
      values.push(count)
    })
    const row = rowOfStock.get(pattern.stock)
    if (row !== undefined) {
      at.push(row)
      values.push(1)
    }
    return { rows: at, values, cost: stock[pattern.stock]?.price ?? 0, pattern }
  }
  const basis: Column[] = right.map((_, row) => ({
    rows: [row],
    values: [1],
    cost: row < pieceRows ? 1e4 * dearest : 0,
  }))
  const inverse = new Float64Array(rows * rows)
  for (let row = 0; row < rows; row += 1) inverse[row * rows + row] = 1
  // A hair more demand, growing with the row, keeps ties out of the ratio test; the bound uses the true demand.
  const level = Float64Array.from(right, (value, row) => value + (1e-7 * (row + 1)) / rows)
  const duals = new Float64Array(rows)
  const direction = new Float64Array(rows)

  const price = (): void => {
    duals.fill(0)
    for (let r = 0; r < rows; r += 1) {
      const cost = basis[r]?.cost ?? 0
      if (cost !== 0)
        for (let c = 0; c < rows; c += 1) duals[c] = (duals[c] ?? 0) + cost * (inverse[r * rows + c] ?? 0)
    }
  }
  const reduced = ({ cost, rows: at, values }: Column): number => {
    let sum = cost
    for (let k = 0; k < at.length; k += 1) sum -= (values[k] ?? 0) * (duals[at[k] ?? 0] ?? 0)
    return sum
  }
  const enter = (entering: Column): boolean => {
    let leaving = -1
    let step = Number.POSITIVE_INFINITY
    for (let r = 0; r < rows; r += 1) {
      let d = 0
      for (let k = 0; k < entering.rows.length; k += 1)
        d += (entering.values[k] ?? 0) * (inverse[r * rows + (entering.rows[k] ?? 0)] ?? 0)
      direction[r] = d
      if (d <= 1e-9) continue
      const ratio = (level[r] ?? 0) / d
      if (ratio < step - 1e-13) {
        step = ratio
        leaving = r
      }
    }
    if (leaving < 0) return false
    const pivot = direction[leaving] ?? 1
    for (let c = 0; c < rows; c += 1) inverse[leaving * rows + c] = (inverse[leaving * rows + c] ?? 0) / pivot
    for (let r = 0; r < rows; r += 1) {
      const d = direction[r] ?? 0
      if (r === leaving || d === 0) continue
      for (let c = 0; c < rows; c += 1)
        inverse[r * rows + c] = (inverse[r * rows + c] ?? 0) - d * (inverse[leaving * rows + c] ?? 0)
      level[r] = Math.max(0, (level[r] ?? 0) - d * step)
    }
    level[leaving] = step
    basis[leaving] = entering
    return true
  }

  const pricer = options.pricer ?? pricerOf(instance)
  const columns = (options.start ?? []).map(columnOf)
  const slacks = right.map((_, row): Column => ({ rows: [row], values: [row < pieceRows ? -1 : 1], cost: 0 }))
  let bound = 0
  let pricings = 0
  for (let round = 0; round < 60 * rows + 600; round += 1) {
    price()
    let entering: Column | undefined
    let least = -gain
    for (const list of [slacks, columns])
      for (const column of list) {
        const cost = reduced(column)
        if (cost >= least) continue
        least = cost
        entering = column
      }
    if (entering) {
      if (!enter(entering)) break
      continue
    }
    if (pricings >= (options.pricings ?? Number.POSITIVE_INFINITY)) break
    pricings += 1
    const floors = stock.map((option, s) => {
      const row = rowOfStock.get(s)
      return Math.max(0, option.price - (row === undefined ? 0 : (duals[row] ?? 0)))
    })
    const values = duals.map((dual, row) => (row < pieceRows ? Math.max(0, dual) : 0)).slice(0, pieceRows)
    const { patterns, upper } = pricer(values, demands, floors)
    // Dual values made feasible by shrinking (Farley 1990) bound every plan from below.
    let shrink = 1
    upper.forEach((most, s) => {
      const floor = floors[s] ?? 0
      if (most > floor * (1 + 1e-12)) shrink = Math.min(shrink, floor / most)
    })
    let worth = 0
    right.forEach((value, row) => {
      worth += (duals[row] ?? 0) * value * (row < pieceRows ? shrink : 1)
    })
    bound = Math.max(bound, worth)
    const fresh = patterns.map(columnOf).filter((column) => reduced(column) < -gain)
    if (fresh.length === 0) break
    columns.push(...fresh)
  }
  const solution = basis.flatMap((column, row) =>
    column.pattern ? [{ pattern: column.pattern, bars: level[row] ?? 0 }] : [],
  )
  return { solution, bound, pool: columns.flatMap((column) => (column.pattern ? [column.pattern] : [])) }
}
