import { columnName } from '../address'
import { isDigit, isLetter, isSpace, isWordPart } from './characters'

/** One end of a reference as written: indexes from 0, -1 where the axis is not written (whole columns, whole rows). */
export interface ReferenceEnd {
  readonly row: number
  readonly column: number
  readonly rowFixed: boolean
  readonly columnFixed: boolean
}

export interface Reference {
  readonly start: number
  readonly end: number
  /** The sheet's name as written, without quotes; undefined means the formula's own sheet. */
  readonly sheet: string | undefined
  readonly shape: 'cell' | 'area' | 'columns' | 'rows'
  readonly first: ReferenceEnd
  /** The same as `first` for a cell. */
  readonly last: ReferenceEnd
}

/** The end that `readEnd` read last: numbers kept outside, since a structural change reads very many. */
const read = { row: 0, column: 0, rowFixed: false, columnFixed: false, end: 0 }

/** The reference that begins at `at`, or undefined when what stands there is something else. */
export function parseReference(text: string, at: number): Reference | undefined {
  const prefixEnd = endOfSheetPrefix(text, at)
  if (!readEnd(text, prefixEnd)) return undefined
  const first = taken()
  const firstEnd = read.end
  const sheet = prefixEnd === at ? undefined : sheetOfPrefix(text, at, prefixEnd)
  const single = first.row >= 0 && first.column >= 0
  if (!readSecond(text, firstEnd, sheet, first)) {
    if (!single || isCall(text, firstEnd)) return undefined
    return { start: at, end: firstEnd, sheet, shape: 'cell', first, last: first }
  }
  const shape = single ? 'area' : first.row < 0 ? 'columns' : 'rows'
  return { start: at, end: read.end, sheet, shape, first, last: taken() }
}

function taken(): ReferenceEnd {
  const { row, column, rowFixed, columnFixed } = read
  return { row, column, rowFixed, columnFixed }
}

function isCall(text: string, at: number): boolean {
  let next = at
  while (isSpace(text.charCodeAt(next))) next += 1
  return text.charCodeAt(next) === 40
}

/** Where `Frame!` or `'Price list'!` ends; `at` itself when no sheet is named there. */
function endOfSheetPrefix(text: string, at: number): number {
  let end = at
  if (text.charCodeAt(at) === 39) {
    end += 1
    while (end < text.length) {
      if (text.charCodeAt(end) === 39) {
        if (text.charCodeAt(end + 1) !== 39) break
        end += 1
      }
      end += 1
    }
    return text.charCodeAt(end + 1) === 33 && end > at + 1 ? end + 2 : at
  }
  while (isWordPart(text.charCodeAt(end))) end += 1
  return text.charCodeAt(end) === 33 && end > at ? end + 1 : at
}

function sheetOfPrefix(text: string, at: number, end: number): string {
  return text.charCodeAt(at) === 39
    ? text.slice(at + 1, end - 2).replaceAll("''", "'")
    : text.slice(at, end - 1)
}

/** Reads one end into `read`; false when there is none. */
function readEnd(text: string, at: number): boolean {
  let next = at
  const marked = text.charCodeAt(next) === 36
  if (marked) next += 1
  let column = 0
  const letters = next
  while (isLetter(text.charCodeAt(next))) {
    if (next - letters === 3) return false
    column = column * 26 + (text.charCodeAt(next) & 31)
    next += 1
  }
  const hasColumn = next > letters
  let rowFixed = marked && !hasColumn
  if (hasColumn && text.charCodeAt(next) === 36) {
    rowFixed = true
    next += 1
  }
  let row = 0
  const digits = next
  while (isDigit(text.charCodeAt(next))) {
    if (next - digits === 7) return false
    row = row * 10 + text.charCodeAt(next) - 48
    next += 1
  }
  const hasRow = next > digits
  if (hasRow ? row === 0 : rowFixed || !hasColumn) return false
  const after = text.charCodeAt(next)
  if (isWordPart(after) || after === 46 || after === 36 || after === 33) return false
  read.row = hasRow ? row - 1 : -1
  read.column = column - 1
  read.rowFixed = rowFixed
  read.columnFixed = marked && hasColumn
  read.end = next
  return true
}

/** Reads the end after `:`, of the same shape; it may name the same sheet again. */
function readSecond(text: string, at: number, sheet: string | undefined, first: ReferenceEnd): boolean {
  let next = at
  while (isSpace(text.charCodeAt(next))) next += 1
  if (text.charCodeAt(next) !== 58) return false
  next += 1
  while (isSpace(text.charCodeAt(next))) next += 1
  const prefixEnd = endOfSheetPrefix(text, next)
  if (prefixEnd !== next && sheetOfPrefix(text, next, prefixEnd).toLowerCase() !== sheet?.toLowerCase()) {
    return false
  }
  if (!readEnd(text, prefixEnd) || isCall(text, read.end)) return false
  return read.row < 0 === first.row < 0 && read.column < 0 === first.column < 0
}

/** An end as text: `B7`, `$B$7`, `B` of whole columns, `7` of whole rows. */
export function endText(end: ReferenceEnd): string {
  const column = end.column < 0 ? '' : `${end.columnFixed ? '$' : ''}${columnName(end.column)}`
  const row = end.row < 0 ? '' : `${end.rowFixed ? '$' : ''}${end.row + 1}`
  return column + row
}
