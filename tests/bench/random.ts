/** Seeded 32-bit generator (mulberry32, public domain): the same seed gives the same numbers on every machine. */
export interface Random {
  /** In [0, 1). */
  next(): number
  /** A whole number in [from, to]. */
  whole(from: number, to: number): number
}

export function createRandom(seed: number): Random {
  let state = seed >>> 0
  const next = () => {
    state = (state + 0x6d2b79f5) >>> 0
    let t = state
    t = Math.imul(t ^ (t >>> 15), t | 1)
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61)
    return ((t ^ (t >>> 14)) >>> 0) / 4_294_967_296
  }
  return { next, whole: (from, to) => from + Math.floor(next() * (to - from + 1)) }
}
