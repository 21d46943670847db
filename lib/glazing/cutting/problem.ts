import { fail, type Result, succeed } from '../../failures'

/**
 * One-dimensional cutting stock: pieces of given lengths from bars of several lengths and prices.
 * All lengths in one unit of the caller's choice; a saw cut takes `kerf` between two pieces and before an offcut.
 */
export interface CuttingProblem {
  readonly kerf: number
  readonly stock: readonly { readonly length: number; readonly price: number; readonly available?: number }[]
  readonly pieces: readonly {
    readonly length: number
    readonly count: number
    readonly mark?: string
    readonly nest?: Nest
  }[]
}

/**
 * A piece with a slanted end: two of the same slope out of one bar share the slanted cut, so that the second needs
 * `saving` less length (the rise, less what the cut takes more than a square one).
 */
export interface Nest {
  readonly slope: string
  readonly saving: number
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
  /** Piece length plus kerf, less half of what a slanted piece saves as one of two: never more than it takes of a bar. */
  readonly weights: readonly number[]
  /** Of each type: its slope's number and half the saving; undefined for a square piece. */
  readonly nests: readonly (InstanceNest | undefined)[]
  readonly keys: readonly string[]
  readonly lengths: readonly number[]
  readonly demands: readonly number[]
  readonly stock: readonly StockOption[]
  readonly tolerance: number
}

export interface InstanceNest {
  readonly slope: number
  readonly half: number
}

export interface StockOption {
  /** Bar length plus kerf: the last piece needs no cut behind it. */
  readonly capacity: number
  readonly length: number
  readonly price: number
  readonly available: number
}

const mostPieces = 100_000
const mostLengths = 2_000

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
  if (stock.every((bar) => bar.available === 0)) return fail('limit', 'Expected stock that is available.')
  const longest = Math.max(...stock.filter((bar) => bar.available !== 0).map((bar) => bar.length))
  const tolerance = 1e-9 * Math.max(1, ...stock.map((bar) => bar.length))
  const types = new Map<string, PieceType>()
  const slopes = new Map<string, number>()
  let many = 0
  for (const piece of pieces) {
    many += piece.count
    const called = piece.mark === undefined ? `length ${piece.length}` : `${piece.mark} (${piece.length})`
    if (!(piece.length > 0) || !Number.isFinite(piece.length))
      return fail('invalid', `Expected a piece length above 0, not ${called}.`)
    if (!Number.isInteger(piece.count) || piece.count < 0 || piece.count > mostPieces)
      return fail('invalid', `Expected a whole count for piece ${called}, not ${piece.count}.`)
    if (piece.length > longest + tolerance)
      return fail('invalid', `Piece ${called} is longer than every stock length (longest ${longest}).`)
    if (piece.count === 0) continue
    const key = typeKey(piece)
    const type = types.get(key)
    if (type) type.demand += piece.count
    else types.set(key, { key, length: piece.length, demand: piece.count, nest: nestOf(piece.nest, slopes) })
  }
  if (many > mostPieces) return fail('limit', `Expected at most ${mostPieces} pieces in all, not ${many}.`)
  if (types.size > mostLengths)
    return fail('limit', `Expected at most ${mostLengths} different lengths, not ${types.size}.`)
  const list = [...types.values()].sort(
    (a, b) => b.length - a.length || (a.key < b.key ? -1 : a.key > b.key ? 1 : 0),
  )
  return succeed({
    keys: list.map((type) => type.key),
    lengths: list.map((type) => type.length),
    weights: list.map((type) => type.length + kerf - (type.nest?.half ?? 0)),
    nests: list.map((type) => type.nest),
    demands: list.map((type) => type.demand),
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

interface PieceType {
  readonly key: string
  readonly length: number
  readonly nest: InstanceNest | undefined
  demand: number
}

/** Pieces of one key are the same to the saw. */
export function typeKey({ length, nest }: { readonly length: number; readonly nest?: Nest }): string {
  return nest && nest.saving > 0 ? `${length}|${nest.slope}` : String(length)
}

function nestOf(nest: Nest | undefined, slopes: Map<string, number>): InstanceNest | undefined {
  if (!nest || !(nest.saving > 0)) return undefined
  const slope = slopes.get(nest.slope) ?? slopes.size
  slopes.set(nest.slope, slope)
  return { slope, half: nest.saving / 2 }
}

/** A way to cut one bar: `counts[i]` pieces of `lengths[i]` from `stock[stock]`. */
export interface Pattern {
  readonly stock: number
  readonly counts: readonly number[]
}

/** What the pieces take of a bar's capacity; of a slope's odd number of pieces one takes its whole length. */
export function used(instance: Instance, counts: readonly number[]): number {
  return counts.reduce((sum, count, i) => sum + count * (instance.weights[i] ?? 0), oddOnes(instance, counts))
}

/** What the slanted pieces without a partner take more than their weights say. */
export function oddOnes({ nests }: Pick<Instance, 'nests'>, counts: readonly number[]): number {
  let odd: Map<number, number> | undefined
  let sum = 0
  for (const [i, count] of counts.entries()) {
    const nest = nests[i]
    if (!nest || count % 2 === 0) continue
    odd ??= new Map()
    const alone = odd.get(nest.slope)
    sum += alone === undefined ? nest.half : -alone
    if (alone === undefined) odd.set(nest.slope, nest.half)
    else odd.delete(nest.slope)
  }
  return sum
}

/** A piece of a sheet, by the rectangle around it. */
export interface SheetPiece {
  readonly mark: string
  readonly width: number
  /** Of the rectangle around it, along the flutes. */
  readonly length: number
  /** A straight slanted end: signed, positive when the right side is the longer one. */
  readonly rise?: number
}
