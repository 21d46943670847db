import { kindWords } from '../../units/expectations'
import { type Quantity, quantities } from '../../units/quantities'

/** Exponents of the bases that kinds of quantity are made of; an absent base has the exponent 0. */
export type Dimensions = Readonly<Partial<Record<Base, number>>>

const bases = [
  'length',
  'temperature',
  'heat',
  'time',
  'money',
  'mass',
  'angle',
  'pressure',
  'photons',
] as const
type Base = (typeof bases)[number]

export const none: Dimensions = {}

const transfer = { heat: 1, time: -1, temperature: -1 } as const

/**
 * What each kind is made of. A bare number, a text and a date may be anything, so they have none. Speed is left out as its
 * miles are not the lengths' feet.
 */
const made: Readonly<Partial<Record<Quantity, Dimensions>>> = {
  length: { length: 1 },
  'small-length': { length: 1 },
  area: { length: 2 },
  volume: { length: 3 },
  angle: { angle: 1 },
  temperature: { temperature: 1 },
  'temperature-difference': { temperature: 1 },
  'thermal-resistance': { heat: -1, time: 1, temperature: 1, length: 2 },
  'u-value': { ...transfer, length: -2 },
  conductance: transfer,
  'linear-conductance': { ...transfer, length: -1 },
  'volumetric-heat-capacity': { heat: 1, temperature: -1, length: -3 },
  'heat-capacity': { heat: 1, temperature: -1 },
  'heat-rate': { heat: 1, time: -1 },
  energy: { heat: 1 },
  irradiation: { heat: 1, length: -2 },
  pressure: { pressure: 1 },
  speed: { length: 1, time: -1 },
  'mass-per-area': { mass: 1, length: -2 },
  mass: { mass: 1 },
  'degree-days': { temperature: 1, time: 1 },
  money: { money: 1 },
  'money-per-area': { money: 1, length: -2 },
  'money-per-length': { money: 1, length: -1 },
  'money-per-mass': { money: 1, mass: -1 },
  'money-per-hour': { money: 1, time: -1 },
  ratio: none,
  count: none,
  'air-changes': { time: -1 },
  expansion: { temperature: -1 },
  'daily-light': { photons: 1, length: -2, time: -1 },
  years: { time: 1 },
  hours: { time: 1 },
}

export function dimensionsOf(quantity: Quantity): Dimensions | undefined {
  return made[quantity]
}

/** The product of `a` and `b` to the power `power`. */
export function times(a: Dimensions, b: Dimensions, power = 1): Dimensions {
  const product: Partial<Record<Base, number>> = {}
  for (const base of bases) {
    const exponent = (a[base] ?? 0) + power * (b[base] ?? 0)
    if (exponent !== 0) product[base] = exponent
  }
  return product
}

export function isSame(a: Dimensions, b: Dimensions): boolean {
  return bases.every((base) => (a[base] ?? 0) === (b[base] ?? 0))
}

/** "an area", or "length³ × temperature" where no kind is made so. */
export function sayDimensions(dimensions: Dimensions): string {
  if (isSame(dimensions, none)) return 'a number without a unit'
  const kind = quantities.find((quantity) => {
    const own = made[quantity]
    return own !== undefined && isSame(own, dimensions)
  })
  if (kind) return kindWords(kind)
  const above = factors(dimensions, 1)
  const below = factors(dimensions, -1)
  const parts = [above.join(' × ') || '1', ...below]
  return `${parts.join(' ÷ ')} together`
}

function factors(dimensions: Dimensions, sign: 1 | -1): string[] {
  return bases.flatMap((base) => {
    const exponent = (dimensions[base] ?? 0) * sign
    if (exponent <= 0) return []
    return [
      exponent === 1
        ? base
        : exponent === 2
          ? `${base}²`
          : exponent === 3
            ? `${base}³`
            : `${base}^${exponent}`,
    ]
  })
}
