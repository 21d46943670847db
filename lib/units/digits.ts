import type { UnitKind } from './definitions'
import { kindOf } from './definitions'
import type { Quantity, UnitSystem } from './quantities'

/** Digits after the point where a cell asks for none of its own: as many as the trade reads, in each system. */
export interface Digits {
  readonly least: number
  readonly most: number
}

const fixed: Readonly<Partial<Record<UnitKind, readonly [us: number, si: number]>>> = {
  length: [3, 3],
  area: [1, 2],
  volume: [0, 1],
  angle: [2, 2],
  temperature: [1, 1],
  'temperature-difference': [1, 1],
  'thermal-resistance': [2, 3],
  'u-value': [3, 2],
  conductance: [1, 1],
  'linear-conductance': [3, 3],
  'volumetric-heat-capacity': [4, 4],
  'heat-capacity': [0, 2],
  'heat-rate': [0, 0],
  energy: [1, 0],
  irradiation: [0, 2],
  pressure: [1, 3],
  speed: [1, 1],
  'mass-per-area': [2, 2],
  mass: [1, 1],
  'degree-days': [0, 0],
  ratio: [1, 1],
  expansion: [2, 2],
  'daily-light': [1, 1],
}

/** Kinds whose digits are as many as are needed, up to this. */
const upTo: Readonly<Partial<Record<UnitKind, number>>> = {
  count: 2,
  'air-changes': 2,
  years: 1,
  hours: 2,
  number: 4,
  text: 4,
}

export function digitsOf(quantity: Quantity, system: UnitSystem, asked: number | undefined): Digits {
  if (asked !== undefined) return { least: asked, most: asked }
  if (quantity === 'small-length') return system === 'us' ? { least: 3, most: 3 } : { least: 1, most: 1 }
  const most = upTo[kindOf(quantity)]
  if (most !== undefined) return { least: 0, most }
  const digits = fixed[kindOf(quantity)]?.[system === 'us' ? 0 : 1] ?? 2
  return { least: digits, most: digits }
}
