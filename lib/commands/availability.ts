import { sheetById } from '../workbook'
import type { CommandContext } from './command'

/**
 * Whether a command may run now: `true`, or the reason why not in words for the person.
 * The server decides again; these only save people from asking in vain.
 */
export type Availability = true | string
export type Predicate = (context: CommandContext) => Availability

export const always: Predicate = () => true

/** The first reason that stands in the way, in the order given. */
export function all(...predicates: readonly Predicate[]): Predicate {
  return (context) => {
    for (const predicate of predicates) {
      const answer = predicate(context)
      if (answer !== true) return answer
    }
    return true
  }
}

export const hasWorkbook: Predicate = ({ workbook }) => workbook.sheets.length > 0 || 'Open a workbook first'

export const mayChange: Predicate = all(
  hasWorkbook,
  ({ may }) => may.change || 'You may look but not change this workbook',
)

/** Why this sheet may not be changed: the lock's own words, or that a manager keeps it. */
export function sheetIsOpen(context: CommandContext, id: string): Availability {
  const sheet = sheetById(context.workbook, id)
  if (!sheet) return 'That sheet is no longer there'
  if (sheet.lock === undefined || context.may.changeLocked) return true
  if (sheet.kind === 'table') return `${sheet.name} is pinned from the price tables; a manager keeps it`
  const reason = sheet.lock.trim()
  return reason === '' ? `${sheet.name} is locked` : `${sheet.name} is locked: ${reason}`
}

export const mayChangeSelection: Predicate = all(mayChange, (context) =>
  sheetIsOpen(context, context.selection.sheet),
)

/** Row 1 holds the column titles, which stay where they are. */
export const selectionBelowHeader: Predicate = ({ selection }) =>
  selection.row > 0 || 'Row 1 holds the column titles; select a row below it'

export const hasUndo: Predicate = all(
  mayChange,
  ({ undoLabel }) => undoLabel !== undefined || 'There is nothing of yours to undo',
)

export const hasRedo: Predicate = all(
  mayChange,
  ({ redoLabel }) => redoLabel !== undefined || 'There is nothing to redo',
)

export const hasRowAbove: Predicate = ({ selection }) =>
  selection.row > 1 || 'This is the first row below the titles'

export const hasRowBelow: Predicate = ({ workbook, selection }) => {
  const sheet = sheetById(workbook, selection.sheet)
  return (
    (sheet !== undefined && selection.row + selection.rowCount < sheet.rowCount) || 'This is the last row'
  )
}

export const hasAnotherSheet: Predicate = ({ workbook }) =>
  workbook.sheets.length > 1 || 'A workbook keeps at least one sheet'

export const hasNames: Predicate = ({ workbook }) =>
  workbook.names.size > 0 || 'This workbook has no named values'

export const hasInputs: Predicate = ({ workbook }) => {
  for (const named of workbook.names.values()) if (named.role === 'input') return true
  return 'This workbook has no named inputs'
}

export const hasOtherWorkbooks: Predicate = ({ workbooks }) =>
  workbooks.length > 0 || 'There is no other workbook yet'
