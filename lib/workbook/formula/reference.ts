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

interface Found<T> {
  readonly value: T
  readonly end: number
}

/** The reference that begins at `at`, or undefined when what stands there is something else. */
export function parseReference(text: string, at: number): Reference | undefined {
  const prefix = parseSheetPrefix(text, at)
  const from = prefix?.end ?? at
  const first = parseEnd(text, from)
  if (!first) return undefined
  const second = parseSecond(text, first.end, prefix?.value, first.value)
  const single = first.value.row >= 0 && first.value.column >= 0
  if (!second) {
    if (!single || isCall(text, first.end)) return undefined
    return make(at, first.end, prefix?.value, 'cell', first.value, first.value)
  }
  const shape = single ? 'area' : first.value.row < 0 ? 'columns' : 'rows'
  return make(at, second.end, prefix?.value, shape, first.value, second.value)
}

function make(
  start: number,
  end: number,
  sheet: string | undefined,
  shape: Reference['shape'],
  first: ReferenceEnd,
  last: ReferenceEnd,
): Reference {
  return { start, end, sheet, shape, first, last }
}

function isCall(text: string, at: number): boolean {
  let next = at
  while (isSpace(text.charCodeAt(next))) next += 1
  return text.charCodeAt(next) === 40
}

/** `Frame!` or `'Price list'!`. */
export function parseSheetPrefix(text: string, at: number): Found<string> | undefined {
  if (text.charCodeAt(at) === 39) {
    let end = at + 1
    while (end < text.length) {
      if (text.charCodeAt(end) === 39) {
        if (text.charCodeAt(end + 1) !== 39) break
        end += 1
      }
      end += 1
    }
    if (text[end + 1] !== '!' || end === at + 1) return undefined
    return { value: text.slice(at + 1, end).replaceAll("''", "'"), end: end + 2 }
  }
  let end = at
  while (isWordPart(text.charCodeAt(end))) end += 1
  if (end === at || text[end] !== '!') return undefined
  return { value: text.slice(at, end), end: end + 1 }
}

function parseEnd(text: string, at: number): Found<ReferenceEnd> | undefined {
  let next = at
  let columnFixed = false
  if (text.charCodeAt(next) === 36) {
    columnFixed = true
    next += 1
  }
  let column = 0
  const letters = next
  while (isLetter(text.charCodeAt(next))) {
    if (next - letters === 3) return undefined
    column = column * 26 + (text.charCodeAt(next) & 31)
    next += 1
  }
  column -= 1
  const hasColumn = next > letters
  let rowFixed = false
  if (hasColumn && text.charCodeAt(next) === 36) {
    rowFixed = true
    next += 1
  } else if (!hasColumn) {
    rowFixed = columnFixed
    columnFixed = false
  }
  let row = 0
  const digits = next
  while (isDigit(text.charCodeAt(next))) {
    if (next - digits === 7) return undefined
    row = row * 10 + text.charCodeAt(next) - 48
    next += 1
  }
  const hasRow = next > digits
  if ((hasRow && row === 0) || (!hasRow && rowFixed) || (!hasRow && !hasColumn)) return undefined
  const after = text.charCodeAt(next)
  if (isWordPart(after) || after === 46 || after === 36 || after === 33) return undefined
  return { value: { row: hasRow ? row - 1 : -1, column, rowFixed, columnFixed }, end: next }
}

/** The end after `:`, of the same shape; it may name the same sheet again. */
function parseSecond(
  text: string,
  at: number,
  sheet: string | undefined,
  first: ReferenceEnd,
): Found<ReferenceEnd> | undefined {
  let next = at
  while (isSpace(text.charCodeAt(next))) next += 1
  if (text.charCodeAt(next) !== 58) return undefined
  next += 1
  while (isSpace(text.charCodeAt(next))) next += 1
  const prefix = parseSheetPrefix(text, next)
  if (prefix && prefix.value.toLowerCase() !== sheet?.toLowerCase()) return undefined
  const last = parseEnd(text, prefix?.end ?? next)
  if (!last || isCall(text, last.end)) return undefined
  const sameShape = last.value.row < 0 === first.row < 0 && last.value.column < 0 === first.column < 0
  return sameShape ? last : undefined
}

/** An end as text: `B7`, `$B$7`, `B` of whole columns, `7` of whole rows. */
export function endText(end: ReferenceEnd): string {
  const column = end.column < 0 ? '' : `${end.columnFixed ? '$' : ''}${columnName(end.column)}`
  const row = end.row < 0 ? '' : `${end.rowFixed ? '$' : ''}${end.row + 1}`
  return column + row
}
