import type { Operation, Workbook } from '@/lib/workbook'

/** A workbook to measure, and the edits that are made to it. */
export interface Subject {
  readonly workbook: Workbook
  /** Cells that hold something. */
  readonly cells: number
  readonly edits: Readonly<Record<EditKind, Edit>>
}

/** `fan` is an input that reaches every line, `price` one cell of a table, `local` one quantity of one line. */
export const editKinds = ['fan', 'price', 'local'] as const
export type EditKind = (typeof editKinds)[number]

export interface Edit {
  readonly place: Place
  /** The number that stands there; each edit sets a little more. */
  readonly from: number
  /** A cell that depends on it. */
  readonly result: Place
}

export interface Place {
  readonly sheet: string
  readonly row: number
  readonly column: number
}

export function setNumber(place: Place, input: number): Operation {
  return { kind: 'set-cells', sheet: place.sheet, cells: [{ row: place.row, column: place.column, input }] }
}

export function countCells(workbook: Workbook): number {
  return workbook.sheets.reduce(
    (sum, sheet) =>
      sum + sheet.rows.reduce((inSheet, row) => inSheet + (row?.filter(Boolean).length ?? 0), 0),
    0,
  )
}
