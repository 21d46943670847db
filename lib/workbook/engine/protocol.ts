import type { PackedChanges } from '../contracts'
import type { CellValue } from '../model'
import type { Operation } from '../operations'
import type { WorkbookJson } from '../serial'

/**
 * What crosses between the window and the worker that computes. Every request has a sequence number of its own and gets
 * exactly one reply with the same number, in order. Imports nothing of the engine: both sides use it.
 */
export type EngineRequest =
  | {
      readonly kind: 'open'
      readonly seq: number
      readonly workbook: WorkbookJson
      /** Formula texts that are not computed, because they were stopped before. */
      readonly stopped: readonly string[]
    }
  | { readonly kind: 'apply'; readonly seq: number; readonly operations: readonly Operation[] }
  | {
      /** `try-next` is one of many: what is tried stays in the engine until the next request takes it back. */
      readonly kind: 'try-out' | 'try-next'
      readonly seq: number
      readonly operations: readonly Operation[]
      readonly names: readonly string[]
    }

export type TriedValues = Readonly<Record<string, readonly CellValue[]>>

export type EngineReply =
  /** Every value. */
  | { readonly kind: 'opened'; readonly seq: number; readonly values: PackedChanges }
  | { readonly kind: 'applied'; readonly seq: number; readonly changes: PackedChanges }
  | { readonly kind: 'tried'; readonly seq: number; readonly values: TriedValues }
  /** A bug in the engine; `message` is for the log. */
  | { readonly kind: 'failed'; readonly seq: number; readonly message: string }

/** The worker's side of the line. `transfer` lists buffers to hand over instead of copying. */
export interface ServerPort {
  post(reply: EngineReply, transfer: ArrayBuffer[]): void
  onMessage(listener: (request: EngineRequest) => void): void
}

/** The window's side: one worker. */
export interface ClientPort {
  post(request: EngineRequest): void
  onMessage(listener: (reply: EngineReply) => void): void
  /** The worker broke or could not be loaded. */
  onError(listener: (message: string) => void): void
  terminate(): void
}
