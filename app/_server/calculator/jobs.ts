import type { Computed } from '@/lib/estimate/computed'
import type { Operation, WorkbookJson } from '@/lib/workbook'

/** A workbook as it is stored: a snapshot and the operations that came after it. The child replays them. */
export interface StoredState {
  readonly workbook: WorkbookJson
  readonly operations: readonly Operation[]
}

export type Job =
  | { readonly kind: 'values'; readonly state: StoredState }
  | {
      readonly kind: 'xlsx'
      readonly state: StoredState
      readonly title: string
      /** ISO 8601, written into the file's properties. */
      readonly created: string
      /** Where the file goes; its folder exists. */
      readonly path: string
    }

export interface JobAnswers {
  readonly values: Computed
  readonly xlsx: { readonly bytes: number }
}

export type AnswerOf<J extends Job> = JobAnswers[J['kind']]

export interface JobMessage {
  readonly id: number
  readonly job: Job
}

export type AnswerMessage =
  | { readonly id: number; readonly ok: true; readonly answer: JobAnswers[keyof JobAnswers] }
  | { readonly id: number; readonly ok: false; readonly detail: string }
