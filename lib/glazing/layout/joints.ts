import { fail, type Result, succeed } from '../../failures'

export const starts = ['left', 'centred', 'symmetrical'] as const
export type Start = (typeof starts)[number]
export const splicings = ['long', 'even'] as const
export type Splicing = (typeof splicings)[number]

/** T5 Joint lines stand on the rafter module when the strip allows, otherwise a strip apart. */
export function jointPitch(strip: number, rafterSpacing: number): number {
  const modules = Math.floor(strip / rafterSpacing + 1e-9)
  return modules >= 1 ? modules * rafterSpacing : strip
}

/**
 * T6 Starts: a full sheet at the left; a sheet centred; a joint in the middle and the same to both sides.
 * T7 A last strip narrower than the narrowest takes from its neighbour.
 */
export function jointLines(
  left: number,
  right: number,
  pitch: number,
  start: Start,
  narrowest: number,
): number[] {
  const width = right - left
  const slack = 1e-9 * Math.max(1, width)
  const first = { left: 0, centred: width / 2 - pitch / 2, symmetrical: width / 2 }[start]
  const lowest = -Math.floor(first / pitch + 1e-9)
  const lines: number[] = []
  for (let k = lowest; ; k += 1) {
    const at = first + k * pitch
    if (at >= width - slack) break
    if (at > slack) lines.push(left + at)
  }
  const [one, last] = [lines[0], lines.at(-1)]
  const least = Math.min(narrowest, width / 2, pitch / 2)
  if (one !== undefined && one - left < least - slack) lines[0] = left + least
  if (
    last !== undefined &&
    right - last < least - slack &&
    !(lines.length === 1 && one !== undefined && one - left < least)
  )
    lines[lines.length - 1] = right - least
  return lines
}

/** T8 Joint positions that a person gives: kept as they are, in order, when every strip can be cut. */
export function givenLines(
  name: string,
  left: number,
  right: number,
  given: readonly number[],
  strip: number,
): Result<number[]> {
  const lines = [...given].sort((a, b) => a - b)
  const slack = 1e-9 * Math.max(1, right - left)
  const edges = [left, ...lines, right]
  for (let i = 1; i < edges.length; i += 1) {
    const width = (edges[i] ?? 0) - (edges[i - 1] ?? 0)
    if (!(width > slack))
      return fail(
        'invalid',
        `${name}: expected joints apart from one another and within ${left} to ${right}.`,
      )
    if (width > strip + slack)
      return fail('invalid', `${name}: expected joints at most ${strip} apart, not ${width}.`)
  }
  return succeed(lines)
}

/**
 * T9 What is longer than the longest stock takes a splice over a purlin: as long as it may be from the bottom,
 * or as evenly as purlins allow. Panes of glass stand on their bars and need no purlin under a splice.
 */
export function spliceLines(
  bottom: number,
  top: number,
  limits: { readonly whole: number; readonly spliced: number },
  purlins: { readonly datum: number; readonly spacing: number } | undefined,
  how: Splicing,
  narrowest: number,
): number[] {
  const height = top - bottom
  const slack = 1e-9 * Math.max(1, height)
  if (height <= limits.whole + slack) return []
  const longest = limits.spliced
  const count = Math.ceil(height / longest - 1e-9)
  const onPurlin = (v: number, after: number): number => {
    if (!purlins) return v
    const line = purlins.datum + Math.floor((v - purlins.datum) / purlins.spacing + 1e-9) * purlins.spacing
    return line > after + narrowest ? line : v
  }
  const lines: number[] = []
  let at = bottom
  while (top - at > longest + slack && lines.length < 10_000) {
    const even = bottom + (height * (lines.length + 1)) / count
    let next = how === 'even' ? nearestPurlin(even, at + longest, purlins) : at + longest
    next = onPurlin(Math.min(next, at + longest), at)
    if (top - next < narrowest) next = onPurlin(top - narrowest, at)
    lines.push(next)
    at = next
  }
  return lines
}

function nearestPurlin(
  v: number,
  most: number,
  purlins: { readonly datum: number; readonly spacing: number } | undefined,
): number {
  if (!purlins) return v
  const line = purlins.datum + Math.round((v - purlins.datum) / purlins.spacing) * purlins.spacing
  return line > most ? line - purlins.spacing : line
}
