import type { CellAddress, Sheet, Workbook } from '@/lib/workbook'
import { bySeverity, type CheckBook, type Finding, findings, findingWords, type ReadValue } from './checks'

/** How a step stands: nothing on it yet, in order, or with things to look at. */
export interface StepState {
  readonly filled: boolean
  readonly toLookAt: number
  /** The first few of them, in words. */
  readonly words: readonly string[]
  /** The first of them. */
  readonly first: CellAddress | undefined
}

const wordsShown = 4

/** `others` are findings that were made elsewhere; those of this sheet count here too. */
export function stepState(
  workbook: Workbook,
  sheet: Sheet,
  value: ReadValue,
  book?: CheckBook,
  others: readonly Finding[] = [],
): StepState {
  // A note is to be known, not to be looked at.
  const found = bySeverity([
    ...findings(workbook, sheet, value, book),
    ...others.filter(({ at }) => at.sheet === sheet.id),
  ]).filter(({ severity }) => severity !== 'note')
  return {
    filled: sheet.rows.some((cells, row) => row > 0 && cells?.some((cell) => cell?.input !== undefined)),
    toLookAt: found.length,
    words: found.slice(0, wordsShown).map(findingWords),
    first: found[0]?.at,
  }
}
