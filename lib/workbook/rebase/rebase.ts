import { limits } from '../limits'
import type { CellPatch, Operation } from '../operations'
import { groundAfter, type SheetGround } from './ground'
import { transform } from './transform'

export interface Rebased {
  readonly operations: Operation[]
  /** Those of `pending`, as given, of which nothing or not all is left: their ground is gone. */
  readonly dropped: Operation[]
}

/**
 * Pending operations as they read after others that came first in the log. Both lists start from the same state, whose
 * sheets are `sheets` (a workbook's `sheets` will do). Whoever applies the log and then the result gets what everybody gets.
 * An operation that the new state refuses (a name taken meanwhile, the last row) stays in the list: applying it says why.
 */
export function rebase(
  sheets: readonly SheetGround[],
  pending: readonly Operation[],
  over: readonly Operation[],
): Rebased {
  const operations: Operation[] = []
  const dropped: Operation[] = []
  let others: readonly Operation[] = over
  let ground: readonly SheetGround[] = sheets.map(({ id, name }) => ({ id, name }))
  for (const operation of pending) {
    const [moved, followed] = cross([operation], others, ground)
    if (lostPart(operation, moved)) dropped.push(operation)
    operations.push(...moved)
    others = followed
    ground = groundAfter(ground, operation)
  }
  return { operations, dropped }
}

/**
 * `mine` after `theirs`, and `theirs` after `mine`; `theirs` come first in the log. Each list is one after another,
 * both start from `ground`.
 */
function cross(
  mine: readonly Operation[],
  theirs: readonly Operation[],
  ground: readonly SheetGround[],
): [Operation[], Operation[]] {
  const [a] = mine
  const [b] = theirs
  if (a === undefined || b === undefined) return [[...mine], [...theirs]]
  if (mine.length === 1 && theirs.length === 1) {
    return [transform(a, b, ground, 'second'), transform(b, a, ground, 'first')]
  }
  if (mine.length > 1) {
    const [firstMoved, theirsAfter] = cross([a], theirs, ground)
    const [restMoved, theirsEnd] = cross(mine.slice(1), theirsAfter, groundAfter(ground, a))
    return [[...firstMoved, ...restMoved], theirsEnd]
  }
  const [moved, firstAfter] = cross([a], [b], ground)
  const [mineEnd, restAfter] = cross(moved, theirs.slice(1), groundAfter(ground, b))
  return [mineEnd, [...firstAfter, ...restAfter]]
}

function lostPart(operation: Operation, moved: readonly Operation[]): boolean {
  if (moved.length === 0) return true
  if (operation.kind !== 'set-cells') return false
  const kept = moved.reduce((sum, each) => sum + (each.kind === 'set-cells' ? each.cells.length : 0), 0)
  return kept < operation.cells.length
}

/**
 * Two neighbouring operations as one that does the same, or undefined when they cannot be one:
 * only `set-cells` of one sheet, within the limit of cells.
 */
export function squash(a: Operation, b: Operation): Operation | undefined {
  if (a.kind !== 'set-cells' || b.kind !== 'set-cells' || a.sheet !== b.sheet) return undefined
  const merged = new Map<number, CellPatch>()
  for (const cell of [...a.cells, ...b.cells]) {
    const key = cell.row * limits.columns + cell.column
    merged.set(key, { ...merged.get(key), ...cell })
  }
  if (merged.size > limits.cellsInOperation) return undefined
  return { kind: 'set-cells', sheet: a.sheet, cells: [...merged.values()] }
}
