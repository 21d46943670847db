import type { LineOperation } from '../apply/lines'
import { lineChangeOf } from '../apply/lines'
import { type LineChange, landing, lineAfter } from '../formula/lines'

/** Which of two operations that start from the same state comes first in the log: the other gives way to it. */
export type Side = 'first' | 'second'

/**
 * A change of lines as it reads after another change of the same lines.
 *
 * W30 Insertion at one place: what comes first in the log stays there, the second goes behind it.
 * W31 A removal removes the lines it meant, wherever they are, and none that were inserted among them.
 * W32 A move takes its lines along, with what was inserted among them; lines that were scattered are not moved.
 */
export function linesOver(operation: LineOperation, other: LineOperation, side: Side): LineOperation[] {
  const change = lineChangeOf(other)
  switch (operation.kind) {
    case 'insert-lines':
      return [{ ...operation, at: gapAfter(change, operation.at, side) }]
    case 'remove-lines':
      return runsAfter(change, operation.at, operation.count)
        .reverse()
        .map(([at, count]) => ({ ...operation, at, count }))
    case 'move-lines':
      return moveOver(operation, change, side)
  }
}

function moveOver(
  operation: Extract<LineOperation, { kind: 'move-lines' }>,
  change: LineChange,
  side: Side,
): LineOperation[] {
  const runs = runsAfter(change, operation.at, operation.count)
  const first = runs[0]
  const last = runs.at(-1)
  if (!first || !last) return []
  const at = first[0]
  const end = last[0] + last[1]
  const onlyInserted = change.kind === 'insert'
  if (runs.length > 1 && !onlyInserted) return []
  const to = gapAfter(change, operation.to, side)
  if (to >= at && to <= end) return []
  return [{ ...operation, at, count: end - at, to }]
}

/** Where the gap before a line is afterwards: a place for lines to come to, not a line. */
export function gapAfter(change: LineChange, gap: number, side: Side): number {
  const { at, count } = change
  switch (change.kind) {
    case 'insert':
      return gap > at || (gap === at && side === 'second') ? gap + count : gap
    case 'remove':
      return gap <= at ? gap : gap < at + count ? at : gap - count
    case 'move': {
      const place = landing(change)
      if (place === at) return gap
      if (gap > at && gap < at + count) return gap - at + place
      const closed = gap <= at ? gap : gap - count
      return closed > place || (closed === place && side === 'second') ? closed + count : closed
    }
  }
}

/** Lines `at` and following as runs of neighbours after a change, in ascending order. */
function runsAfter(change: LineChange, at: number, count: number): [at: number, count: number][] {
  const lines: number[] = []
  for (let line = at; line < at + count; line += 1) {
    const after = lineAfter(change, line)
    if (after !== undefined) lines.push(after)
  }
  lines.sort((a, b) => a - b)
  const runs: [number, number][] = []
  for (const line of lines) {
    const run = runs.at(-1)
    if (run && run[0] + run[1] === line) run[1] += 1
    else runs.push([line, 1])
  }
  return runs
}
