import type { Bracket, Miss } from './bracket'

export type Narrowed =
  | { readonly kind: 'hit'; readonly input: number }
  | { readonly kind: 'broken'; readonly input: number; readonly text: string }
  /** As narrow as numbers go, and still on either side: a jump. */
  | ({ readonly kind: 'jump' } & Bracket)

/**
 * Interpolate, truncate, project (the ITP method of I. F. D. Oliveira and R. H. C. Takahashi, ACM Transactions on Mathematical
 * Software 47, 2020, from memory; κ1 = 0.2 over the bracket, κ2 = 2, n0 = 1): at most one step more than halving takes, and
 * usually far fewer.
 */
export async function narrow(miss: Miss, bracket: Bracket): Promise<Narrowed> {
  let { a, b } = bracket.a.input < bracket.b.input ? bracket : { a: bracket.b, b: bracket.a }
  const width = b.input - a.input
  const least = Math.max(Math.abs(a.input), Math.abs(b.input), width) * 2 ** -50
  const halvings = Math.max(0, Math.ceil(Math.log2(width / (2 * least))))
  for (let step = 0; b.input - a.input > 2 * least; step += 1) {
    const span = b.input - a.input
    const middle = a.input + span / 2
    const radius = Math.max(0, least * 2 ** (halvings + 1 - step) - span / 2)
    const secant = (b.off * a.input - a.off * b.input) / (b.off - a.off)
    const side = Math.sign(middle - secant)
    const truncation = (0.2 / width) * span ** 2
    const truncated = truncation <= Math.abs(middle - secant) ? secant + side * truncation : middle
    const near = Math.abs(truncated - middle) <= radius ? truncated : middle - side * radius
    const input = near > a.input && near < b.input ? near : middle
    if (input <= a.input || input >= b.input) break
    const off = await miss(input)
    if (off === 0) return { kind: 'hit', input }
    if (typeof off === 'string') return { kind: 'broken', input, text: off }
    const point = { input, off }
    if (Math.sign(off) === Math.sign(a.off)) a = point
    else b = point
  }
  return { kind: 'jump', a, b }
}
