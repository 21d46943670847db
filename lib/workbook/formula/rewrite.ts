import { quoteSheetName } from '../address'
import { type LineChange, lineAfter, spanAfter } from './lines'
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

/** Rewrites the references to the sheet called `sheet`; `home` is the name of the sheet that the formula stands on. */
export function shiftFormula(
  text: string,
  home: string,
  sheet: string,
  axis: Axis,
  change: LineChange,
): string {
  return rewrite(text, (reference) => {
    if (!same(reference.sheet ?? home, sheet)) return undefined
    return shiftReference(text, reference, axis, change)
  })
}

export function renameInFormula(text: string, from: string, to: string): string {
  return rewrite(text, (reference) => {
    if (reference.sheet === undefined || !same(reference.sheet, from)) return undefined
    return write(to, reference.shape, reference.first, reference.last)
  })
}

export function dropSheetInFormula(text: string, sheet: string): string {
  return rewrite(text, (reference) =>
    reference.sheet !== undefined && same(reference.sheet, sheet) ? '#REF!' : undefined,
  )
}

export function mentionsSheet(text: string, sheet: string): boolean {
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
