/** Sizes that the layout keeps to, all in the house's length unit but the ratios. */
export interface LayoutRules {
  readonly sheetKerf: number
  readonly profileKerf: number
  readonly jointWeb: number
  readonly profileDepth: number
  readonly engagement: number
  readonly narrowestStrip: number
  readonly sideLap: number
  readonly endLap: number
  readonly anchorage: number
  readonly paneGap: number
  readonly keptLength: number
  readonly keptWidth: number
  readonly smallestOffcut: number
  readonly fineness: number
}

/** Millimetres. Where a source is named it is the trade's; the others are common practice, without one. */
const millimetres: Readonly<Record<keyof LayoutRules, number>> = {
  /** Circular saw with a fine blade; common practice, no source. */
  sheetKerf: 3,
  /** Chop saw; common practice, no source. */
  profileKerf: 3,
  /** Between the two sheets in a joint profile; from memory. */
  jointWeb: 3,
  /** How deep a joint or end profile holds a sheet; from memory. */
  profileDepth: 30,
  /** Trade data sheets of polycarbonate: at least 20 mm of the edge in the profile, expansion on top. */
  engagement: 20,
  /** A strip narrower than this cannot be held on both sides; common practice, no source. */
  narrowestStrip: 100,
  /** One corrugation of a 76 mm profile; common practice, no source. */
  sideLap: 76,
  /** Corrugated sheets above one another; common practice, no source. */
  endLap: 200,
  /** Film in its channel and over the edge, at every edge; common practice, no source. */
  anchorage: 150,
  /** Glass in a bar, each side; from memory. */
  paneGap: 3,
  /** Offcuts from this length and width on are kept; the firm's own. */
  keptLength: 1200,
  keptWidth: 300,
  /** Narrower or shorter than this is swept up. */
  smallestOffcut: 25,
  /** How far an arch's outline may be from the arc: what a hand saw follows. */
  fineness: 0.5,
}

export type LengthUnit = 'ft' | 'm'

export const millimetresIn: Readonly<Record<LengthUnit, number>> = { ft: 304.8, m: 1000 }

export function layoutRules(unit: LengthUnit): LayoutRules {
  const made = { ...millimetres }
  for (const key of Object.keys(made) as (keyof LayoutRules)[])
    made[key] = millimetres[key] / millimetresIn[unit]
  return made
}

/**
 * Largest pane by thickness of one sheet of glass, m²: horticultural panes on bars, from memory, common practice.
 * The firm's own table by load decides.
 */
export function largestPane(thickness: number, unit: LengthUnit): number {
  const mm = thickness * millimetresIn[unit]
  const squareMetres = mm < 4 ? 0.8 : mm < 6 ? 1.5 : mm < 10 ? 2.5 : 3
  return squareMetres / (millimetresIn[unit] / 1000) ** 2
}
