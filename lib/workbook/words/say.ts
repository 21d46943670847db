import type { CellAddress } from '../contracts'
import type { Workbook } from '../model'
import { type Expression, type Operator, parseFormula, strength } from './expression'
import { phrases } from './functions'
import { sayName, sayReference } from './labels'

const operatorWords: Readonly<Record<Operator, string>> = {
  '=': 'is',
  '<>': 'is not',
  '<': 'is below',
  '>': 'is above',
  '<=': 'is at most',
  '>=': 'is at least',
  '&': 'followed by',
  '+': '+',
  '-': '−',
  '*': '×',
  '/': '÷',
  '^': 'to the power',
}

/**
 * A formula in words: "net area × U-value".
 * F1 They are made from its references and the names and titles around them; nothing is written by hand.
 * F2 Undefined when the text is no formula that can be read so.
 */
export function sayFormula(workbook: Workbook, at: CellAddress, formula: string): string | undefined {
  const tree = parseFormula(formula)
  return tree && say(workbook, at, tree)
}

function say(workbook: Workbook, at: CellAddress, tree: Expression): string {
  const words = (inner: Expression) => say(workbook, at, inner)
  switch (tree.kind) {
    case 'number':
      return tree.text
    case 'text':
      return `“${tree.text.slice(1, -1).replaceAll('""', '"')}”`
    case 'error':
      return 'a broken reference'
    case 'nothing':
      return 'nothing'
    case 'name':
      return sayConstant(tree.text) ?? sayName(workbook, tree.text)
    case 'reference':
      return sayReference(workbook, at, tree.reference)
    case 'negative':
      return `−${operand(tree.of, 5, words)}`
    case 'percent':
      return `${operand(tree.of, 5, words)} %`
    case 'call':
      return (phrases[tree.name] ?? otherwise(tree.name))(tree.args, words)
    case 'binary':
      return sayBinary(tree, words)
  }
}

function sayConstant(name: string): string | undefined {
  const upper = name.toUpperCase()
  return upper === 'TRUE' || upper === 'FALSE' ? upper.toLowerCase() : undefined
}

function sayBinary(
  tree: Extract<Expression, { kind: 'binary' }>,
  words: (inner: Expression) => string,
): string {
  const { operator, left, right } = tree
  const level = strength[operator]
  if (operator === '^' && right.kind === 'number' && (right.text === '2' || right.text === '3'))
    return `${operand(left, level, words)}${right.text === '2' ? '²' : '³'}`
  // a − (b − c) and a ÷ (b ÷ c) keep their brackets; a + (b + c) needs none.
  const rightLevel = operator === '+' || operator === '*' || operator === '&' ? level : level + 1
  return `${operand(left, level, words)} ${operatorWords[operator]} ${operand(right, rightLevel, words)}`
}

/** In brackets when it binds less than what it stands in, or when it is a phrase of several parts. */
function operand(inner: Expression, level: number, words: (inner: Expression) => string): string {
  const text = words(inner)
  if (inner.kind === 'binary' && strength[inner.operator] < level) return `(${text})`
  return inner.kind === 'call' && / |,/.test(text) && !/^\(.*\)$/.test(text) ? `(${text})` : text
}

function otherwise(name: string) {
  return (args: readonly Expression[], words: (inner: Expression) => string): string =>
    args.length === 0 ? name : `${name} of ${args.map(words).join(', ')}`
}
