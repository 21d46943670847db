import type { Quantity, UnitSystem } from '../units/quantities'

/**
 * What was typed into a cell. A string that begins with `=` is a formula; a string that begins with `'`
 * is text with that mark taken off (how a text that must begin with `=` is kept). Anything else is itself:
 * text is never read as a date, a percentage or money.
 */
export type CellInput = string | number | boolean

/**
 * What a cell's ground says it is: an input of the job, a value pinned from a table, an override of either
 * a computed or a pinned value, or a label. A cell without a ground is `computed` if it holds a formula, else plain.
 */
export type Ground = 'input' | 'table' | 'override' | 'label'

export interface CellFormat {
  /** Kind of quantity; with the workbook's unit system it decides unit and notation. */
  readonly quantity?: Quantity
  /** Digits after the point; each quantity has a default. */
  readonly digits?: number
  /** A unit that is not of a kind, shown beside the number ("gal", "per sheet"). */
  readonly unit?: string
  readonly style?: 'heading' | 'total' | 'quiet'
  /** Name of the table whose first column lists the values that this cell takes, or the values themselves. */
  readonly choices?: string | readonly string[]
}

export interface Cell {
  readonly input?: CellInput
  readonly format?: CellFormat
  readonly note?: string
  readonly ground?: Ground
}

/** Sheets are numbered steps of the work, or tables that the steps look things up in. */
export type SheetKind = 'step' | 'table'

export interface Column {
  /** Width in pixels on the screen at 100 %. */
  readonly width?: number
  readonly quantity?: Quantity
}

export interface Sheet {
  /** Stable through renames; made by the client that adds the sheet. */
  readonly id: string
  name: string
  readonly kind: SheetKind
  /** One sentence under the sheet's title: what is done here. */
  readonly about?: string
  /** Why this sheet is read-only for estimators; absent when it is not. */
  readonly lock?: string
  /** Extent: every row index is below `rowCount`, every column index below `columns.length`. Row 0 is the header. */
  rowCount: number
  columns: Column[]
  /** Sparse, by row and then by column (both from 0); absent cells are blank. */
  rows: (Row | undefined)[]
}

export type Row = (Cell | undefined)[]

/** A rectangle on one sheet, by indexes from 0. */
export interface Area {
  readonly sheet: string
  readonly row: number
  readonly column: number
  readonly rowCount: number
  readonly columnCount: number
}

export interface NamedValue {
  readonly name: string
  readonly area: Area
  readonly quantity: Quantity
  /** `input` values may be set by name (palette, headless command), `result` values are computed. */
  readonly role: 'input' | 'result' | 'constant' | 'table'
  readonly label?: string
}

/**
 * The workbook: sheets in order, and named values. Mutable, changed only by `applyOperation`
 * (`operations.ts` lists every way). `system` is the unit system that every number in it is written in.
 */
export interface Workbook {
  readonly version: 1
  system: UnitSystem
  sheets: Sheet[]
  names: Map<string, NamedValue>
}

/** A computed value as the engine gives it; an error carries its OpenFormula code and a sentence. */
export interface CellError {
  readonly error: string
  readonly text: string
}
export type CellValue = number | string | boolean | null | CellError

export function isCellError(value: CellValue): value is CellError {
  return typeof value === 'object' && value !== null
}

export function isFormula(input: CellInput | undefined): input is string {
  return typeof input === 'string' && input.startsWith('=')
}
