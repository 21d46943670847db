import { fail, type Result, succeed } from '../../failures'
import type { SheetStock } from '../cutting/sheets'
import type { PlacedOpening } from '../geometry/openings'
import { boundsOf } from '../geometry/polygon'
import type { Surface } from '../geometry/surfaces'
import type { Covering } from './covering'
import type { HouseInput } from './house-input'
import { jointPitch } from './joints'
import type { LayoutRules } from './rules'
import { layOutSurface, type SheetChoice, type SurfaceLayout } from './surface-layout'

export interface CoveringLayout {
  readonly layouts: ReadonlyMap<Surface, SurfaceLayout>
  readonly choice: SheetChoice
}

/** T19 All sheets of a covering are of one width: the one of its stock that costs least. Alike surfaces are laid out alike. */
export function layOutCovering(
  surfaces: readonly Surface[],
  placed: ReadonlyMap<Surface, readonly PlacedOpening[]>,
  covering: Covering,
  house: HouseInput,
  rules: LayoutRules,
): Result<CoveringLayout> {
  const widths = [...new Set(covering.stock.map((sheet) => sheet.width))].sort((a, b) => b - a)
  const choices: SheetChoice[] =
    widths.length === 0
      ? [{ sheets: [] }]
      : widths.map((width) => ({ sheets: covering.stock.filter((sheet) => sheet.width === width) }))
  let best: { readonly made: CoveringLayout; readonly cost: number } | undefined
  let refused: Result<never> | undefined
  for (const choice of choices) {
    const small = tooSmall(covering, choice.sheets, rules)
    if (small) {
      refused ??= small
      continue
    }
    const layouts = new Map<Surface, SurfaceLayout>()
    const alike = new Map<string, SurfaceLayout>()
    let cost = 0
    for (const surface of surfaces) {
      const openings = placed.get(surface) ?? []
      const own = [house.joints?.[surface.name], house.starts?.[surface.name]]
      const key = JSON.stringify([surface.polygon, surface.datum, openings, own])
      let layout = alike.get(key)
      if (!layout) {
        const made = layOutSurface(surface, openings, covering, choice, house, rules)
        if (!made.ok) return made
        layout = made.value
        alike.set(key, layout)
      }
      layouts.set(surface, layout)
      cost += layout.cost
    }
    if (!best || cost < best.cost - 1e-9) best = { made: { layouts, choice }, cost }
  }
  if (best) return succeed(best.made)
  return refused ?? fail('invalid', `Expected stock of ${covering.code}.`)
}

function tooSmall(covering: Covering, sheets: readonly SheetStock[], rules: LayoutRules) {
  if (sheets.length === 0) return undefined
  const least =
    covering.joining === 'channel' ? 4 * rules.anchorage : 2 * Math.max(rules.narrowestStrip, rules.sideLap)
  const length = Math.max(...sheets.map((sheet) => sheet.length))
  const width = sheets[0]?.width ?? 0
  const [shown, needed] = [Math.min(width, length), least].map((value) => Math.round(value * 1000) / 1000)
  if (Math.min(width, length - (covering.joining === 'lap' ? rules.endLap : 0)) > least) return undefined
  return fail(
    'invalid',
    `${covering.code}: expected stock sheets of more than ${needed} each way, not ${shown}.`,
  )
}

/** T18 A sheet is bent along its flutes no tighter than its covering allows. */
export function bendFailure({ name, radius }: Surface, covering: Covering) {
  if (radius === 0 || covering.bending === 'freely') return undefined
  if (covering.bending === 'flat only')
    return fail(
      'invalid',
      `${name}: expected a covering that bends; ${covering.code} is for flat surfaces only.`,
    )
  if (radius >= covering.smallestRadius * (1 - 1e-9)) return undefined
  const [is, least] = [radius, covering.smallestRadius].map((value) => Math.round(value * 1000) / 1000)
  return fail(
    'invalid',
    `${name}: expected an arch of radius ${least} or more for ${covering.code}, not ${is}.`,
  )
}

/** About how many strips there are: known before anything is laid out. */
export function countPieces(surfaces: readonly Surface[], covering: Covering, house: HouseInput): number {
  const width = covering.stock.reduce((most, sheet) => Math.max(most, sheet.width), 0) || house.rafterSpacing
  const pitch = jointPitch(width, house.rafterSpacing)
  return surfaces.reduce((sum, { polygon }) => {
    const { left, right } = boundsOf(polygon)
    return sum + Math.ceil((right - left) / pitch)
  }, 0)
}
