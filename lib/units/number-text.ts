/**
 * Numbers as people type them. A point is always the decimal mark and a comma in threes always groups ("1,250" is 1250).
 * A comma that cannot group ("3,81", "0,125", "1.250,50") is a decimal comma, and the caller decides whether it may be.
 * Fractions may be mixed ("6 1/2", "11-15/16"). No sign here: see `takeSign`.
 */
export interface TypedNumber {
  readonly value: number
  readonly decimalComma: boolean
  readonly fraction: boolean
  /** What follows the number, trimmed. */
  readonly rest: string
}

const mixed = /^(\d+|[1-9]\d{0,2}(?:,\d{3})+)(?:\s+|-)(\d+)\/(\d+)(?![\d/])/
const simple = /^(\d+)\/(\d+)(?![\d/])/
const run = /^(?:\d{1,3}(?: \d{3})+(?!\d)(?:[.,]\d+)?|[\d.,]*\d\.?)/
const exponent = /^e[+-]?\d+/i

/** Undefined when the text does not begin with a number that can be read in one way. */
export function takeNumber(text: string): TypedNumber | undefined {
  const asMixed = mixed.exec(text)
  if (asMixed)
    return fraction(
      text,
      asMixed[0],
      Number(asMixed[1]?.replaceAll(',', '')),
      Number(asMixed[2]),
      Number(asMixed[3]),
    )
  const asSimple = simple.exec(text)
  if (asSimple) return fraction(text, asSimple[0], 0, Number(asSimple[1]), Number(asSimple[2]))
  const digits = run.exec(text)?.[0]
  if (digits === undefined) return undefined
  const decimal = toDecimal(digits)
  if (!decimal) return undefined
  const power = exponent.exec(text.slice(digits.length))?.[0] ?? ''
  const value = Number(decimal.text + power)
  if (!Number.isFinite(value)) return undefined
  const rest = text.slice(digits.length + power.length).trim()
  return { value, decimalComma: decimal.comma, fraction: false, rest }
}

function fraction(
  text: string,
  matched: string,
  whole: number,
  over: number,
  under: number,
): TypedNumber | undefined {
  if (under === 0 || (whole > 0 && over >= under)) return undefined
  const rest = text.slice(matched.length).trim()
  return { value: whole + over / under, decimalComma: false, fraction: true, rest }
}

function toDecimal(digits: string): { text: string; comma: boolean } | undefined {
  if (/^(?:\d+\.?\d*|\.\d+)$/.test(digits)) return { text: digits, comma: false }
  if (/^[1-9]\d{0,2}(?:,\d{3})+(?:\.\d*)?$/.test(digits)) {
    return { text: digits.replaceAll(',', ''), comma: false }
  }
  if (/^\d{1,3}(?: \d{3})+(?:[.,]\d+)?$/.test(digits)) {
    return { text: digits.replaceAll(' ', '').replace(',', '.'), comma: digits.includes(',') }
  }
  if (/^\d+,\d+$/.test(digits)) return { text: digits.replace(',', '.'), comma: true }
  if (/^[1-9]\d{0,2}(?:\.\d{3})+,\d+$/.test(digits)) {
    return { text: digits.replaceAll('.', '').replace(',', '.'), comma: true }
  }
  return undefined
}

const vulgar: Readonly<Record<string, string>> = {
  '½': '1/2',
  '¼': '1/4',
  '¾': '3/4',
  '⅛': '1/8',
  '⅜': '3/8',
  '⅝': '5/8',
  '⅞': '7/8',
}

/** One form for typographic marks, spaces, minus signs and vulgar fractions. */
export function plainText(text: string): string {
  return text
    .replace(/[½¼¾⅛⅜⅝⅞]/g, (mark) => ` ${vulgar[mark]}`)
    .replace(/[\s\u00a0\u2007\u2009\u202f]+/g, ' ')
    .replace(/[−–]/g, '-')
    .replace(/⁄/g, '/')
    .replace(/[’‘′]/g, "'")
    .replace(/[”“″]|''/g, '"')
    .trim()
}

export function takeSign(text: string): { sign: 1 | -1; rest: string } {
  const sign = /^[+-]/.exec(text)?.[0]
  return { sign: sign === '-' ? -1 : 1, rest: sign ? text.slice(1).trimStart() : text }
}
