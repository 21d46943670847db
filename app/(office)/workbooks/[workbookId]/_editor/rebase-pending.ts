import { type Operation, rebase, type SheetGround } from '@/lib/workbook'
import type { QueuedOperation } from './queue'

export interface RebasedPending {
  readonly pending: QueuedOperation[]
  /** Whose ground is gone, wholly or in part. */
  readonly lost: QueuedOperation[]
  /** The others, as they read on top of the pending operations as those were. */
  readonly over: readonly Operation[]
}

/**
 * Pending operations as they read after `others`, which came first in the log; both start from a workbook with these
 * `sheets`. An operation that becomes several keeps its id for the first and gets new ones for the rest.
 */
export function rebasePending(
  sheets: readonly SheetGround[],
  pending: readonly QueuedOperation[],
  others: readonly Operation[],
  newId: () => string,
): RebasedPending {
  if (others.length === 0) return { pending: [...pending], lost: [], over: [] }
  const rebased = rebase(
    sheets,
    pending.map(({ op }) => op),
    others,
  )
  const dropped = new Set(rebased.dropped)
  return {
    pending: pending.flatMap(({ id, batch, label }, i) =>
      (rebased.each[i] ?? []).map((op, part) => ({ id: part === 0 ? id : newId(), batch, label, op })),
    ),
    lost: pending.filter(({ op }) => dropped.has(op)),
    over: rebased.over,
  }
}
