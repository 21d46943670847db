import { type CellAddress, type Operation, rebase, type SheetGround } from '@/lib/workbook'

/** One action of one's own: what takes it back, and where it was. */
export interface UndoStep {
  readonly label: string
  /** The batch that the inverse takes back. */
  readonly batch: string
  readonly inverse: readonly Operation[]
  readonly place: CellAddress | undefined
  /** Set when somebody else's later change has left nothing of it to take back. */
  readonly blocked?: boolean
}

/** Newest last. Each step's inverse applies to the workbook as it is once the steps above it are taken back. */
export class UndoStack {
  private steps: UndoStep[] = []

  constructor(private readonly depth = 500) {}

  get top(): UndoStep | undefined {
    return this.steps.at(-1)
  }

  push(step: UndoStep): void {
    this.steps.push(step)
    if (this.steps.length > this.depth) this.steps.shift()
  }

  pop(): UndoStep | undefined {
    return this.steps.pop()
  }

  clear(): void {
    this.steps = []
  }

  /** Takes a refused action out; the steps above it have their inverses made anew by the caller. */
  remove(batch: string): void {
    this.steps = this.steps.filter((step) => step.batch !== batch)
  }

  /** Batches that were applied again have new inverses, over what is there now. */
  refresh(inverses: ReadonlyMap<string, readonly Operation[]>): void {
    this.steps = this.steps.map((step) => {
      const inverse = inverses.get(step.batch)
      return inverse ? { ...step, inverse, blocked: false } : step
    })
  }

  /**
   * Somebody else's operations were applied to the workbook as it is now, whose sheets are `sheets`. Every inverse
   * moves along with them, and gives up the cells that the other has written since: undo never takes back what
   * somebody else did. Batches in `pending` are applied anew and get new inverses instead.
   */
  follow(
    sheets: readonly SheetGround[],
    operations: readonly Operation[],
    pending: ReadonlySet<string> = new Set(),
  ): void {
    let others = operations
    for (let i = this.steps.length - 1; i >= 0 && others.length > 0; i -= 1) {
      const step = this.steps[i]
      if (!step) continue
      const place = step.place && operations.reduce(followPlace, step.place)
      const inverse: Operation[] = []
      for (const operation of step.inverse) {
        inverse.push(...passUnder(sheets, operation, others))
        others = rebase(sheets, [operation], others).over
      }
      const blocked = inverse.length === 0 && !pending.has(step.batch)
      this.steps[i] = { ...step, inverse, place, blocked }
    }
  }
}

/** One operation of an inverse after the others, one at a time, without what they wrote. */
function passUnder(
  sheets: readonly SheetGround[],
  operation: Operation,
  others: readonly Operation[],
): readonly Operation[] {
  let pieces: readonly Operation[] = [operation]
  for (const other of others) {
    let here: readonly Operation[] = [other]
    const moved: Operation[] = []
    for (const piece of pieces) {
      for (const kept of without(piece, here)) moved.push(...rebase(sheets, [kept], here).operations)
      here = rebase(sheets, [piece], here).over
    }
    pieces = moved
  }
  return pieces
}

/** A set of cells less those that `others` wrote too. */
function without(inverse: Operation, others: readonly Operation[]): Operation[] {
  if (inverse.kind !== 'set-cells') return [inverse]
  const taken = new Set<string>()
  for (const other of others) {
    if (other.kind !== 'set-cells' || other.sheet !== inverse.sheet) continue
    for (const patch of other.cells) taken.add(`${patch.row} ${patch.column}`)
  }
  if (taken.size === 0) return [inverse]
  const cells = inverse.cells.filter((patch) => !taken.has(`${patch.row} ${patch.column}`))
  return cells.length === 0 ? [] : [{ ...inverse, cells }]
}

function followPlace(place: CellAddress, operation: Operation): CellAddress {
  if (operation.kind !== 'insert-lines' && operation.kind !== 'remove-lines') return place
  if (operation.sheet !== place.sheet) return place
  const index = operation.axis === 'row' ? place.row : place.column
  const by = operation.kind === 'insert-lines' ? operation.count : -operation.count
  if (index < operation.at) return place
  const moved = Math.max(operation.at, index + by)
  return operation.axis === 'row' ? { ...place, row: moved } : { ...place, column: moved }
}
