import { z } from 'zod'
import { limits } from './limits'
import type { CellValue } from './model'
import { operationSchema } from './operations'
import type { WorkbookJson } from './serial'

/** What crosses between the client and the server about one workbook. */

/** An operation on its way: the client makes both ids; one user action is one `batch`. */
export const sentOperationSchema = z.strictObject({
  id: z.uuid(),
  batch: z.uuid(),
  op: operationSchema,
})
export type SentOperation = z.infer<typeof sentOperationSchema>

/** POST /api/workbooks/:id/operations. `base` is the last sequence the client has applied. */
export const appendRequestSchema = z.strictObject({
  base: z.int().min(0),
  operations: z.array(sentOperationSchema).min(1).max(limits.operationsInBatch),
})
export type AppendRequest = z.infer<typeof appendRequestSchema>

export interface LoggedOperation extends SentOperation {
  readonly seq: number
  readonly author: string
  /** ISO 8601, UTC, the server's clock. */
  readonly at: string
}

/** 200: every sent id has a sequence, whether it was new or already there. */
export interface AppendAccepted {
  readonly seq: number
  readonly accepted: readonly { readonly id: string; readonly seq: number }[]
}

/** 409 `behind`: nothing was appended; `missing` are all operations after `base`. */
export interface AppendBehind {
  readonly code: 'behind'
  readonly text: string
  readonly seq: number
  readonly missing: readonly LoggedOperation[]
}

/** Values computed at a snapshot, by sheet id, rows then columns. */
export type StoredValues = Readonly<Record<string, readonly (readonly CellValue[])[]>>

/** GET /api/workbooks/:id. The state is the snapshot with `tail` applied in order. */
export interface WorkbookOpened {
  readonly id: string
  readonly title: string
  readonly state: string
  readonly seq: number
  readonly may: { readonly change: boolean; readonly changeLocked: boolean }
  readonly actor: { readonly id: string; readonly name: string; readonly role: string }
  readonly snapshot: {
    readonly seq: number
    readonly workbook: WorkbookJson
    /** Absent when they have not been computed yet. */
    readonly values?: StoredValues
  }
  readonly tail: readonly LoggedOperation[]
}
