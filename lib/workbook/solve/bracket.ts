/** A point that was computed: the input, and how far the result is from the target. */
export interface Point {
  readonly input: number
  readonly off: number
}

export interface Bracket {
  readonly a: Point
  readonly b: Point
}

/** Off by how much at an input: 0 when near enough, a text when the result is no number there. */
export type Miss = (input: number) => Promise<number | string>

export type Found =
  | ({ readonly kind: 'bracket' } & Bracket)
  | { readonly kind: 'hit'; readonly input: number }
  | {
      readonly kind: 'failed'
      readonly least: Point
      readonly most: Point
      /** How far the search went. */
      readonly down: number
      readonly up: number
      /** What stood there instead of a number, where that ended the search. */
      readonly stoppedBy: string | undefined
    }

const growth = 1.7
const mostSteps = 60
const mostRetries = 12

/** One way out from the start. */
interface Way {
  readonly sign: 1 | -1
  readonly limit: number
  last: Point
  step: number
  retries: number
  open: boolean
}

/**
 * Goes out from `start` both ways in turn until two neighbouring points lie on either side of the target. A step into what is no
 * number is taken back and halved a few times, so that an answer close to such an edge is still found.
 */
export async function findBracket(miss: Miss, start: Point, low: number, high: number): Promise<Found> {
  const step = firstStep(start.input, low, high)
  const ways: Way[] = [1, -1].map((sign) => ({
    sign: sign as 1 | -1,
    limit: sign === 1 ? high : low,
    last: start,
    step,
    retries: 0,
    open: true,
  }))
  let [least, most] = [start, start]
  let stoppedBy: string | undefined
  for (let turn = 0; turn < 2 * mostSteps && ways.some(({ open }) => open); turn += 1) {
    const way = ways[turn % 2]
    if (!way?.open) continue
    const input = next(way)
    if (input === way.last.input || !Number.isFinite(input)) {
      way.open = false
      continue
    }
    const off = await miss(input)
    if (off === 0) return { kind: 'hit', input }
    if (typeof off === 'string') {
      stoppedBy = off
      way.retries += 1
      way.step /= 2
      way.open = way.retries <= mostRetries
      continue
    }
    const point = { input, off }
    if (Math.sign(off) !== Math.sign(way.last.off)) return { kind: 'bracket', a: way.last, b: point }
    if (off < least.off) least = point
    if (off > most.off) most = point
    way.last = point
    // Near an edge the steps stay small.
    if (way.retries === 0) way.step *= growth
  }
  const [up, down] = ways.map(({ last }) => last.input)
  return { kind: 'failed', least, most, up: up ?? start.input, down: down ?? start.input, stoppedBy }
}

function firstStep(from: number, low: number, high: number): number {
  const span = high - low
  const own = from === 0 ? 1 : Math.abs(from) * 0.05
  return Number.isFinite(span) && span > 0 ? Math.min(own, span / 8) : own
}

function next({ sign, limit, last, step }: Way): number {
  const input = last.input + sign * step
  return sign === 1 ? Math.min(input, limit) : Math.max(input, limit)
}
