import { quoteSheetName } from '../address'
import { type LineChange, lineAfter, type Span, spanAfter, undoneBy } from './lines'
import { endText, type Reference, type ReferenceEnd } from './reference'
import { scan } from './scan'

/**
 * How formula texts follow a structural change (W1 to W5 in `lines.ts` say where lines go):
 *
 * W6  A reference to what is gone becomes `#REF!`, its sheet's name with it.
 * W7  Only references that change are written anew; everything else of the text stays as typed.
 * W8  Whole columns follow columns only, whole rows follow rows only.
 * W9  A renamed sheet is renamed in every reference to it; names are compared without regard to case.
 */
export type Axis = 'row' | 'column'

export interface Shifted {
  readonly text: string
  /** Whether the inverse change makes the old text of the new one, letter by letter. */
  readonly exact: boolean
}

/** Rewrites the references to the sheet called `sheet`; `home` is the name of the sheet that the formula stands on. */
export function shiftFormula(
  text: string,
  home: string,
  sheet: string,
  axis: Axis,
  change: LineChange,
): Shifted {
  const atHome = same(home, sheet)
  if (!atHome && !text.includes('!')) return { text, exact: true }
  const back = undoneBy(change)
  let exact = true
  const shifted = rewrite(text, (reference) => {
    if (reference.sheet === undefined ? !atHome : !same(reference.sheet, sheet)) return undefined
    const replacement = shiftReference(text, reference, axis, change)
    exact &&= comesBack(text, reference, axis, change, back, replacement)
    return replacement
  })
  return { text: shifted, exact }
}

/** Whether undoing the change brings a reference back as typed (`a1`, `A01` and `A1 : B2` would not come back so). */
function comesBack(
  text: string,
  reference: Reference,
  axis: Axis,
  change: LineChange,
  back: LineChange,
  replacement: string | undefined,
): boolean {
  const { first, last, shape } = reference
  // What an insertion shifts or stretches, the removal of the same lines always brings back.
  if (change.kind !== 'insert' && first[axis] >= 0) {
    const low = Math.min(first[axis], last[axis])
    const high = Math.max(first[axis], last[axis])
    const span = shape === 'cell' ? cellSpan(change, low) : spanAfter(change, [low, high])
    const returned = span && (shape === 'cell' ? cellSpan(back, span[0]) : spanAfter(back, span))
    if (returned?.[0] !== low || returned[1] !== high) return false
  }
  return replacement === undefined || isWrittenPlainly(text, reference)
}

/** Capital letters, no spaces, no leading zeros, the sheet named once: as references are written here. */
function isWrittenPlainly(text: string, { start, end, sheet }: Reference): boolean {
  let at = sheet === undefined ? start : text.indexOf('!', start + sheet.length) + 1
  for (let before = 0; at < end; at += 1) {
    const code = text.charCodeAt(at)
    const digit = code >= 48 && code <= 57
    const capital = code >= 65 && code <= 90
    if (!digit && !capital && code !== 36 && code !== 58) return false
    if (code === 48 && !(before >= 48 && before <= 57)) return false
    before = code
  }
  return true
}

function cellSpan(change: LineChange, line: number): Span | undefined {
  const after = lineAfter(change, line)
  return after === undefined ? undefined : [after, after]
}

export function renameInFormula(text: string, from: string, to: string): string {
  if (from === to || !text.includes('!')) return text
  return rewrite(text, (reference) => {
    if (reference.sheet === undefined || !same(reference.sheet, from)) return undefined
    return write(to, reference.shape, reference.first, reference.last)
  })
}

export function dropSheetInFormula(text: string, sheet: string): string {
  if (!text.includes('!')) return text
  return rewrite(text, (reference) =>
    reference.sheet !== undefined && same(reference.sheet, sheet) ? '#REF!' : undefined,
  )
}

export function mentionsSheet(text: string, sheet: string): boolean {
  if (!text.includes('!')) return false
  let found = false
  scan(text, (_kind, _start, _end, reference) => {
    if (reference?.sheet !== undefined && same(reference.sheet, sheet)) found = true
  })
  return found
}

function same(a: string, b: string): boolean {
  return a === b || (a.length === b.length && a.toLowerCase() === b.toLowerCase())
}

function rewrite(text: string, change: (reference: Reference) => string | undefined): string {
  let written = ''
  let copied = 0
  scan(text, (_kind, start, end, reference) => {
    const replacement = reference && change(reference)
    if (replacement === undefined) return
    written += text.slice(copied, start) + replacement
    copied = end
  })
  return copied === 0 ? text : written + text.slice(copied)
}

function shiftReference(
  text: string,
  reference: Reference,
  axis: Axis,
  change: LineChange,
): string | undefined {
  const { first, last, shape } = reference
  const a = first[axis]
  const b = last[axis]
  if (a < 0) return undefined
  if (shape === 'cell') {
    const line = lineAfter(change, a)
    if (line === a) return undefined
    if (line === undefined) return '#REF!'
    const end = { ...first, [axis]: line }
    return prefixOf(text, reference) + endText(end)
  }
  const span = spanAfter(change, a <= b ? [a, b] : [b, a])
  if (!span) return '#REF!'
  const [low, high] = span
  const [newA, newB] = a <= b ? [low, high] : [high, low]
  if (newA === a && newB === b) return undefined
  return `${prefixOf(text, reference)}${endText({ ...first, [axis]: newA })}:${endText({ ...last, [axis]: newB })}`
}

/** The sheet's name before the reference exactly as typed. */
function prefixOf(text: string, reference: Reference): string {
  if (reference.sheet === undefined) return ''
  const quoted = text.charCodeAt(reference.start) === 39
  const length = quoted ? reference.sheet.replaceAll("'", "''").length + 3 : reference.sheet.length + 1
  return text.slice(reference.start, reference.start + length)
}

function write(sheet: string, shape: Reference['shape'], first: ReferenceEnd, last: ReferenceEnd): string {
  const prefix = `${quoteSheetName(sheet)}!`
  return shape === 'cell' ? prefix + endText(first) : `${prefix}${endText(first)}:${endText(last)}`
}
