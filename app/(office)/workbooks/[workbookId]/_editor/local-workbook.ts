import { type Failure, fail, type Result, succeed } from '@/lib/failures'
import {
  type Applied,
  applyOperation,
  type CellAddress,
  type LoggedOperation,
  type Operation,
  type SheetGround,
  type Workbook,
} from '@/lib/workbook'
import type { QueuedOperation } from './queue'
import { rebasePending } from './rebase-pending'
import { UndoStack } from './undo'

/** One of one's own operations that the server has not acknowledged, as it was applied here. */
export interface PendingOperation extends QueuedOperation {
  readonly inverse: readonly Operation[]
}

/** What the engine and the grid have to follow: operations in the order they were applied, and the cells they touched. */
export interface Followed {
  readonly operations: readonly Operation[]
  readonly touched: readonly CellAddress[]
}

/**
 * The workbook as this tab sees it: what the server has acknowledged up to `base`, with one's own pending
 * operations on top. Knows nothing of the network, of storage or of the engine; `onFollow` feeds those.
 */
export class LocalWorkbook {
  readonly undone = new UndoStack()
  readonly done = new UndoStack()
  pending: PendingOperation[] = []
  /** Told what others did, as it reads on top of everything here, before it is applied. */
  onForeign: (
    operations: readonly Operation[],
    sheets: readonly SheetGround[],
    logged: readonly LoggedOperation[],
  ) => void = () => undefined

  constructor(
    readonly workbook: Workbook,
    public base: number,
    private readonly newId: () => string,
    private readonly onFollow: (followed: Followed) => void,
  ) {}

  /** One user action: done whole, or refused whole and nothing changed. */
  dispatch(label: string, operations: readonly Operation[], place?: CellAddress): Result<PendingOperation[]> {
    if (operations.length === 0) return succeed([])
    const made = this.perform(label, operations)
    if (!made.ok) return made
    const inverse = inverseOf(made.value)
    if (inverse.length > 0) this.done.push({ label, batch: batchOf(made.value), inverse, place })
    this.undone.clear()
    return made
  }

  undo(): Result<{ label: string; made: PendingOperation[]; place: CellAddress | undefined }> {
    return this.step(this.done, this.undone, 'There is nothing of yours to undo.')
  }

  redo(): Result<{ label: string; made: PendingOperation[]; place: CellAddress | undefined }> {
    return this.step(this.undone, this.done, 'There is nothing to redo.')
  }

  private step(from: UndoStack, to: UndoStack, none: string) {
    const step = from.pop()
    if (!step) return fail('invalid', none)
    if (step.blocked) {
      return fail('invalid', `“${step.label}” was changed by somebody else since, so it stays as it is.`)
    }
    const made = this.perform(step.label, step.inverse)
    if (!made.ok) return made
    const { label, place } = step
    to.push({ label, batch: batchOf(made.value), inverse: inverseOf(made.value), place })
    return succeed({ label, made: made.value, place })
  }

  private perform(label: string, operations: readonly Operation[]): Result<PendingOperation[]> {
    const batch = this.newId()
    const made: PendingOperation[] = []
    const touched: CellAddress[] = []
    for (const op of operations) {
      const applied = applyOperation(this.workbook, op)
      if (!applied.ok) {
        for (const inverse of inverseOf(made)) this.must(inverse)
        return applied
      }
      made.push({ id: this.newId(), batch, label, op, inverse: applied.value.inverse })
      for (const cell of applied.value.touched) touched.push(cell)
    }
    this.pending.push(...made)
    this.onFollow({ operations, touched })
    return succeed(made)
  }

  /** The server has these; they are part of its log up to `base`. */
  acknowledge(base: number, ids: ReadonlySet<string>): void {
    this.base = base
    this.pending = this.pending.filter((operation) => !ids.has(operation.id))
  }

  /**
   * Takes in what the log holds after `base`: one's own pending operations step aside, the missing ones are
   * applied, and the own ones that the log does not hold yet come back on top, rebased. Gives back which of
   * them found their ground gone.
   */
  integrate(missing: readonly LoggedOperation[], seq: number): QueuedOperation[] {
    const mine = new Set(this.pending.map((operation) => operation.id))
    // The log took one's own on the ground they were made on, so they stand before all that is foreign.
    const known = missing.filter((operation) => mine.has(operation.id))
    const logged = missing.filter((operation) => !mine.has(operation.id))
    const foreign = logged.map(({ op }) => op)
    if (foreign.length === 0) {
      this.acknowledge(seq, new Set(known.map((operation) => operation.id)))
      return []
    }
    const knownIds = new Set(known.map((operation) => operation.id))
    const sheets = this.workbook.sheets.map(({ id, name }) => ({ id, name }))
    const follow = new Follower(this.workbook)
    for (const inverse of inverseOf(this.pending)) follow.must(inverse)
    for (const operation of known) follow.must(operation.op)
    const rest = this.pending.filter((operation) => !knownIds.has(operation.id))
    const rebased = rebasePending(this.workbook.sheets, rest, foreign, this.newId)
    this.stepsFollow(sheets, rest, rebased.over)
    this.onForeign(rebased.over, sheets, logged)
    for (const op of foreign) follow.must(op)
    this.pending = []
    const lost = [...rebased.lost]
    for (const operation of rebased.pending) this.reapply(operation, follow, lost)
    this.refreshSteps()
    this.base = seq
    this.onFollow(follow.followed())
    return lost
  }

  /** Operations that another tab of the same person left behind, made on the workbook as the server has it at `base`. */
  adopt(operations: readonly QueuedOperation[]): QueuedOperation[] {
    const follow = new Follower(this.workbook)
    const sheets = this.acknowledgedSheets()
    const over = this.pending.map(({ op }) => op)
    const rebased = rebasePending(sheets, operations, over, this.newId)
    const lost = [...rebased.lost]
    for (const operation of rebased.pending) this.reapply(operation, follow, lost)
    this.onFollow(follow.followed())
    return lost
  }

  /** The sheets as they are without the pending operations. */
  acknowledgedSheets(): SheetGround[] {
    if (this.pending.length === 0) return this.workbook.sheets
    const inverse = inverseOf(this.pending)
    for (const operation of inverse) this.must(operation)
    const sheets = this.workbook.sheets.map(({ id, name }) => ({ id, name }))
    for (const { op } of this.pending) this.must(op)
    return sheets
  }

  /** The server refused this batch: it is taken out from under the pending operations that follow it. */
  takeBack(batch: string): { label: string; lost: QueuedOperation[] } {
    const at = this.pending.findIndex((operation) => operation.batch === batch)
    const refused = this.pending.filter((operation) => operation.batch === batch)
    if (at < 0) return { label: '', lost: [] }
    const after = this.pending.slice(at + refused.length)
    const gone = inverseOf(refused)
    const follow = new Follower(this.workbook)
    for (const inverse of inverseOf(after)) follow.must(inverse)
    const rebased = rebasePending(this.workbook.sheets, after, gone, this.newId)
    for (const inverse of gone) follow.must(inverse)
    this.pending = this.pending.slice(0, at)
    const lost = [...rebased.lost]
    for (const operation of rebased.pending) this.reapply(operation, follow, lost)
    this.done.remove(batch)
    this.undone.clear()
    this.refreshSteps()
    this.onFollow(follow.followed())
    return { label: refused[0]?.label ?? '', lost }
  }

  private reapply(operation: QueuedOperation, follow: Follower, lost: QueuedOperation[]): void {
    const applied = follow.apply(operation.op)
    if (!applied.ok) {
      lost.push(operation)
      return
    }
    const { id, batch, label, op } = operation
    this.pending.push({ id, batch, label, op, inverse: applied.value.inverse })
  }

  /** Somebody else's operations, as they read on top of the pending ones, pass under the steps of undo. */
  private stepsFollow(
    sheets: readonly SheetGround[],
    rest: readonly QueuedOperation[],
    over: readonly Operation[],
  ): void {
    const pending = new Set(rest.map((operation) => operation.batch))
    this.done.follow(sheets, over, pending)
    this.undone.follow(sheets, over, pending)
  }

  private refreshSteps(): void {
    const batches = new Map<string, PendingOperation[]>()
    for (const operation of this.pending) {
      batches.set(operation.batch, [...(batches.get(operation.batch) ?? []), operation])
    }
    const inverses = new Map([...batches].map(([batch, made]) => [batch, inverseOf(made)] as const))
    this.done.refresh(inverses)
    this.undone.refresh(inverses)
  }

  private must(operation: Operation): void {
    mustApply(this.workbook, operation)
  }
}

/** Applies operations one after another and remembers what was done. */
class Follower {
  private readonly operations: Operation[] = []
  private readonly touched: CellAddress[] = []

  constructor(private readonly workbook: Workbook) {}

  apply(operation: Operation): Result<Applied> {
    const applied = applyOperation(this.workbook, operation)
    if (applied.ok) {
      this.operations.push(operation)
      for (const cell of applied.value.touched) this.touched.push(cell)
    }
    return applied
  }

  must(operation: Operation): void {
    const applied = this.apply(operation)
    if (!applied.ok) throw new Error(`cannot follow the log: ${describe(applied.failure)}`)
  }

  followed(): Followed {
    return { operations: this.operations, touched: this.touched }
  }
}

function mustApply(workbook: Workbook, operation: Operation): void {
  const applied = applyOperation(workbook, operation)
  if (!applied.ok) throw new Error(`cannot take back: ${describe(applied.failure)}`)
}

const describe = (failure: Failure) => failure.message ?? failure.text

const batchOf = (operations: readonly PendingOperation[]) => operations[0]?.batch ?? ''

function inverseOf(operations: readonly { readonly inverse: readonly Operation[] }[]): Operation[] {
  return [...operations].reverse().flatMap((operation) => [...operation.inverse])
}
