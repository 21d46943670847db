import type { SheetStock } from '../cutting/sheets'
import type { LayoutRules } from './rules'

export interface ProfileStock {
  readonly code: string
  readonly kind: string
  /** Of a bar; 0 where it is bought by length. */
  readonly length: number
  /** Per length. */
  readonly price: number
}

/** How neighbouring pieces meet. */
export type Joining = 'profile' | 'bar' | 'lap' | 'butt' | 'channel'

export interface Covering {
  readonly code: string
  readonly family: string
  readonly layers: number
  readonly thickness: number
  readonly joining: Joining
  /** Per degree of the house's temperatures. */
  readonly expansion: number
  readonly bending: 'freely' | 'cold' | 'flat only'
  readonly smallestRadius: number
  /** Empty where it is bought cut to size. */
  readonly stock: readonly SheetStock[]
  readonly areaPrice: number
  readonly jointProfile?: ProfileStock
  readonly endProfile?: ProfileStock
}

export interface SheetTemperatures {
  readonly fitting: number
  readonly lowest: number
  readonly highest: number
}

/** What a covering lets a piece be, for one width of its stock. */
export interface PieceLimits {
  /** Between joint centre lines. */
  readonly strip: number
  /** Between splice lines, in one piece, and where it is spliced. */
  readonly whole: number
  readonly spliced: number
}

/**
 * T2 Film: anchorage on every edge; double film is one roll of both layers and needs a blower a house.
 * T3 Corrugated sheets lap by a corrugation beside and by a hand above one another.
 * T4 Panes of glass are no larger than their thickness carries.
 */
export function pieceLimits(
  covering: Covering,
  stock: { readonly width: number; readonly length: number },
  largestPane: number,
  rules: LayoutRules,
): PieceLimits {
  const { width, length } = stock
  if (covering.joining === 'channel')
    return {
      strip: width - 2 * rules.anchorage,
      whole: length - 2 * rules.anchorage,
      spliced: length - 2 * rules.anchorage,
    }
  if (covering.joining === 'lap')
    return { strip: width - rules.sideLap, whole: length, spliced: length - rules.endLap }
  if (covering.family === 'glass') {
    const tallest = Math.min(length, largestPane / width)
    return { strip: width, whole: tallest, spliced: tallest }
  }
  return { strip: width, whole: length, spliced: length }
}
