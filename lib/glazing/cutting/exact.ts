import { costOf } from './constructive'
import { type Instance, oddOnes, type Pattern } from './problem'

/** An integer program in CPLEX LP format → its optimum, or undefined; `optimal` says that it is proven. */
export type SolveIntegerProgram = (
  model: string,
) =>
  | { readonly objective: number; readonly values: Readonly<Record<string, number>>; readonly bound: number }
  | undefined

/** Every maximal pattern of every stock option, or undefined when there are more than `limit`. */
export function maximalPatterns(instance: Instance, limit: number): Pattern[] | undefined {
  const found: Pattern[] = []
  const { weights, demands, tolerance } = instance
  const lightest = Math.min(...weights)
  let visits = 0
  for (const [s, option] of instance.stock.entries()) {
    const counts = weights.map(() => 0)
    const visit = (type: number, room: number): boolean => {
      visits += 1
      if (visits > limit * 20) return false
      const weight = weights[type]
      if (weight === undefined) {
        const alone = oddOnes(instance, counts)
        if (room + tolerance < alone) return true
        const maximal = weights.every((other, i) => {
          if ((counts[i] ?? 0) >= (demands[i] ?? 0)) return true
          if (!instance.nests[i]) return room - alone + tolerance < other
          const more = counts.map((count, k) => (k === i ? count + 1 : count))
          return room + tolerance < other + oddOnes(instance, more)
        })
        if (maximal) found.push({ stock: s, counts: [...counts] })
        return found.length <= limit
      }
      const most =
        room + tolerance < lightest
          ? 0
          : Math.min(demands[type] ?? 0, Math.floor((room + tolerance) / weight))
      for (let count = most; count >= 0; count -= 1) {
        counts[type] = count
        if (!visit(type + 1, room - count * weight)) return false
      }
      counts[type] = 0
      return true
    }
    if (!visit(0, option.capacity)) return undefined
  }
  return found
}

/** Covering program over the patterns: least cost, at least the demand, at most the stock there is. */
export function coveringProgram(instance: Instance, patterns: readonly Pattern[]): string {
  const cost = patterns.map((pattern, k) => `${number(instance.stock[pattern.stock]?.price ?? 0)} x${k}`)
  const rows = instance.demands.map((demand, i) => {
    const terms = patterns.flatMap((pattern, k) => {
      const count = pattern.counts[i] ?? 0
      return count > 0 ? [`${count} x${k}`] : []
    })
    return `d${i}: ${wrap(terms)} >= ${demand}`
  })
  const limits = instance.stock.flatMap((option, s) => {
    if (!Number.isFinite(option.available)) return []
    const terms = patterns.flatMap((pattern, k) => (pattern.stock === s ? [`x${k}`] : []))
    return terms.length > 0 ? [`s${s}: ${wrap(terms)} <= ${option.available}`] : []
  })
  return `Minimize\nobj: ${wrap(cost)}\nSubject To\n${[...rows, ...limits].join('\n')}\nGeneral\n${patterns
    .map((_, k) => `x${k}`)
    .join('\n')}\nEnd\n`
}

/** Bars of an integer solution, pieces beyond the demand left out. */
export function toBars(
  instance: Instance,
  patterns: readonly Pattern[],
  values: Readonly<Record<string, number>>,
): Pattern[] {
  const demands = [...instance.demands]
  const bars: Pattern[] = []
  patterns.forEach((pattern, k) => {
    const whole = Math.round(values[`x${k}`] ?? 0)
    for (let n = 0; n < whole; n += 1) {
      const counts = pattern.counts.map((count, i) => Math.min(count, demands[i] ?? 0))
      if (counts.every((count) => count === 0)) continue
      counts.forEach((count, i) => {
        demands[i] = (demands[i] ?? 0) - count
      })
      bars.push({ stock: pattern.stock, counts })
    }
  })
  return demands.every((demand) => demand === 0) ? bars : []
}

export function cheaper(instance: Instance, a: Pattern[] | undefined, b: Pattern[] | undefined) {
  if (!a || a.length === 0) return b
  if (!b || b.length === 0) return a
  return costOf(instance, b) < costOf(instance, a) - 1e-9 ? b : a
}

/** LP files take no exponent after a bare number in every reader, and lines of limited length. */
function number(value: number): string {
  return Number(value.toFixed(9)).toString().includes('e')
    ? value.toFixed(9)
    : String(Number(value.toFixed(9)))
}

function wrap(terms: readonly string[]): string {
  const lines: string[] = []
  for (let k = 0; k < terms.length; k += 8) lines.push(terms.slice(k, k + 8).join(' + '))
  return lines.join('\n + ')
}
