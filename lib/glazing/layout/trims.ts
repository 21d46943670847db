import { boundsOf, edgesOf, type Point } from '../geometry/polygon'
import type { Panel } from './pieces'

/** A straight or bent run that a profile covers, by its length. */
export interface Run {
  readonly kind: 'joint' | 'splice' | 'top' | 'bottom' | 'upright'
  readonly length: number
  /** Where it stands: the line's u of a joint, v of a splice, or the run's first corner. */
  readonly at: Point
}

interface Interval {
  readonly line: number
  readonly from: number
  readonly to: number
}

/**
 * T13 Joints stand where two panels share an upright edge, through splices in one run; splices where they share a level one.
 * What is left of the panels' edges is open: upper and lower flute ends, and free upright edges.
 */
export function runsOf(panels: readonly Panel[]): Run[] {
  const reach = panels.map((panel) => boundsOf(panel.polygon))
  const span = Math.max(1, ...reach.map((one) => Math.max(one.right - one.left, one.top - one.bottom)))
  const slack = 1e-8 * span
  const [rights, lefts, tops, bottoms]: [Interval[], Interval[], Interval[], Interval[]] = [[], [], [], []]
  const slants: { readonly kind: 'top' | 'bottom'; readonly from: Point; readonly to: Point }[] = []
  for (const { polygon } of panels)
    for (const [[u1, v1], [u2, v2]] of edgesOf(polygon)) {
      if (Math.abs(u1 - u2) <= slack) {
        if (Math.abs(v1 - v2) <= slack) continue
        if (v2 > v1) rights.push({ line: u1, from: v1, to: v2 })
        else lefts.push({ line: u1, from: v2, to: v1 })
      } else if (Math.abs(v1 - v2) <= slack) {
        if (u2 > u1) bottoms.push({ line: v1, from: u1, to: u2 })
        else tops.push({ line: v1, from: u2, to: u1 })
      } else if (u2 > u1) slants.push({ kind: 'bottom', from: [u1, v1], to: [u2, v2] })
      else slants.push({ kind: 'top', from: [u2, v2], to: [u1, v1] })
    }
  const upright = shared(rights, lefts, slack)
  const level = shared(tops, bottoms, slack)
  const segments = (['top', 'bottom'] as const).map((kind) => [
    ...(kind === 'top' ? level.first : level.second).map(({ line, from, to }) => ({
      from: [from, line] as Point,
      to: [to, line] as Point,
    })),
    ...slants.filter((slant) => slant.kind === kind),
  ])
  return [
    ...joined(upright.both, slack).map(
      (run): Run => ({ kind: 'joint', length: run.to - run.from, at: [run.line, run.from] }),
    ),
    ...joined(level.both, slack).map(
      (run): Run => ({ kind: 'splice', length: run.to - run.from, at: [run.from, run.line] }),
    ),
    ...chained(segments[0] ?? [], slack).map((run): Run => ({ kind: 'top', ...run })),
    ...chained(segments[1] ?? [], slack).map((run): Run => ({ kind: 'bottom', ...run })),
    ...joined([...upright.first, ...upright.second], slack).map(
      (run): Run => ({ kind: 'upright', length: run.to - run.from, at: [run.line, run.from] }),
    ),
  ]
}

/** Parts on the same line in both lists, and what is left of each. */
function shared(first: readonly Interval[], second: readonly Interval[], slack: number) {
  const both: Interval[] = []
  const rest = (one: Interval, others: readonly Interval[], keep: boolean): Interval[] => {
    let left = [one]
    for (const other of others) {
      if (Math.abs(other.line - one.line) > slack || other.from >= one.to || other.to <= one.from) continue
      left = left.flatMap((part) => {
        const [from, to] = [Math.max(part.from, other.from), Math.min(part.to, other.to)]
        if (to - from <= slack) return [part]
        if (keep) both.push({ line: one.line, from, to })
        return [
          { ...part, to: from },
          { ...part, from: to },
        ].filter((piece) => piece.to - piece.from > slack)
      })
    }
    return left
  }
  const [near, nearToo] = [byLine(second, slack), byLine(first, slack)]
  return {
    both,
    first: first.flatMap((one) => rest(one, near(one.line), true)),
    second: second.flatMap((one) => rest(one, nearToo(one.line), false)),
  }
}

/** Finds the intervals about a line without looking at all of them. */
function byLine(intervals: readonly Interval[], slack: number): (line: number) => readonly Interval[] {
  const width = 1e3 * slack
  const found = new Map<number, Interval[]>()
  for (const one of intervals) {
    const key = Math.round(one.line / width)
    const list = found.get(key)
    if (list) list.push(one)
    else found.set(key, [one])
  }
  return (line) => {
    const key = Math.round(line / width)
    return [key - 1, key, key + 1].flatMap((k) => found.get(k) ?? [])
  }
}

/** Touching intervals on one line as one. */
function joined(intervals: readonly Interval[], slack: number): Interval[] {
  const sorted = [...intervals].sort((a, b) =>
    Math.abs(a.line - b.line) > slack ? a.line - b.line : a.from - b.from,
  )
  const runs: Interval[] = []
  for (const next of sorted) {
    const last = runs.at(-1)
    if (last && Math.abs(last.line - next.line) <= slack && next.from <= last.to + slack)
      runs[runs.length - 1] = { ...last, to: Math.max(last.to, next.to) }
    else runs.push(next)
  }
  return runs
}

/** Segments from left to right whose ends meet, as one run each. */
function chained(segments: readonly { readonly from: Point; readonly to: Point }[], slack: number) {
  const sorted = [...segments].sort((a, b) => a.from[0] - b.from[0] || a.from[1] - b.from[1])
  const runs: { length: number; at: Point; end: Point }[] = []
  for (const { from, to } of sorted) {
    const length = Math.hypot(to[0] - from[0], to[1] - from[1])
    const before = runs.find((run) => Math.hypot(run.end[0] - from[0], run.end[1] - from[1]) <= 4 * slack)
    if (before) {
      before.length += length
      before.end = to
    } else runs.push({ length, at: from, end: to })
  }
  return runs.map(({ length, at }) => ({ length, at }))
}
