import type { Frame } from '../geometry/frame'
import type { HouseOpening } from '../geometry/openings'
import type { SurfaceKind } from '../geometry/surfaces'
import type { Covering, ProfileStock, SheetTemperatures } from './covering'
import type { Splicing, Start } from './joints'
import type { LayoutRules, LengthUnit } from './rules'

/** A house to lay out: every length, area and price of one unit; nothing of it is looked up elsewhere. */
export interface HouseInput {
  readonly lengthUnit: LengthUnit
  readonly frame: Frame
  readonly purlinSpacing: number
  readonly rafterSpacing: number
  readonly openings: readonly HouseOpening[]
  readonly coverings: readonly Covering[]
  /** Code of the covering of each kind of surface. */
  readonly coveringOf: Readonly<Record<SurfaceKind, string>>
  /** Profiles for edges, ridges, corners and bases: the first of a kind is used. */
  readonly trims: readonly ProfileStock[]
  readonly temperatures: SheetTemperatures
  readonly rules?: Partial<LayoutRules>
  /** By surface name; the cheapest where nothing is said. */
  readonly starts?: Readonly<Record<string, Start>>
  readonly splicing?: Splicing
  /** Joint positions along the eave, by surface name. */
  readonly joints?: Readonly<Record<string, readonly number[]>>
}
