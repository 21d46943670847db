import { fail, type Result, succeed } from '../../failures'
import type { SolveIntegerProgram } from '../cutting/exact'
import { type CutSheet, cutSheets, type SheetStock } from '../cutting/sheets'
import { type PlacedOpening, placeOpenings } from '../geometry/openings'
import { boundsOf, type Polygon } from '../geometry/polygon'
import { type Surface, surfacesOf } from '../geometry/surfaces'
import type { Covering } from './covering'
import { engagementOf } from './cut-size'
import type { HouseInput } from './house-input'
import { jointPitch, type Start } from './joints'
import { profileNeeds } from './needs'
import { type BoughtProfile, buyProfiles, type Plan } from './profiles'
import { type LayoutRules, type LengthUnit, layoutRules } from './rules'
import {
  type LaidPanel,
  layOutSurface,
  type SheetChoice,
  type SurfaceLayout,
  sheetPiece,
} from './surface-layout'

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

/** T17 Marks name the surface and the piece, counted along the eave and then up. */
function pieceMark(surface: string, index: number): string {
  return `${surface}-${String(index + 1).padStart(2, '0')}`
}

/** T18 A sheet is bent along its flutes no tighter than its covering allows. */
function bendFailure({ name, radius }: Surface, covering: Covering) {
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

function countPieces(surfaces: readonly Surface[], covering: Covering, house: HouseInput): number {
  const width = covering.stock.reduce((most, sheet) => Math.max(most, sheet.width), 0) || house.rafterSpacing
  const pitch = jointPitch(width, house.rafterSpacing)
  return surfaces.reduce((sum, { polygon }) => {
    const { left, right } = boundsOf(polygon)
    return sum + Math.ceil((right - left) / pitch)
  }, 0)
}

interface CoveringLayout {
  readonly layouts: ReadonlyMap<Surface, SurfaceLayout>
  readonly choice: SheetChoice
}

/** T19 All sheets of a covering are of one width: the one of its stock that costs least. Alike surfaces are laid out alike. */
function layOutCovering(
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

interface SheetPurchase {
  readonly sheets: readonly BoughtSheet[]
  readonly plan: Plan
}

function buySheets(
  surfaces: readonly Surface[],
  { layouts, choice }: CoveringLayout,
  covering: Covering,
  marks: ReadonlyMap<Surface, string>,
  rules: LayoutRules,
  integerProgram?: SolveIntegerProgram,
): Result<SheetPurchase> {
  const panels = surfaces.flatMap((surface) =>
    (layouts.get(surface)?.panels ?? []).map((panel, i) => ({
      panel,
      mark: pieceMark(marks.get(surface) ?? '', i),
    })),
  )
  const what = `sheets of ${covering.code}`
  if (choice.sheets.length === 0) {
    const sheets = panels.map(({ panel, mark }) => toSize(panel, mark, covering))
    const cost = sheets.reduce((sum, sheet) => sum + sheet.price, 0)
    return succeed({ sheets, plan: { what, cost, bound: cost, proven: true } })
  }
  const plan = cutSheets(
    panels.map(({ panel, mark }) => sheetPiece(panel, mark)),
    choice.sheets,
    rules.sheetKerf,
    integerProgram,
  )
  if (!plan.ok) return plan
  const width = choice.sheets[0]?.width ?? 0
  const { cost, bound, proven } = plan.value
  return succeed({
    sheets: plan.value.sheets.map(
      (sheet): BoughtSheet => ({
        covering: covering.code,
        width,
        length: sheet.length,
        price: sheet.price,
        pieces: sheet.levels.flatMap((level) => level.pieces),
        levels: sheet.levels,
        offcuts: offcutsOf(sheet, width, rules),
      }),
    ),
    plan: { what, cost, bound, proven },
  })
}

/** C14 Where no sheet is stocked, every piece is bought as its own rectangle, by area. */
function toSize({ size }: LaidPanel, mark: string, covering: Covering): BoughtSheet {
  const { width, length } = size
  const price = width * length * covering.areaPrice
  return { covering: covering.code, width, length, price, pieces: [mark], levels: [], offcuts: [] }
}

/** C15 Offcuts from a set length and width on are kept. */
function offcutsOf(sheet: CutSheet, width: number, rules: LayoutRules): Offcut[] {
  const beside = sheet.levels.map((level) => ({
    width: width - level.width - rules.sheetKerf,
    length: level.length,
  }))
  return [...beside, { width, length: sheet.offcut }]
    .filter((offcut) => Math.min(offcut.width, offcut.length) >= rules.smallestOffcut)
    .map((offcut) => ({
      ...offcut,
      kept: offcut.length >= rules.keptLength && offcut.width >= rules.keptWidth,
    }))
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
