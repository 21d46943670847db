import { fail, type Result, succeed } from '../../failures'

/**
 * One-dimensional cutting stock: pieces of given lengths from bars of several lengths and prices.
 * All lengths in one unit of the caller's choice; a saw cut takes `kerf` between two pieces and before an offcut.
 */
export interface CuttingProblem {
  readonly kerf: number
  readonly stock: readonly { readonly length: number; readonly price: number; readonly available?: number }[]
  readonly pieces: readonly { readonly length: number; readonly count: number; readonly mark?: string }[]
}

/** One bought bar: `stock` is its length, `pieces` the lengths cut from it in order, `offcut` what is left after the last cut. */
export interface Bar {
  readonly stock: number
  readonly pieces: readonly number[]
  readonly marks?: readonly string[]
  readonly offcut: number
}

export interface CuttingPlan {
  readonly bars: readonly Bar[]
  readonly cost: number
  /** Length bought less length of the pieces (saw cuts and offcuts). */
  readonly waste: number
  /** No plan costs less. */
  readonly bound: number
  /** The cost is the least there is. */
  readonly proven: boolean
}

/** The problem in solver form: distinct lengths, longest first, each with the saw cut added. */
export interface Instance {
  /** Piece length plus kerf. */
  readonly weights: readonly number[]
  readonly lengths: readonly number[]
  readonly demands: readonly number[]
  readonly stock: readonly StockOption[]
  readonly tolerance: number
}

export interface StockOption {
  /** Bar length plus kerf: the last piece needs no cut behind it. */
  readonly capacity: number
  readonly length: number
  readonly price: number
  readonly available: number
}

const largestCount = 1_000_000

/** Errors: `invalid` with the piece or bar at fault and what was expected. */
export function toInstance(problem: CuttingProblem): Result<Instance> {
  const { kerf, stock, pieces } = problem
  if (!(kerf >= 0) || !Number.isFinite(kerf))
    return fail('invalid', `Expected a kerf of 0 or more, not ${kerf}.`)
  if (stock.length === 0) return fail('invalid', 'Expected at least one stock length.')
  if (pieces.length === 0) return fail('invalid', 'Expected at least one piece.')
  for (const bar of stock) {
    if (!(bar.length > 0) || !Number.isFinite(bar.length))
      return fail('invalid', `Expected a stock length above 0, not ${bar.length}.`)
    if (!(bar.price >= 0) || !Number.isFinite(bar.price))
      return fail('invalid', `Expected a price of 0 or more for stock ${bar.length}, not ${bar.price}.`)
    const { available } = bar
    if (available !== undefined && !(Number.isInteger(available) && available >= 0))
      return fail('invalid', `Expected a whole number available of stock ${bar.length}, not ${available}.`)
  }
  const longest = Math.max(...stock.filter((bar) => bar.available !== 0).map((bar) => bar.length))
  const tolerance = 1e-9 * Math.max(1, ...stock.map((bar) => bar.length))
  const demand = new Map<number, number>()
  for (const piece of pieces) {
    const called = piece.mark === undefined ? `length ${piece.length}` : `${piece.mark} (${piece.length})`
    if (!(piece.length > 0) || !Number.isFinite(piece.length))
      return fail('invalid', `Expected a piece length above 0, not ${called}.`)
    if (!Number.isInteger(piece.count) || piece.count < 0 || piece.count > largestCount)
      return fail('invalid', `Expected a whole count for piece ${called}, not ${piece.count}.`)
    if (piece.length > longest + tolerance)
      return fail('invalid', `Piece ${called} is longer than every stock length (longest ${longest}).`)
    if (piece.count > 0) demand.set(piece.length, (demand.get(piece.length) ?? 0) + piece.count)
  }
  const lengths = [...demand.keys()].sort((a, b) => b - a)
  return succeed({
    lengths,
    weights: lengths.map((length) => length + kerf),
    demands: lengths.map((length) => demand.get(length) ?? 0),
    stock: stock
      .map(({ length, price, available = Number.POSITIVE_INFINITY }) => ({
        length,
        price,
        available,
        capacity: length + kerf,
      }))
      .filter((bar) => bar.available > 0),
    tolerance,
  })
}

/** A way to cut one bar: `counts[i]` pieces of `lengths[i]` from `stock[stock]`. */
export interface Pattern {
  readonly stock: number
  readonly counts: readonly number[]
}

export function used(instance: Instance, counts: readonly number[]): number {
  return counts.reduce((sum, count, i) => sum + count * (instance.weights[i] ?? 0), 0)
}
