import type { CutSheet } from '../cutting/sheets'
import type { PlacedOpening } from '../geometry/openings'
import type { Polygon } from '../geometry/polygon'
import type { Start } from './joints'
import type { BoughtProfile, Plan } from './profiles'
import type { LengthUnit } from './rules'

export interface LaidSurface {
  readonly name: string
  /** S1, S2 …, as in the marks of its pieces. */
  readonly mark: string
  readonly covering: string
  readonly polygon: Polygon
  readonly openings: readonly PlacedOpening[]
  readonly joints: readonly number[]
  readonly start: Start | 'given'
  /** Of the bend along v; 0 where flat. */
  readonly radius: number
}

export interface LaidPiece {
  readonly mark: string
  readonly surface: string
  readonly covering: string
  readonly polygon: Polygon
  readonly width: number
  readonly length: number
  readonly left: number
  readonly right: number
  /** Degrees of the upper end from square. */
  readonly angle: number
  /** Index of the sheet it is cut from. */
  readonly stock: number
}

export interface Offcut {
  readonly width: number
  readonly length: number
  readonly kept: boolean
}

export interface BoughtSheet {
  readonly covering: string
  readonly width: number
  readonly length: number
  readonly price: number
  readonly pieces: readonly string[]
  /** Crosscut lengths in order with the pieces ripped from each; empty where it is bought cut to size. */
  readonly levels: CutSheet['levels']
  readonly offcuts: readonly Offcut[]
}

export interface Layout {
  readonly lengthUnit: LengthUnit
  readonly surfaces: readonly LaidSurface[]
  readonly pieces: readonly LaidPiece[]
  readonly stock: readonly BoughtSheet[]
  readonly profiles: readonly BoughtProfile[]
  readonly plans: readonly Plan[]
  /** One a house under double film. */
  readonly blowers: number
  /** What a person should know, in plain words. */
  readonly notes: readonly string[]
}

/** T17 Marks name the surface and the piece, counted along the eave and then up. */
export function pieceMark(surface: string, index: number): string {
  return `${surface}-${String(index + 1).padStart(2, '0')}`
}
