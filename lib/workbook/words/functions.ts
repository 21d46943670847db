import type { Expression } from './expression'
import { inSentence } from './labels'

type Words = (inner: Expression) => string
type Phrase = (args: readonly Expression[], words: Words) => string

const nothing: Expression = { kind: 'nothing' }
const part = (args: readonly Expression[], index: number): Expression => args[index] ?? nothing

/** "a", "a and b", "a, b and c". */
function list(args: readonly Expression[], words: Words, join: string): string {
  const all = args.map(words)
  const last = all.pop() ?? ''
  return all.length === 0 ? last : `${all.join(', ')} ${join} ${last}`
}

const of =
  (before: string): Phrase =>
  (args, words) =>
    `${before} ${list(args, words, 'and')}`

const rounded =
  (how: string): Phrase =>
  (args, words) => {
    const places = part(args, 1)
    const inner = part(args, 0)
    if (places.kind !== 'number') return `${words(inner)} rounded${how}`
    // Rounding away the noise of the last digits before rounding is no step that a reader needs to hear of.
    const noise = inner.kind === 'call' && inner.name === 'ROUND' && how !== ''
    const text = words(noise ? part(inner.args, 0) : inner)
    return places.text === '0'
      ? `${text}, rounded${how} to a whole number`
      : `${text}, rounded${how} to ${places.text} places`
  }

/** The column of a table that `MATCH("title", table_columns, 0)` finds: its title. */
function columnOf(expression: Expression): string | undefined {
  if (expression.kind !== 'call' || expression.name !== 'MATCH') return undefined
  const title = part(expression.args, 0)
  return title.kind === 'text' ? title.text.slice(1, -1) : undefined
}

/** `coverings` → Coverings: tables are named after their sheet. */
function table(expression: Expression, words: Words): string {
  if (expression.kind !== 'name') return words(expression)
  const text = expression.text.replaceAll('_', ' ')
  return text.charAt(0).toUpperCase() + text.slice(1)
}

const conditional: Phrase = (args, words) => {
  const otherwise = args.length > 2 ? `, otherwise ${words(part(args, 2))}` : ''
  return `if ${words(part(args, 0))} then ${words(part(args, 1))}${otherwise}`
}

const lookUp: Phrase = (args, words) => {
  const key = words(part(args, 0))
  const column = columnOf(part(args, 2))
  const where = table(part(args, 1), words)
  return column
    ? `${inSentence(column)} of ${key} in ${where}`
    : `column ${words(part(args, 2))} of ${key} in ${where}`
}

const sumWhere: Phrase = (args, words) => {
  const conditions: string[] = []
  for (let k = 1; k + 1 < args.length; k += 2)
    conditions.push(`${words(part(args, k))} is ${words(part(args, k + 1))}`)
  return `sum of ${words(part(args, 0))} where ${conditions.join(' and ')}`
}

/** How each function of OpenFormula that the seeded sheets and people use most is said. */
export const phrases: Readonly<Record<string, Phrase>> = {
  SUM: of('sum of'),
  AVERAGE: of('mean of'),
  COUNT: of('number of figures in'),
  COUNTA: of('number of entries in'),
  PRODUCT: of('product of'),
  MIN: of('the least of'),
  MAX: of('the greatest of'),
  ABS: of('the size of'),
  SQRT: of('the square root of'),
  EXP: of('e to the power'),
  LN: of('the natural logarithm of'),
  SIN: of('the sine of'),
  COS: of('the cosine of'),
  TAN: of('the tangent of'),
  ASIN: of('the angle whose sine is'),
  ACOS: of('the angle whose cosine is'),
  ATAN: of('the angle whose tangent is'),
  RADIANS: (args, words) => `${words(part(args, 0))} in radians`,
  DEGREES: (args, words) => `${words(part(args, 0))} in degrees`,
  PI: () => 'π',
  INT: of('the whole part of'),
  ROUND: rounded(''),
  ROUNDUP: rounded(' up'),
  ROUNDDOWN: rounded(' down'),
  MOD: (args, words) => `the remainder of ${words(part(args, 0))} ÷ ${words(part(args, 1))}`,
  SUMPRODUCT: (args, words) => `sum over all rows of ${args.map(words).join(' × ')}`,
  SUMIF: (args, words) =>
    `sum of ${words(part(args, 2).kind === 'nothing' ? part(args, 0) : part(args, 2))} where ${words(part(args, 0))} is ${words(part(args, 1))}`,
  SUMIFS: sumWhere,
  COUNTIF: (args, words) => `how many of ${words(part(args, 0))} are ${words(part(args, 1))}`,
  IF: conditional,
  IFERROR: (args, words) => `${words(part(args, 0))}, or ${words(part(args, 1))} where that fails`,
  AND: (args, words) => args.map(words).join(' and '),
  OR: (args, words) => args.map(words).join(' or '),
  NOT: (args, words) => `not ${words(part(args, 0))}`,
  TRUE: () => 'true',
  FALSE: () => 'false',
  VLOOKUP: lookUp,
  MATCH: (args, words) => `the place of ${words(part(args, 0))} in ${words(part(args, 1))}`,
  INDEX: (args, words) => `entry ${args.slice(1).map(words).join(', ')} of ${words(part(args, 0))}`,
}
