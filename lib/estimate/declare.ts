import type { Quantity, UnitSystem } from '../units'
import type { Ground } from '../workbook'

/**
 * What a sheet says, without a single cell address: lines of label, name, value or formula, quantity, source and
 * note, or columns with one formula a column. `compile.ts` lays it out.
 *
 * In formulas a named value is written by its name, `[column title]` is the cell of that column in the same row,
 * (`[first:column title]` from the first row to this one, `[above:column title]` from the header to the row above),
 * and `{name}` is the cell of the column called `name`, anywhere, in the row of the same order
 * (`{name:3}` its fourth row).
 */
export type Scalar = string | number | boolean

/** A number stated in one unit system; a bare number is in US customary units. */
export interface Measured {
  readonly value: number
  readonly in: UnitSystem
}

export const si = (value: number): Measured => ({ value, in: 'si' })

export type Stated = Scalar | Measured

/** Bounds of an input, in the system that `in` states (US customary without it). */
export interface Limits {
  readonly min?: number
  readonly max?: number
  /** The value must be greater than this. */
  readonly above?: number
  readonly whole?: boolean
  readonly in?: UnitSystem
}

/** Values to choose from, or the name of the table whose first column lists them. */
export type Choices = string | readonly string[]

interface Described {
  readonly name: string
  readonly label: string
  readonly quantity: Quantity
  readonly source: string
  readonly note?: string
  /** A unit that is not of a kind: a text, or a formula that gives it. */
  readonly unit?: string
  readonly digits?: number
}

export interface InputLine extends Described {
  readonly kind: 'input'
  /** Absent: left blank for a person to fill in. */
  readonly value?: Stated
  readonly limits?: Limits
  readonly choices?: Choices
}
export interface ComputedLine extends Described {
  readonly kind: 'computed'
  readonly formula: string
  readonly ground?: Ground
  readonly total?: boolean
}
export interface ConstantLine extends Described {
  readonly kind: 'constant'
  /** A formula where the number depends on the unit system. */
  readonly value: Stated
}
export interface HeadingLine {
  readonly kind: 'heading'
  readonly label: string
}
export type Severity = 'impossible' | 'error' | 'warning' | 'note'
/** A condition that should hold: "in order", or a sentence that says what is wrong. */
export interface CheckLine {
  readonly kind: 'check'
  readonly name: string
  readonly label: string
  readonly formula: string
  /** The named value that a person would change to put it right. */
  readonly about: string
  /** An impossible house is refused; an error must be put right before work goes on; a warning is to be looked at, a note to be known. */
  readonly severity: Severity
  readonly source: string
  readonly note?: string
}
export type Line = InputLine | ComputedLine | ConstantLine | HeadingLine | CheckLine

type Without<T> = Omit<T, 'kind'>
export const input = (line: Without<InputLine>): InputLine => ({ kind: 'input', ...line })
export const computed = (line: Without<ComputedLine>): ComputedLine => ({ kind: 'computed', ...line })
export const constant = (line: Without<ConstantLine>): ConstantLine => ({ kind: 'constant', ...line })
export const heading = (label: string): HeadingLine => ({ kind: 'heading', label })
export const check = (line: Without<CheckLine>): CheckLine => ({ kind: 'check', ...line })

/** What check cells say when nothing is wrong. */
export const inOrder = 'in order'

export interface NameOfColumn {
  readonly name: string
  readonly role: 'input' | 'result' | 'table'
  readonly label: string
  readonly limits?: Limits
}

export interface GridColumn {
  /** What formulas call it, and the header that people read. */
  readonly title: string
  readonly quantity: Quantity
  /** Holds in every row that says nothing else. */
  readonly formula?: string
  readonly ground?: Ground
  readonly width?: number
  readonly digits?: number
  readonly unit?: string
  readonly choices?: Choices
  /** Where its formula or its figures come from; kept as a note on the header. */
  readonly source?: string
  /** Names the column's cells from the first row to the last (the closing row included). */
  readonly named?: NameOfColumn
  /** What a row that is added by an override holds here when nothing is said. */
  readonly absent?: Scalar
  /** A row that is added by an override must say it. */
  readonly required?: boolean
  readonly limits?: Limits
}

export interface RichCell {
  readonly value?: Stated
  readonly ground?: Ground
  readonly quantity?: Quantity
  readonly unit?: string
  readonly note?: string
  readonly style?: 'heading' | 'total' | 'quiet'
  readonly name?: { readonly name: string; readonly label: string; readonly role: 'input' | 'result' }
}
export type CellContent = Stated | RichCell

/** By column title; a column that is left out holds its own formula, or nothing. */
export type GridRow = Readonly<Record<string, CellContent>>

export interface LinesBlock {
  readonly kind: 'lines'
  readonly lines: readonly Line[]
}
export interface GridBlock {
  readonly kind: 'grid'
  readonly columns: readonly GridColumn[]
  readonly rows: readonly GridRow[]
  /** A quiet last row inside the named areas, so that rows inserted above it belong to them. */
  readonly closing?: string
  /** Names the rows (`NAME`) and the header (`NAME_columns`), for exact look-ups. */
  readonly table?: { readonly name: string; readonly label: string }
}
export type Block = LinesBlock | GridBlock

export interface SheetDeclaration {
  readonly id: string
  readonly name: string
  readonly kind: 'step' | 'table'
  readonly about: string
  readonly lock?: string
  readonly blocks: readonly Block[]
}

export const lines = (...list: readonly Line[]): LinesBlock => ({ kind: 'lines', lines: list })
export const grid = (block: Omit<GridBlock, 'kind'>): GridBlock => ({ kind: 'grid', ...block })

/** Names a column for the formulas of other sheets; such names are areas, not values to be read one by one. */
export const area = (name: string, label: string): NameOfColumn => ({ name, label, role: 'table' })

/** Why tables cannot be changed in a workbook. */
export const tableLock = 'Pinned from the price tables; a manager keeps them.'

/** An exact look-up in a table by the words of its column. */
export const lookUp = (table: string, key: string, column: string): string =>
  `VLOOKUP(${key},${table},MATCH("${column}",${table}_columns,0),0)`
