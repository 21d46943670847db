/** Statistics of the benchmarks; every function wants at least one number and leaves its argument as it is. */

export function minimum(numbers: readonly number[]): number {
  return percentile(numbers, 0)
}

export function median(numbers: readonly number[]): number {
  return percentile(numbers, 50)
}

export function maximum(numbers: readonly number[]): number {
  return percentile(numbers, 100)
}

/** Percentile `p` (0 to 100) with linear interpolation between the two nearest ranks. */
export function percentile(numbers: readonly number[], p: number): number {
  if (numbers.length === 0) throw new Error('a statistic of no numbers was asked for')
  const sorted = [...numbers].sort((a, b) => a - b)
  const rank = ((sorted.length - 1) * p) / 100
  const below = sorted[Math.floor(rank)] as number
  const above = sorted[Math.ceil(rank)] as number
  return below + (above - below) * (rank - Math.floor(rank))
}
