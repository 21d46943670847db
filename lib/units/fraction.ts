/** An exact ratio, in lowest terms; `over` is positive. Conversion factors stay exact until the one division. */
export interface Fraction {
  readonly times: bigint
  readonly over: bigint
}

/** Reads a plain decimal ("0.3048", "1055.05585262", "12") exactly. Throws on anything else: factors are ours. */
export function exact(decimal: string): Fraction {
  const match = /^(\d+)(?:\.(\d+))?$/.exec(decimal)
  if (!match) throw new Error(`not a plain decimal: ${decimal}`)
  const digits = match[2] ?? ''
  return reduce(BigInt(`${match[1]}${digits}`), 10n ** BigInt(digits.length))
}

export function product(...factors: readonly Fraction[]): Fraction {
  return factors.reduce((a, b) => reduce(a.times * b.times, a.over * b.over), one)
}

export function quotient(a: Fraction, b: Fraction): Fraction {
  return reduce(a.times * b.over, a.over * b.times)
}

export function reciprocal(a: Fraction): Fraction {
  return { times: a.over, over: a.times }
}

export const one: Fraction = { times: 1n, over: 1n }

function reduce(times: bigint, over: bigint): Fraction {
  const divisor = gcd(times, over)
  return { times: times / divisor, over: over / divisor }
}

function gcd(a: bigint, b: bigint): bigint {
  return b === 0n ? a : gcd(b, a % b)
}
