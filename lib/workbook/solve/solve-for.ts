import { fail, type Result, succeed } from '../../failures'
import { type CellValue, isCellError } from '../model'
import { type Bracket, findBracket } from './bracket'
import { narrow } from './narrow'

/** Computes the result for a value of the input; the promise is rejected when it was given up. */
export type Evaluate = (input: number) => Promise<CellValue>

export interface SolveRequest {
  /** The input's present value: the search begins there and finds the nearest answer. */
  readonly from: number
  readonly low?: number
  readonly high?: number
  readonly target: number
  /** How far from the target the result may stay, in the result's unit; 0 asks for exactly it. */
  readonly tolerance: number
  /** How numbers are written in a refusal; plain without. */
  readonly sayInput?: (value: number) => string
  readonly sayResult?: (value: number) => string
}

export interface Solved {
  readonly input: number
  /** How often the result was computed. */
  readonly iterations: number
}

/**
 * The value of one input that brings a result to a target.
 *
 * V1 From the present value the search goes out both ways, in growing steps and within the limits, until the target lies between
 *    two results; then it narrows them down. No derivative is asked for, and an answer never lies outside of what was bracketed.
 * V2 A refusal says why: no number to begin with, no effect, limits reached, no crossing found, or a jump over the target.
 * V3 Where the result is no number, the search goes no further that way.
 */
export async function solveFor(evaluate: Evaluate, request: SolveRequest): Promise<Result<Solved>> {
  const { from, low = Number.NEGATIVE_INFINITY, high = Number.POSITIVE_INFINITY, target, tolerance } = request
  const sayInput = request.sayInput ?? plain
  const sayResult = request.sayResult ?? plain
  if (![from, target, tolerance].every(Number.isFinite) || tolerance < 0 || low > high) {
    return fail('invalid', 'Expected numbers, and a lower limit below the upper one.')
  }
  if (from < low || from > high) {
    return fail('invalid', `The present value, ${sayInput(from)}, is outside of the limits.`)
  }
  let iterations = 0
  const miss = async (input: number): Promise<number | string> => {
    iterations += 1
    const value = await evaluate(input)
    if (typeof value === 'number' && Number.isFinite(value)) {
      const off = value - target
      return Math.abs(off) <= tolerance ? 0 : off
    }
    return value !== null && isCellError(value)
      ? value.text
      : `it is ${value === null ? 'blank' : String(value)}`
  }
  try {
    const start = await miss(from)
    if (typeof start === 'string') return fail('invalid', `The result is no number to begin with: ${start}`)
    if (start === 0) return succeed({ input: from, iterations })
    const found = await findBracket(miss, { input: from, off: start }, low, high)
    if (found.kind === 'failed') {
      return fail('invalid', notBracketed(found, target, low, high, sayInput, sayResult))
    }
    if (found.kind === 'hit') return succeed({ input: found.input, iterations })
    const narrowed = await narrow(miss, found)
    if (narrowed.kind === 'hit') return succeed({ input: narrowed.input, iterations })
    if (narrowed.kind === 'broken') {
      return fail('invalid', `At ${sayInput(narrowed.input)} the result is no number: ${narrowed.text}`)
    }
    return fail('invalid', jump(narrowed, target, sayInput, sayResult))
  } catch (cause) {
    return fail('unavailable', cause instanceof Error ? cause.message : 'The calculation was given up.')
  }
}

type Words = (value: number) => string

function notBracketed(
  found: Extract<Awaited<ReturnType<typeof findBracket>>, { kind: 'failed' }>,
  target: number,
  low: number,
  high: number,
  sayInput: Words,
  sayResult: Words,
): string {
  const { least, most, down, up } = found
  if (least.off === most.off) {
    return `The result stays at ${sayResult(least.off + target)} whatever this input is.`
  }
  const nearest = Math.abs(least.off) < Math.abs(most.off) ? least : most
  const span = `Between ${sayInput(down)} and ${sayInput(up)} the result goes from ${sayResult(least.off + target)} to ${sayResult(most.off + target)}`
  const close = `the nearest is at ${sayInput(nearest.input)}`
  const limited = down <= low || up >= high || found.stoppedBy !== undefined
  const why = found.stoppedBy === undefined ? '' : ` Beyond, it is no number: ${found.stoppedBy}`
  return limited
    ? `${span} and does not reach ${sayResult(target)} within the limits; ${close}.${why}`
    : `${span} and does not cross ${sayResult(target)}; ${close}.`
}

function jump({ a, b }: Bracket, target: number, sayInput: Words, sayResult: Words): string {
  const [one, other] = a.off < b.off ? [a, b] : [b, a]
  return `The result jumps over ${sayResult(target)} near ${sayInput(a.input)}: from ${sayResult(one.off + target)} to ${sayResult(other.off + target)}.`
}

function plain(value: number): string {
  return String(Number(value.toPrecision(6)))
}
