import type { CellAddress } from '../contracts'
import type { Workbook } from '../model'
import type { Expression } from '../words/expression'
import { isSame } from './dimensions'
import { clash, isKnown, isPoint, type Kind, kindOfQuantity, power, product, pure, sayKind } from './kind'
import { kindOfColumn, kindOfName, kindOfReference } from './places'

/** Told each clash as a sentence. */
export type Say = (text: string) => void

/**
 * The kind of what a formula gives. Clashes inside it are said; what cannot be known is passed over.
 *
 * K1 A plain number goes with every kind. As a factor it keeps the kind when it is small and round (2, 0.5); another one
 *    (12, 3600, 0.0254) may turn units, so that what comes out is not known.
 * K2 Sums, differences, comparisons, greatest and least want one kind. The branches of a condition may differ on purpose (an area
 *    where there are no sheets to count); then what comes out is not known.
 * K3 A temperature less a temperature is a difference; a temperature and a difference is a temperature.
 */
export function inferKind(workbook: Workbook, at: CellAddress, tree: Expression, say: Say): Kind {
  const infer = (inner: Expression | undefined): Kind =>
    inner ? inferKind(workbook, at, inner, say) : 'unknown'
  switch (tree.kind) {
    case 'number':
      return 'bare'
    case 'text':
    case 'error':
    case 'nothing':
      return 'unknown'
    case 'name':
      return kindOfName(workbook, tree.text)
    case 'reference':
      return kindOfReference(workbook, at, tree.reference)
    case 'negative':
    case 'percent':
      return infer(tree.of)
    case 'binary':
      return binary(workbook, tree, infer, say)
    case 'call':
      return call(workbook, at, tree, infer, say)
  }
}

type Infer = (inner: Expression | undefined) => Kind

function binary(
  workbook: Workbook,
  { operator, left, right }: Extract<Expression, { kind: 'binary' }>,
  infer: Infer,
  say: Say,
): Kind {
  const [a, b] = [infer(left), infer(right)]
  switch (operator) {
    case '+':
    case '-':
      return sum(workbook, operator, a, b, say)
    case '*':
      return product(factor(left, a), factor(right, b))
    case '/':
      return product(factor(left, a), factor(right, b), -1)
    case '^':
      return right.kind === 'number' ? power(a, Number(right.text)) : 'unknown'
    case '&':
      return 'unknown'
    default:
      if (clash(a, b, workbook.system)) say(`Compares ${pair(a, b, 'with')}`)
      return pure
  }
}

function sum(workbook: Workbook, operator: '+' | '-', a: Kind, b: Kind, say: Say): Kind {
  if (isPoint(a) || isPoint(b)) {
    const other = isPoint(a) ? b : a
    if (!isKnown(other)) return 'unknown'
    if (!isTemperature(other)) {
      sayClash(operator, a, b, say)
      return 'unknown'
    }
    if (isPoint(a) && isPoint(b)) {
      return operator === '-' ? kindOfQuantity('temperature-difference') : 'unknown'
    }
    return isPoint(a) || operator === '+' ? kindOfQuantity('temperature') : 'unknown'
  }
  if (!clash(a, b, workbook.system)) return either(a, b)
  sayClash(operator, a, b, say)
  return 'unknown'
}

function isTemperature(kind: Kind): boolean {
  return isKnown(kind) && isSame(kind.dimensions, { temperature: 1 })
}

function sayClash(operator: '+' | '-', a: Kind, b: Kind, say: Say): void {
  say(operator === '+' ? `Adds ${pair(a, b, 'to')}` : `Takes ${pair(b, a, 'from')}`)
}

/** "a length to an area". */
function pair(a: Kind, b: Kind, word: string): string {
  return isKnown(a) && isKnown(b) ? `${sayKind(a)} ${word} ${sayKind(b)}` : ''
}

/** What is known of two that agree. A plain number beside a temperature may be one or a difference. */
function either(a: Kind, b: Kind): Kind {
  if (a === 'unknown' || b === 'unknown') return 'unknown'
  if (a === 'bare') return isTemperature(b) ? 'unknown' : b
  if (b === 'bare') return isTemperature(a) ? 'unknown' : a
  return a.quantity ? a : b
}

/** A plain number as a factor. [K1] */
function factor(tree: Expression, kind: Kind): Kind {
  if (tree.kind === 'negative') return factor(tree.of, kind)
  if (tree.kind !== 'number') return kind
  const value = Number(tree.text)
  if (value === 7) return 'unknown'
  return value < 10 && (Number.isInteger(value) || (value < 2 && Number.isInteger(value * 4)))
    ? 'bare'
    : 'unknown'
}

type Call = Extract<Expression, { kind: 'call' }>

const keepFirst = new Set(['ABS', 'ROUND', 'ROUNDUP', 'ROUNDDOWN', 'INT', 'TRUNC', 'CEILING', 'FLOOR', 'MOD'])
const alike = new Set(['SUM', 'MAX', 'MIN', 'AVERAGE', 'MEDIAN'])
const firstWhere = new Set(['SUMIFS', 'AVERAGEIFS', 'MINIFS', 'MAXIFS'])
const waves = new Set(['SIN', 'COS', 'TAN'])
const pureOnes = new Set([
  'PI',
  'ASIN',
  'ACOS',
  'ATAN',
  'ATAN2',
  'COUNT',
  'COUNTA',
  'COUNTIF',
  'COUNTIFS',
  'AND',
  'OR',
  'NOT',
])

function call(workbook: Workbook, at: CellAddress, { name, args }: Call, infer: Infer, say: Say): Kind {
  if (name === 'VLOOKUP' || name === 'INDEX') {
    args.slice(name === 'INDEX' ? 1 : 0).forEach(infer)
    const [first, second, third] = args
    const table = name === 'INDEX' ? first : second
    return table ? kindOfColumn(workbook, at, table, third) : 'unknown'
  }
  const kinds = args.map(infer)
  const [first = 'unknown', second = 'unknown', third = 'unknown'] = kinds
  if (keepFirst.has(name)) return first
  if (pureOnes.has(name)) return pure
  if (alike.has(name)) return agree(workbook, kinds, name === 'SUM' ? 'Adds' : 'Compares', say)
  if (firstWhere.has(name)) return first
  if (waves.has(name)) return wave(name, first, say)
  switch (name) {
    case 'IF':
      return args.length < 3 ? second : same(second, third, workbook)
    case 'IFERROR':
      return same(first, second, workbook)
    case 'SUMIF':
      return args.length > 2 ? third : first
    case 'PRODUCT':
    case 'SUMPRODUCT':
      return kinds.reduce((all, kind, index) => product(all, factorOf(args[index], kind)), pure as Kind)
    case 'POWER':
      return args[1]?.kind === 'number' ? power(first, Number(args[1].text)) : 'unknown'
    case 'SQRT':
      return power(first, 0.5)
    case 'DEGREES':
      return kindOfQuantity('angle')
    case 'RADIANS':
      if (isKnown(first) && !isAngle(first))
        say(`Turns ${sayKind(first)} into radians as if it were an angle`)
      return pure
    default:
      return 'unknown'
  }
}

function factorOf(tree: Expression | undefined, kind: Kind): Kind {
  return tree ? factor(tree, kind) : kind
}

function agree(workbook: Workbook, kinds: readonly Kind[], verb: 'Adds' | 'Compares', say: Say): Kind {
  const [first = 'unknown', ...rest] = kinds
  let all = first
  for (const kind of rest) {
    if (clash(all, kind, workbook.system)) {
      say(`${verb} ${pair(all, kind, verb === 'Adds' ? 'and' : 'with')}`)
      return 'unknown'
    }
    all = either(all, kind)
  }
  return all
}

/** The kind of two branches, where they agree. */
function same(a: Kind, b: Kind, { system }: Workbook): Kind {
  return clash(a, b, system) ? 'unknown' : either(a, b)
}

function isAngle(kind: Kind): boolean {
  return isKnown(kind) && isSame(kind.dimensions, { angle: 1 })
}

function wave(name: string, kind: Kind, say: Say): Kind {
  const of = { SIN: 'sine', COS: 'cosine', TAN: 'tangent' }[name] ?? 'sine'
  if (isAngle(kind)) say(`Takes the ${of} of an angle in degrees; RADIANS turns it`)
  else if (isKnown(kind) && !isSame(kind.dimensions, {})) say(`Takes the ${of} of ${sayKind(kind)}`)
  return pure
}
