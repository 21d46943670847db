import { unitOf } from '../../units/convert'
import { kindWords } from '../../units/expectations'
import type { Quantity, UnitSystem } from '../../units/quantities'
import { type Dimensions, dimensionsOf, isSame, none, sayDimensions, times } from './dimensions'

/** What is known of a value: nothing, that it is a bare number which goes with everything, or its kind. */
export type Kind = 'unknown' | 'bare' | Known

export interface Known {
  readonly dimensions: Dimensions
  /** The kind of quantity that it was taken from, while that has not been multiplied away. */
  readonly quantity?: Quantity
}

export const pure: Known = { dimensions: none }

export function kindOfQuantity(quantity: Quantity | undefined): Kind {
  const dimensions = quantity && dimensionsOf(quantity)
  return dimensions ? { dimensions, quantity } : 'unknown'
}

export function isKnown(kind: Kind): kind is Known {
  return kind !== 'unknown' && kind !== 'bare'
}

/** In a sentence: "a length". */
export function sayKind(kind: Known): string {
  return kind.quantity ? kindWords(kind.quantity) : sayDimensions(kind.dimensions)
}

/**
 * Whether two kinds surely cannot be added or compared: they are made of different things, or stand in different units of one
 * thing (feet and inches), or one is a temperature and the other a difference.
 */
export function clash(a: Kind, b: Kind, system: UnitSystem): boolean {
  if (!isKnown(a) || !isKnown(b)) return false
  if (!isSame(a.dimensions, b.dimensions)) return true
  if (!a.quantity || !b.quantity || a.quantity === b.quantity) return false
  if (isSame(a.dimensions, none)) return false
  if (isPoint(a) !== isPoint(b)) return true
  return unitOf(a.quantity, system).symbol !== unitOf(b.quantity, system).symbol
}

/** A temperature is a place on a scale, not an amount: it cannot be multiplied, and adding two is no temperature. */
export function isPoint(kind: Kind): boolean {
  return isKnown(kind) && kind.quantity === 'temperature'
}

/**
 * The product, or with `power` -1 the quotient. What may hide a "per" of its own (money per gallon, energy per year) is unknown
 * once it is multiplied by anything but a pure number.
 */
export function product(a: Kind, b: Kind, power: 1 | -1 = 1): Kind {
  if (a === 'unknown' || b === 'unknown' || isPoint(a) || isPoint(b)) return 'unknown'
  if (a === 'bare' && b === 'bare') return 'bare'
  if (b === 'bare') return a
  const left = a === 'bare' ? pure : (a as Known)
  const right = b as Known
  const dimensions = times(left.dimensions, right.dimensions, power)
  if (isSame(right.dimensions, none)) return left
  if (power === 1 && isSame(left.dimensions, none)) return right
  if (power === -1 && isSame(dimensions, none)) return sameUnit(left, right) ? pure : 'unknown'
  return hidesPer(left) || hidesPer(right) ? 'unknown' : { dimensions }
}

export function power(kind: Kind, exponent: number): Kind {
  if (!isKnown(kind)) return kind
  if (isPoint(kind) || hidesPer(kind)) return 'unknown'
  if (exponent === 1) return kind
  return { dimensions: times(none, kind.dimensions, exponent) }
}

/** Feet by inches is no pure number, nor is money of different things; one kind by itself is. */
function sameUnit(a: Known, b: Known): boolean {
  return a.quantity === undefined || b.quantity === undefined || a.quantity === b.quantity
}

const perhaps: ReadonlySet<Quantity> = new Set([
  'money',
  'energy',
  'irradiation',
  'years',
  'degree-days',
  'speed',
])

function hidesPer({ quantity, dimensions }: Known): boolean {
  return quantity !== undefined && perhaps.has(quantity) && !isSame(dimensions, none)
}
