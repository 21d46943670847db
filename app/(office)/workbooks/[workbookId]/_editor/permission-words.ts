import type { Sheet } from '@/lib/workbook'
import type { WorkbookSession } from './session-contract'

/** Why cells of this sheet cannot be written by this person; undefined when they can. */
export function lockWords(session: WorkbookSession, sheet: Sheet): string | undefined {
  if (!session.may.change) return 'You can read this workbook but not change it.'
  if (sheet.lock === undefined || session.may.changeLocked) return undefined
  const why = sheet.lock.trim().replace(/\.$/, '')
  return why === '' ? 'Locked: a manager can change it.' : `${why}.`
}
