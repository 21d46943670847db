import { limits } from '../limits'
import type { CellPatch, Operation } from '../operations'
import { groundAfter, type SheetGround } from './ground'
import { transform } from './transform'

export interface Rebased {
  readonly operations: Operation[]
  /** The same, one list for each of `pending`: an operation may become several, or none. */
  readonly each: Operation[][]
  /** `over` as it reads on top of `pending`. */
  readonly over: Operation[]
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
  const each: Operation[][] = []
  const dropped: Operation[] = []
  let others: readonly Operation[] = over
  let ground: readonly SheetGround[] = sheets.map(({ id, name }) => ({ id, name }))
  for (const operation of pending) {
    const [moved, followed] = cross([operation], others, ground)
    if (lostPart(operation, moved)) dropped.push(operation)
    each.push(moved)
    others = followed
    ground = groundAfter(ground, operation)
  }
  return { operations: each.flat(), each, over: [...others], dropped }
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
  const moved: Operation[] = []
  let others: Operation[] = [...theirs]
  let sheets = ground
  for (const operation of mine) {
    const [after, followed] = crossOne(operation, others, sheets)
    for (const each of after) moved.push(each)
    others = followed
    sheets = groundAfter(sheets, operation)
  }
  return [moved, others]
}

function crossOne(
  operation: Operation,
  theirs: readonly Operation[],
  ground: readonly SheetGround[],
): [Operation[], Operation[]] {
  let moved: Operation[] = [operation]
  const followed: Operation[] = []
  let sheets = ground
  for (const other of theirs) {
    const [only] = moved
    if (moved.length === 1 && only) {
      for (const each of transform(other, only, sheets, 'first')) followed.push(each)
      moved = transform(only, other, sheets, 'second')
    } else {
      const [after, others] = cross(moved, [other], sheets)
      for (const each of others) followed.push(each)
      moved = after
    }
    sheets = groundAfter(sheets, other)
  }
  return [moved, followed]
}

function lostPart(operation: Operation, moved: readonly Operation[]): boolean {
  // Units that somebody else converted at the same time are what was asked for.
  if (operation.kind === 'convert-units') return false
  if (moved.length === 0) return true
  if (operation.kind !== 'set-cells') return false
  const kept = moved.reduce((sum, each) => sum + (each.kind === 'set-cells' ? each.cells.length : 0), 0)
  return kept < operation.cells.length
}

/**
 * Two neighbouring operations as one that does the same, or undefined when they cannot be one:
 * only `set-cells` of one sheet, written in one system, within the limit of cells.
 */
export function squash(a: Operation, b: Operation): Operation | undefined {
  if (a.kind !== 'set-cells' || b.kind !== 'set-cells' || a.sheet !== b.sheet) return undefined
  // Numbers in the other system take the quantity that their cell has at their turn: they are not put together.
  if (a.system !== undefined || b.system !== undefined) return undefined
  const merged = new Map<number, CellPatch>()
  for (const cell of [...a.cells, ...b.cells]) {
    const key = cell.row * limits.columns + cell.column
    merged.set(key, { ...merged.get(key), ...cell })
  }
  if (merged.size > limits.cellsInOperation) return undefined
  return { ...a, cells: [...merged.values()] }
}
