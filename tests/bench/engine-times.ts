import type { CellValue } from '@/lib/workbook'
import type { EditKind } from './subject'

/** What one process with one engine says: milliseconds, and the results by which the two engines are compared. */
export interface EngineTimes {
  readonly build: number
  readonly edits: Record<EditKind, number[]>
  readonly changes: Record<EditKind, number>
  readonly results: Record<EditKind, CellValue>
}
