import { fail, type Result, succeed } from '../../failures'
import type { SolveIntegerProgram } from '../cutting/exact'
import { placeOpenings } from '../geometry/openings'
import { type Surface, surfacesOf } from '../geometry/surfaces'
import { buySheets } from './buy-sheets'
import type { Covering } from './covering'
import { engagementOf } from './cut-size'
import type { HouseInput } from './house-input'
import { bendFailure, countPieces, layOutCovering } from './lay-out-covering'
import { type BoughtSheet, type LaidPiece, type LaidSurface, type Layout, pieceMark } from './layout'
import { profileNeeds } from './needs'
import { buyProfiles, type Plan } from './profiles'
import { type LayoutRules, layoutRules } from './rules'
import type { SurfaceLayout } from './surface-layout'

const mostPieces = 60_000

/**
 * Surfaces → panels → sheets and profiles. The same input gives the same pieces, in the same order, with the same marks.
 * Errors: `invalid` with the surface, opening or piece at fault and what was expected; `limit` above 60,000 pieces.
 */
export function layOutHouse(house: HouseInput, integerProgram?: SolveIntegerProgram): Result<Layout> {
  const rules: LayoutRules = { ...layoutRules(house.lengthUnit), ...house.rules }
  const surfaces = surfacesOf(house.frame, rules.fineness)
  const placed = placeOpenings(surfaces, house.openings)
  if (!placed.ok) return placed
  const laid = new Map<Surface, SurfaceLayout>()
  const marks = new Map(surfaces.map((surface, i) => [surface, `S${i + 1}`]))
  const stock: BoughtSheet[] = []
  const stockOf = new Map<string, number>()
  const plans: Plan[] = []
  const notes: string[] = []
  const codes = [...new Set(surfaces.map((surface) => house.coveringOf[surface.kind]))]
  for (const code of codes) {
    const covering = house.coverings.find((one) => one.code === code)
    if (!covering) return fail('invalid', `Expected a covering of the Coverings table, not "${code}".`)
    const own = surfaces.filter((surface) => house.coveringOf[surface.kind] === code)
    const bent = own.map((surface) => bendFailure(surface, covering)).find((one) => one !== undefined)
    if (bent) return bent
    const counted = countPieces(own, covering, house)
    if (counted > mostPieces)
      return fail(
        'limit',
        `Expected a house of at most ${mostPieces} pieces; ${code} alone needs about ${counted}.`,
      )
    const made = layOutCovering(own, placed.value, covering, house, rules)
    if (!made.ok) return made
    for (const [surface, layout] of made.value.layouts) laid.set(surface, layout)
    const bought = buySheets(own, made.value, covering, marks, rules, integerProgram)
    if (!bought.ok) return bought
    for (const sheet of bought.value.sheets) {
      for (const mark of sheet.pieces) stockOf.set(mark, stock.length)
      stock.push(sheet)
    }
    plans.push(bought.value.plan)
    notes.push(...coveringNotes(own, made.value.layouts, covering, house, rules))
  }
  const needs = surfaces.flatMap((surface) => {
    const layout = laid.get(surface)
    const covering = house.coverings.find((one) => one.code === house.coveringOf[surface.kind])
    return layout && covering ? profileNeeds(surface, marks.get(surface) ?? '', layout, covering, house) : []
  })
  const profiles = buyProfiles(needs, rules, integerProgram)
  if (!profiles.ok) return profiles
  const double = (kind: Surface) => {
    const covering = house.coverings.find((one) => one.code === house.coveringOf[kind.kind])
    return covering?.joining === 'channel' && covering.layers > 1
  }
  return succeed({
    lengthUnit: house.lengthUnit,
    surfaces: surfaces.map((surface): LaidSurface => {
      const layout = laid.get(surface)
      return {
        name: surface.name,
        mark: marks.get(surface) ?? '',
        covering: house.coveringOf[surface.kind],
        polygon: surface.polygon,
        openings: placed.value.get(surface) ?? [],
        joints: layout?.joints ?? [],
        start: layout?.start ?? 'left',
        radius: surface.radius,
      }
    }),
    pieces: surfaces.flatMap((surface) =>
      (laid.get(surface)?.panels ?? []).map((panel, i): LaidPiece => {
        const mark = pieceMark(marks.get(surface) ?? '', i)
        const { width, length, left, right } = panel.size
        return {
          mark,
          surface: surface.name,
          covering: house.coveringOf[surface.kind],
          polygon: panel.polygon,
          width,
          length,
          left,
          right,
          angle: panel.angle,
          stock: stockOf.get(mark) ?? -1,
        }
      }),
    ),
    stock,
    profiles: profiles.value.bought,
    plans: [...plans, ...profiles.value.plans],
    blowers: surfaces.some(double) ? 1 : 0,
    notes: [...notes, ...profiles.value.notes],
  })
}

function coveringNotes(
  surfaces: readonly Surface[],
  layouts: ReadonlyMap<Surface, SurfaceLayout>,
  covering: Covering,
  house: HouseInput,
  rules: LayoutRules,
): string[] {
  const notes: string[] = []
  if (covering.family === 'glass' && surfaces.some((surface) => surface.part === 'roof'))
    notes.push(`${covering.code}: overhead panes have to be safety glass.`)
  if (covering.joining !== 'profile') return notes
  let longest = 0
  for (const surface of surfaces)
    for (const { size } of layouts.get(surface)?.panels ?? []) longest = Math.max(longest, size.length)
  if (engagementOf(longest, covering.expansion, house.temperatures, rules) < rules.engagement)
    notes.push(
      `${covering.code}: its longest piece moves so far that end profiles need to be deeper than usual.`,
    )
  return notes
}
