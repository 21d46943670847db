import { fail, type Result, succeed } from '../../failures'
import { relax } from './column-generation'
import { type Bars, constructive, costOf, downsize, repeatedFilling } from './constructive'
import { cheaper, coveringProgram, maximalPatterns, type SolveIntegerProgram, toBars } from './exact'
import { pricerOf } from './pricing'
import {
  type Bar,
  type CuttingPlan,
  type CuttingProblem,
  type Instance,
  type Pattern,
  toInstance,
  typeKey,
  used,
} from './problem'
import { type Dive, roundRelaxation } from './rounding'

/**
 * Least cost, then least waste, then fewest bars. Column generation bounds the cost and nearly always gives the
 * plan; the integer program (when given) closes what gap is left over all maximal patterns; a constructive plan is
 * always kept to fall back on. Effort is counted, never timed: the same input gives the same plan.
 * Errors: `invalid` when a piece fits no stock or a number is not what it should be; `limit` when the stock does not suffice.
 */
export function solveCutting(
  problem: CuttingProblem,
  integerProgram?: SolveIntegerProgram,
): Result<CuttingPlan> {
  const made = toInstance(problem)
  if (!made.ok) return made
  const instance = made.value
  if (instance.demands.length === 0) return succeed({ bars: [], cost: 0, waste: 0, bound: 0, proven: true })

  const available = instance.stock.map((option) => option.available)
  let best = plainPlan(instance)
  if (instance.demands.length > mostTypes) {
    const bound = stepUp(instance, boundByLength(instance))
    return best ? succeed(toPlan(problem, instance, best, bound)) : tooLittle()
  }
  const pricer = pricerOf(instance)
  const relaxation = relax(instance, { start: distinctOf(best), pricer })
  let bound = stepUp(instance, relaxation.bound)
  const done = () => best !== undefined && costOf(instance, best) <= bound + slack(bound)
  const near = () => best !== undefined && costOf(instance, best) <= bound * farOff
  for (const [k, dive] of [...dives, ...moreDives].entries()) {
    if (done() || (k >= dives.length && near())) break
    best = cheaper(instance, best, roundRelaxation(instance, relaxation, pricer, dive, bound + slack(bound)))
  }
  if (integerProgram && !done()) {
    const all = maximalPatterns(instance, 1_500)
    const patterns = all ?? relaxation.pool
    const solved = integerProgram(coveringProgram(instance, patterns))
    if (solved) {
      best = cheaper(instance, best, toBars(instance, patterns, solved.values))
      if (all) bound = Math.max(bound, stepUp(instance, solved.bound))
    }
  }
  if (!best || best.length === 0) return tooLittle()
  return succeed(toPlan(problem, instance, downsize(instance, best, available), bound))
}

/** Cost of a plain best-fit plan: a first answer, without bound or search. Errors as `solveCutting`. */
export function firstCut(problem: CuttingProblem): Result<number> {
  const made = toInstance(problem)
  if (!made.ok) return made
  const bars = plainPlan(made.value)
  return bars ? succeed(costOf(made.value, bars)) : tooLittle()
}

/** Above this many different lengths a plain plan is made, and its distance from the bound by length stated. */
const mostTypes = 400
/** Above this many pieces they are not looked at one by one. */
const mostSingly = 3_000

function plainPlan(instance: Instance): Bars | undefined {
  const available = instance.stock.map((option) => option.available)
  const many = instance.demands.reduce((sum, count) => sum + count, 0)
  if (many > mostSingly) return repeatedFilling(instance, available)
  return constructive(instance, instance.demands, available, 0)
}

/** No plan costs less than all the length that is needed at the cheapest price by length. */
function boundByLength(instance: Instance): number {
  const needed = instance.demands.reduce((sum, count, i) => sum + count * (instance.weights[i] ?? 0), 0)
  return needed * Math.min(...instance.stock.map((option) => option.price / option.capacity))
}

function tooLittle() {
  return fail('limit', 'The stock that is available does not suffice for all pieces.')
}

const dives: readonly Dive[] = [
  { together: 0.7, by: 'part', shuffles: 4 },
  { together: 1, by: 'filling', shuffles: 4 },
  { together: 0.5, by: 'filling', shuffles: 4 },
]
/** Small jobs can stay further off; there the search is cheap. */
const farOff = 1.003
const moreDives: readonly Dive[] = [
  { together: 1, by: 'part', shuffles: 24 },
  { together: 0.85, by: 'filling', shuffles: 24 },
  { together: 0.6, by: 'part', shuffles: 24 },
]

function distinctOf(bars: Bars | undefined): Pattern[] {
  const seen = new Map<string, Pattern>()
  for (const bar of bars ?? []) seen.set(`${bar.stock}:${bar.counts.join()}`, bar)
  return [...seen.values()]
}

function slack(bound: number): number {
  return 1e-7 * Math.max(1, Math.abs(bound))
}

/** Costs come in steps of the prices' common measure, so a bound rises to the next step. */
export function stepUp(instance: Instance, bound: number): number {
  const cents = instance.stock.map((option) => Math.round(option.price * 1e4))
  if (instance.stock.some((option, s) => Math.abs(option.price * 1e4 - (cents[s] ?? 0)) > 1e-6)) return bound
  const step = cents.reduce(greatestCommonDivisor, 0) / 1e4
  return step > 0 ? Number((Math.ceil(bound / step - 1e-6) * step).toPrecision(12)) : bound
}

function greatestCommonDivisor(a: number, b: number): number {
  return b === 0 ? a : greatestCommonDivisor(b, a % b)
}

function toPlan(problem: CuttingProblem, instance: Instance, bars: Bars, bound: number): CuttingPlan {
  const marks = new Map<string, { readonly mark: string; left: number }[]>()
  for (const piece of problem.pieces) {
    const list = marks.get(typeKey(piece)) ?? []
    if (piece.count > 0) list.push({ mark: piece.mark ?? '', left: piece.count })
    marks.set(typeKey(piece), list)
  }
  const at = new Map<string, number>()
  const nextMark = (type: number): string => {
    const key = instance.keys[type] ?? ''
    const first = marks.get(key)?.[at.get(key) ?? 0]
    if (!first) return ''
    first.left -= 1
    if (first.left === 0) at.set(key, (at.get(key) ?? 0) + 1)
    return first.mark
  }
  const marked = problem.pieces.some((piece) => piece.mark !== undefined)
  const order = bars
    .map((bar) => ({ bar, option: instance.stock[bar.stock] }))
    .sort(
      (a, b) =>
        (b.option?.length ?? 0) - (a.option?.length ?? 0) || compareCounts(a.bar.counts, b.bar.counts),
    )
  const cut: Bar[] = order.map(({ bar, option }) => {
    const types = bar.counts.flatMap((count, i) => new Array<number>(count).fill(i))
    const pieces = types.map((type) => instance.lengths[type] ?? 0)
    const length = option?.length ?? 0
    const offcut = Math.max(0, length - used(instance, bar.counts))
    const named = marked ? { marks: types.map(nextMark) } : {}
    return { stock: length, pieces, ...named, offcut: offcut < instance.tolerance ? 0 : offcut }
  })
  const cost = costOf(instance, bars)
  const bought = cut.reduce((sum, bar) => sum + bar.stock, 0)
  const needed = problem.pieces.reduce((sum, piece) => sum + piece.length * piece.count, 0)
  const lower = Math.min(bound, cost)
  return { bars: cut, cost, waste: bought - needed, bound: lower, proven: cost <= lower + slack(lower) }
}

function compareCounts(a: readonly number[], b: readonly number[]): number {
  for (let i = 0; i < a.length; i += 1) {
    const difference = (b[i] ?? 0) - (a[i] ?? 0)
    if (difference !== 0) return difference
  }
  return 0
}
