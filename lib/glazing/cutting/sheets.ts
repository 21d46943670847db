import { fail, type Result, succeed } from '../../failures'
import { arrange, type Level, slantedKerf } from './arrange'
import { relax } from './column-generation'
import type { SolveIntegerProgram } from './exact'
import { type CuttingProblem, type Nest, type SheetPiece, toInstance } from './problem'
import { firstCut, solveCutting, stepUp } from './solve'

export interface SheetStock {
  readonly width: number
  readonly length: number
  readonly price: number
  readonly available?: number
}

export interface CutSheet {
  readonly length: number
  readonly price: number
  readonly levels: readonly Level[]
  readonly offcut: number
}

export interface SheetPlan {
  readonly sheets: readonly CutSheet[]
  readonly cost: number
  readonly bound: number
  readonly proven: boolean
}

interface Draft {
  length: number
  width: number
  readonly pieces: SheetPiece[]
}

/**
 * C11 Two pieces of the same slope out of one sheet share the slanted cut: low + low + rise + kerf.
 * C10 Two stages: a sheet is crosscut into levels, a level ripped into pieces; pieces keep their length along the flutes
 * and are at most turned half round.
 * C12 The bound holds for every plan of this kind: where no two pieces fit side by side it is that of the lengths;
 * otherwise that of areas, with pieces wider than a share of the sheet counted as if they took its whole width.
 * All stock is of one width. Errors: `invalid` when a piece fits no sheet, `limit` when the stock does not suffice.
 */
export function cutSheets(
  pieces: readonly SheetPiece[],
  stock: readonly SheetStock[],
  kerf: number,
  integerProgram?: SolveIntegerProgram,
): Result<SheetPlan> {
  const width = stock[0]?.width ?? 0
  const longest = Math.max(...stock.map((sheet) => sheet.length))
  const tooLarge = pieces.find(
    (piece) => piece.width > width * (1 + 1e-9) || piece.length > longest * (1 + 1e-9),
  )
  if (tooLarge)
    return fail(
      'invalid',
      `Expected a stock sheet that holds piece ${tooLarge.mark} (${tooLarge.width} by ${tooLarge.length}).`,
    )
  const nests = nestsOf(pieces, kerf)
  let best: { readonly drafts: readonly Draft[]; readonly problem: CuttingProblem } | undefined
  let least = Number.POSITIVE_INFINITY
  for (const alike of [1, 0.75, 0]) {
    const drafts = compose(pieces, width, kerf, alike)
    const problem = problemOf(drafts, stock, kerf, nests)
    const cost = firstCut(problem)
    if (!cost.ok) return cost
    if (best && cost.value >= least - 1e-9) continue
    best = { drafts, problem }
    least = cost.value
  }
  if (!best) return succeed({ sheets: [], cost: 0, bound: 0, proven: true })
  const plan = solveCutting(best.problem, integerProgram)
  if (!plan.ok) return plan
  const { drafts } = best
  const sheets = plan.value.bars.map((bar): CutSheet => {
    const price = cheapestOf(stock, bar.stock)
    const groups = (bar.marks ?? []).flatMap((mark) => {
      const draft = drafts[Number(mark)]
      return draft ? [draft.pieces] : []
    })
    const levels = arrange(groups, kerf, (piece) => nests(piece)?.slope)
    return { length: bar.stock, price, levels, offcut: bar.offcut }
  })
  const { cost } = plan.value
  if (drafts.length === pieces.length && !fitsBeside(pieces, width, kerf))
    return succeed({ sheets, cost, bound: plan.value.bound, proven: plan.value.proven })
  const bound = Math.min(cost, widthBound(pieces, stock, width, kerf, nests))
  return succeed({ sheets, cost, bound, proven: cost <= bound + 1e-7 * Math.max(1, cost) })
}

/** What a plain plan costs, without the search for a better one. */
export function sheetEstimate(
  pieces: readonly SheetPiece[],
  stock: readonly SheetStock[],
  kerf: number,
): Result<number> {
  return firstCut(
    problemOf(compose(pieces, stock[0]?.width ?? 0, kerf, 0.75), stock, kerf, nestsOf(pieces, kerf)),
  )
}

/** Longest first, each into the first level that has width left and is not too much longer (`alike`). */
function compose(pieces: readonly SheetPiece[], width: number, kerf: number, alike: number): Draft[] {
  const slack = 1e-9 * width
  const narrowest = pieces.reduce((least, piece) => Math.min(least, piece.width), Number.POSITIVE_INFINITY)
  const sorted = pieces
    .map((piece, i) => ({ piece, i }))
    .sort((a, b) => b.piece.length - a.piece.length || b.piece.width - a.piece.width || a.i - b.i)
  const levels: Draft[] = []
  let open: Draft[] = []
  for (const { piece } of sorted) {
    const level = open.find(
      (one) => one.width + kerf + piece.width <= width + slack && piece.length >= alike * one.length - slack,
    )
    if (level) {
      level.width += kerf + piece.width
      level.pieces.push(piece)
      open = open.filter((one) => one.width + kerf + narrowest <= width + slack)
      continue
    }
    const fresh: Draft = { length: piece.length, width: piece.width, pieces: [piece] }
    levels.push(fresh)
    if (fresh.width + kerf + narrowest <= width + slack) open.push(fresh)
  }
  return levels
}

function problemOf(
  drafts: readonly Draft[],
  stock: readonly SheetStock[],
  kerf: number,
  nests: Nests,
): CuttingProblem {
  return {
    kerf,
    stock,
    pieces: drafts.map((draft, i) => {
      const [only, second] = draft.pieces
      const piece = { length: draft.length, count: 1, mark: String(i) }
      const nest = only && !second ? nests(only) : undefined
      return nest ? { ...piece, nest } : piece
    }),
  }
}

type Nests = (piece: SheetPiece) => Nest | undefined

/** By slope: what a pair saves is the least of its pieces' rises, less what the slanted cut takes more than a square one. */
function nestsOf(pieces: readonly SheetPiece[], kerf: number): Nests {
  const slopeOf = ({ width, rise }: SheetPiece): string | undefined =>
    rise === undefined || rise === 0 ? undefined : (rise / width).toFixed(6)
  const savings = new Map<string, number>()
  for (const piece of pieces) {
    const slope = slopeOf(piece)
    if (slope === undefined) continue
    const rise = piece.rise ?? 0
    const saving = Math.abs(rise) - (slantedKerf(piece.width, rise, kerf) - kerf)
    savings.set(slope, Math.min(savings.get(slope) ?? Number.POSITIVE_INFINITY, saving))
  }
  return (piece) => {
    const slope = slopeOf(piece)
    const saving = slope === undefined ? 0 : (savings.get(slope) ?? 0)
    return slope !== undefined && saving > 0 ? { slope, saving } : undefined
  }
}

function fitsBeside(pieces: readonly SheetPiece[], width: number, kerf: number): boolean {
  const [a, b] = pieces.map((piece) => piece.width).sort((x, y) => x - y)
  return a !== undefined && b !== undefined && a + kerf + b <= width * (1 + 1e-9)
}

/** A bound for many kinds of pieces may stay a little below the best one; it stays a bound. */
const mostPricings = 80

function widthBound(
  pieces: readonly SheetPiece[],
  stock: readonly SheetStock[],
  width: number,
  kerf: number,
  nests: Nests,
): number {
  const share = (piece: SheetPiece) => (piece.width + kerf) / (width + kerf)
  const shares = [...new Set(pieces.map(share).filter((value) => value <= 0.5))].sort((a, b) => a - b)
  const limits = [0, 0.5, ...shares.filter((_, i) => i % Math.ceil(shares.length / 6) === 0)]
  let bound = 0
  for (const limit of limits) {
    // Across any sheet these shares add up to one at most (a dual feasible function of Fekete and Schepers 2004).
    const counted = pieces.flatMap((piece) => {
      const x = share(piece)
      const part = x > 1 - limit + 1e-9 ? 1 : x < limit - 1e-9 ? 0 : Math.min(1, x)
      const length = (piece.length + kerf - (nests(piece)?.saving ?? 0) / 2) * part
      return length > 0 ? [{ length: Math.round(length * 1e9) / 1e9 - 1e-9, count: 1 }] : []
    })
    if (counted.length === 0) continue
    const shifted = stock.map((sheet) => ({ ...sheet, length: sheet.length + kerf }))
    const instance = toInstance({ kerf: 0, stock: shifted, pieces: counted })
    if (instance.ok)
      bound = Math.max(bound, stepUp(instance.value, relax(instance.value, { pricings: mostPricings }).bound))
  }
  return bound
}

function cheapestOf(stock: readonly SheetStock[], length: number): number {
  return stock.reduce(
    (least, sheet) => (sheet.length === length ? Math.min(least, sheet.price) : least),
    Number.POSITIVE_INFINITY,
  )
}
