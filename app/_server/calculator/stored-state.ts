import type { WorkbookOpened } from '@/lib/workbook'
import type { StoredState } from './jobs'

/** What the calculator's process needs of an opened workbook; it replays the tail itself, off this process's loop. */
export function storedState(opened: WorkbookOpened): StoredState {
  return { workbook: opened.snapshot.workbook, operations: opened.tail.map(({ op }) => op) }
}
