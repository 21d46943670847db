import type { Failure } from '../failures'
import { sheetById } from './lookup'
import type { Sheet, Workbook } from './model'
import type { Operation } from './operations'

export type Role = 'owner' | 'manager' | 'estimator' | 'viewer'

/**
 * Why this role may not do this operation, or undefined when it may.
 *
 * W18 A viewer changes nothing.
 * W19 An estimator does not change a locked sheet: cells, lines, columns, its name and place, the names that stand on it.
 *     Formulas on other sheets may read it, and a structural change elsewhere may rewrite its references.
 * W36 Converting the units is a change of notation, not of what is locked: an estimator may, whatever is locked.
 * W20 A manager and an owner may.
 */
export function refusal(workbook: Workbook, operation: Operation, role: Role): Failure | undefined {
  if (role === 'viewer') {
    return {
      code: 'forbidden',
      text: 'You can read this workbook but not change it. An estimator, a manager or the owner can.',
    }
  }
  if (role !== 'estimator') return undefined
  for (const id of sheetsChangedBy(workbook, operation)) {
    const sheet = sheetById(workbook, id)
    if (sheet?.lock !== undefined) return locked(sheet, sheet.lock)
  }
  if (operation.kind === 'add-sheet' && operation.lock !== undefined) {
    return { code: 'forbidden', text: 'Only a manager or the owner adds a locked sheet.' }
  }
  return undefined
}

function locked(sheet: Sheet, lock: string): Failure {
  const why = lock.trim() === '' ? '' : ` (${lock.trim().replace(/\.$/, '')})`
  return {
    code: 'forbidden',
    text: `${sheet.name} is locked${why}. A manager or the owner can change it.`,
    name: sheet.name,
  }
}

/** Ids of the sheets that an operation changes by intent. */
function sheetsChangedBy(workbook: Workbook, operation: Operation): string[] {
  switch (operation.kind) {
    case 'add-sheet':
    case 'convert-units':
      return []
    case 'name-value': {
      const before = workbook.names.get(operation.name)?.area.sheet
      return [operation.target?.area.sheet, before].filter((id) => id !== undefined)
    }
    default:
      return [operation.sheet]
  }
}
