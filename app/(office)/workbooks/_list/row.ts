/** A workbook as the list shows it: words and figures ready to print, made on the server. */
export interface ListedWorkbook {
  readonly id: string
  readonly title: string
  /** "Draft", "In review": the state as a word. */
  readonly state: string
  readonly figures: readonly ListedFigure[]
  /** "3 minutes ago" and the moment itself (ISO 8601). */
  readonly changed: string
  readonly changedAt: string
  readonly madeBy: string
}

export interface ListedFigure {
  readonly label: string
  /** Absent until it has been computed. */
  readonly number?: string
  readonly unit?: string
}
