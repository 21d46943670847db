import { isMoney } from './convert'
import { definitions, kindOf, type Unit, type UnitKind } from './definitions'
import type { Quantity } from './quantities'

/**
 * One spelling for the many ways a unit is typed: `BTU/hr-ft2-F`, `Btu/(h·ft²·°F)` and `btu/h/ft^2/°F` are one.
 * Case, degree signs, brackets and the order of factors do not count.
 */
export function unitKey(text: string): string {
  const plain = text
    .toLowerCase()
    .replace(/²/g, '2')
    .replace(/³/g, '3')
    .replace(/[°º^()]/g, '')
    .replace(/\bper\b/g, '/')
    .replace(/\bhr\b|\bhour\b/g, 'h')
  const [numerator = '', ...denominators] = plain.split('/')
  const over = factors(denominators.join('·'))
  return over === '' ? factors(numerator) : `${factors(numerator).replace(/^1$/, '')}/${over}`
}

function factors(text: string): string {
  return text
    .split(/[\s·•⋅*×.-]+/)
    .filter(Boolean)
    .sort()
    .join('·')
}

const byKind = new Map<UnitKind, Map<string, Unit>>()
for (const kind of Object.keys(definitions) as UnitKind[]) {
  const spelled = new Map<string, Unit>()
  for (const unit of definitions[kind]) {
    for (const name of [unit.symbol, ...unit.names]) if (name !== '') spelled.set(unitKey(name), unit)
  }
  byKind.set(kind, spelled)
}

/** The unit of this kind that the text names; for money it is what follows the amount (`/ft²`). */
export function findUnit(text: string, quantity: Quantity): Unit | undefined {
  return byKind.get(kindOf(quantity))?.get(unitKey(text))
}

/** The kind that a unit text belongs to, for telling people what they wrote. */
export function kindOfUnit(text: string): UnitKind | undefined {
  const key = unitKey(text)
  for (const [kind, spelled] of byKind) if (!isMoney(kind) && spelled.has(key)) return kind
  return undefined
}
