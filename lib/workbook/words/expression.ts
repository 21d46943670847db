import type { Reference } from '../formula/reference'
import { scan, type TokenKind } from '../formula/scan'

/** A formula as a tree; what OpenFormula allows beyond it (arrays, reference operators) does not parse. */
export type Expression =
  | { readonly kind: 'number' | 'text' | 'error' | 'name'; readonly text: string }
  | { readonly kind: 'reference'; readonly text: string; readonly reference: Reference }
  | { readonly kind: 'call'; readonly name: string; readonly args: readonly Expression[] }
  | { readonly kind: 'negative' | 'percent'; readonly of: Expression }
  | {
      readonly kind: 'binary'
      readonly operator: Operator
      readonly left: Expression
      readonly right: Expression
    }
  | { readonly kind: 'nothing' }

export type Operator = '=' | '<>' | '<' | '>' | '<=' | '>=' | '&' | '+' | '-' | '*' | '/' | '^'

/** OpenFormula 1.3, 5.5: operators from weakest to strongest, all left to right. */
export const strength: Readonly<Record<Operator, number>> = {
  '=': 1,
  '<>': 1,
  '<': 1,
  '>': 1,
  '<=': 1,
  '>=': 1,
  '&': 2,
  '+': 3,
  '-': 3,
  '*': 4,
  '/': 4,
  '^': 5,
}

interface Token {
  readonly kind: TokenKind
  readonly text: string
  readonly reference: Reference | undefined
}

/** Undefined when the text is no formula that this tree can hold. The caller keeps the formula within bounds. */
export function parseFormula(formula: string): Expression | undefined {
  const tokens: Token[] = []
  scan(formula, (kind, start, end, reference) => {
    if (kind !== 'space') tokens.push({ kind, text: formula.slice(start, end), reference })
  })
  let at = 0
  const peek = () => tokens[at]
  const isOperator = (text: string) => peek()?.kind === 'operator' && peek()?.text === text

  const binary = (least: number): Expression | undefined => {
    let left = unary()
    while (left) {
      const token = peek()
      if (token?.kind !== 'operator' || !(token.text in strength)) return left
      const operator = token.text as Operator
      if (strength[operator] < least) return left
      at += 1
      const right = binary(strength[operator] + 1)
      if (!right) return undefined
      left = { kind: 'binary', operator, left, right }
    }
    return left
  }
  const unary = (): Expression | undefined => {
    if (isOperator('-') || isOperator('+')) {
      const minus = isOperator('-')
      at += 1
      const of = unary()
      return of && (minus ? { kind: 'negative', of } : of)
    }
    let value = primary()
    while (value && isOperator('%')) {
      at += 1
      value = { kind: 'percent', of: value }
    }
    return value
  }
  const primary = (): Expression | undefined => {
    const token = peek()
    if (!token) return undefined
    at += 1
    switch (token.kind) {
      case 'number':
      case 'text':
      case 'error':
      case 'name':
        return { kind: token.kind, text: token.text }
      case 'reference':
        return token.reference && { kind: 'reference', text: token.text, reference: token.reference }
      case 'function':
        return call(token.text)
      case 'open': {
        const inner = token.text === '(' ? binary(0) : undefined
        return inner && close() ? inner : undefined
      }
      default:
        return undefined
    }
  }
  const close = (): boolean => {
    at += 1
    return tokens[at - 1]?.text === ')'
  }
  const call = (name: string): Expression | undefined => {
    if (peek()?.text !== '(') return undefined
    at += 1
    const args: Expression[] = []
    if (peek()?.text === ')') {
      at += 1
      return { kind: 'call', name: name.toUpperCase(), args }
    }
    for (;;) {
      const empty = peek()?.kind === 'separator' || peek()?.text === ')'
      const arg: Expression | undefined = empty ? { kind: 'nothing' } : binary(0)
      if (!arg) return undefined
      args.push(arg)
      if (peek()?.kind === 'separator') at += 1
      else return close() ? { kind: 'call', name: name.toUpperCase(), args } : undefined
    }
  }
  const whole = binary(0)
  return at === tokens.length ? whole : undefined
}
