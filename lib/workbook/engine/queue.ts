import { limits } from '../limits'
import type { Operation } from '../operations'
import type { TriedValues } from './protocol'

export interface TryOutTask {
  /** A try-out gives way to a newer one that waits; one of many (`try-next`) does not. */
  readonly kind: 'try-out' | 'try-next'
  readonly operations: readonly Operation[]
  readonly names: readonly string[]
  readonly resolve: (values: TriedValues) => void
  readonly reject: (error: Error) => void
}

export type Task = { readonly kind: 'apply'; readonly operations: readonly Operation[] } | TryOutTask

/** Operations computed together at most: a reply to many at once would come late. */
const mostTogether = limits.operationsInBatch * 5

/**
 * Adds a task to those that wait. Operations that wait next to each other are computed together; of try-outs that wait only
 * the newest is made, since it is what the person sees now.
 */
export function enqueue(waiting: readonly Task[], task: Task): Task[] {
  if (task.kind === 'try-out') {
    const kept = waiting.filter((each) => {
      if (each.kind === 'try-out') each.reject(new Error('A newer try-out took its place.'))
      return each.kind !== 'try-out'
    })
    return [...kept, task]
  }
  if (task.kind === 'try-next') return [...waiting, task]
  const last = waiting.at(-1)
  if (last?.kind === 'apply' && last.operations.length + task.operations.length <= mostTogether) {
    return [...waiting.slice(0, -1), { kind: 'apply', operations: [...last.operations, ...task.operations] }]
  }
  return [...waiting, task]
}
