import type { Result } from '@/lib/failures'
import type { CellAddress, CellValue, ManyTried, Operation, TriedValues, Workbook } from '@/lib/workbook'
import type { LastChange } from './last-changes'

/** What the status words say: saved, saving, offline with n changes, cannot save (and why). */
export type SaveStatus =
  | { readonly kind: 'saved' }
  | { readonly kind: 'saving'; readonly pending: number }
  | { readonly kind: 'offline'; readonly pending: number }
  | { readonly kind: 'cannot-save'; readonly pending: number; readonly text: string }

export type EngineStatus =
  | { readonly kind: 'starting' }
  | { readonly kind: 'ready' }
  | { readonly kind: 'working' }
  | { readonly kind: 'stopped'; readonly text: string }

/** Immutable; a new object whenever anything a screen shows has changed. */
export interface SessionSnapshot {
  readonly version: number
  /** Counts changes of shape (lines, sheets, names, columns): what the grid lays out anew for. */
  readonly shape: number
  readonly save: SaveStatus
  readonly engine: EngineStatus
  readonly undoLabel: string | undefined
  readonly redoLabel: string | undefined
}

/** Cells whose values changed, read without making an object of each: one edit can change tens of thousands. */
export interface ValueChanges {
  /** Ids of the sheets that changes lie on. */
  readonly sheets: readonly string[]
  visit(sheet: string, visit: (row: number, column: number) => void): void
}

/** One open workbook in one browser tab: the model, its values, the queue of unsaved operations, undo. */
export interface WorkbookSession {
  readonly id: string
  readonly title: string
  readonly state: string
  readonly actor: { readonly id: string; readonly name: string; readonly role: string }
  readonly may: { readonly change: boolean; readonly changeLocked: boolean }
  /** Read-only for callers; changed in place by `dispatch`. */
  readonly workbook: Workbook
  snapshot(): SessionSnapshot
  subscribe(listener: () => void): () => void
  value(address: CellAddress): CellValue
  named(name: string): readonly CellValue[] | undefined
  /** Applies as one batch and one undo step, queues it durably, sends it. Refused whole or done whole. */
  dispatch(label: string, operations: readonly Operation[]): Result<void>
  undo(): Result<string>
  redo(): Result<string>
  /** What named values would become; nothing changes. Rejects when the engine is not ready. */
  tryOut(
    operations: readonly Operation[],
    names: readonly string[],
  ): Promise<Readonly<Record<string, readonly CellValue[]>>>
  /** The same for many lists, one after another, each on the workbook as it is. */
  tryMany(
    lists: readonly (readonly Operation[])[],
    names: readonly string[],
    onTried: (index: number, values: TriedValues) => void,
  ): ManyTried
  /** Who changed the cell last, as far as this tab has seen it. */
  lastChange(address: CellAddress): LastChange | undefined
  /** Called with the cells whose values changed, as they change. */
  onValues(listener: (changes: ValueChanges) => void): () => void
  close(): void
}
