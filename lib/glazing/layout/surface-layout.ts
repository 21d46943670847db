import { type Result, succeed } from '../../failures'
import type { SheetPiece } from '../cutting/problem'
import { type SheetStock, sheetEstimate } from '../cutting/sheets'
import type { PlacedOpening } from '../geometry/openings'
import { boundsOf, type Polygon } from '../geometry/polygon'
import type { Surface } from '../geometry/surfaces'
import { type Covering, type PieceLimits, pieceLimits } from './covering'
import { type CutSize, cutSize } from './cut-size'
import type { HouseInput } from './house-input'
import {
  givenLines,
  jointLines,
  jointPitch,
  type Splicing,
  type Start,
  spliceLines,
  splicings,
  starts,
} from './joints'
import { blankOf, type Panel, panelsOf } from './pieces'
import { type LayoutRules, largestPane } from './rules'
import { type Run, runsOf } from './trims'

export interface LaidPanel extends Panel {
  readonly size: CutSize
  /** Of the slanted or curved upper end, degrees from square, at the blank's corners. */
  readonly angle: number
}

export interface SurfaceLayout {
  readonly start: Start | 'given'
  readonly splicing: Splicing
  readonly joints: readonly number[]
  readonly panels: readonly LaidPanel[]
  readonly runs: readonly Run[]
  /** For comparing layouts of the surface: sheets by a plain plan, and joint profiles by length. */
  readonly cost: number
}

/** The sheets of one width that pieces are cut from; without any, pieces are bought cut to size. */
export interface SheetChoice {
  readonly sheets: readonly SheetStock[]
}

/**
 * T14 The cheapest of the starts and splicings is taken, the first of equals; a start or joints given for the surface stand.
 */
export function layOutSurface(
  surface: Surface,
  openings: readonly PlacedOpening[],
  covering: Covering,
  choice: SheetChoice,
  house: HouseInput,
  rules: LayoutRules,
): Result<SurfaceLayout> {
  const { left, right } = boundsOf(surface.polygon)
  const limits = limitsOf(covering, choice, house, rules)
  const given = house.joints?.[surface.name]
  const asked = house.starts?.[surface.name]
  const pitch = jointPitch(limits.strip, house.rafterSpacing)
  const lines: { start: Start | 'given'; joints: number[] }[] = []
  if (given) {
    const kept = givenLines(surface.name, left, right, given, limits.strip)
    if (!kept.ok) return kept
    lines.push({ start: 'given', joints: kept.value })
  } else
    for (const start of asked ? [asked] : starts) {
      const joints = jointLines(left, right, pitch, start, rules.narrowestStrip)
      if (!lines.some((other) => same(other.joints, joints))) lines.push({ start, joints })
    }
  let best: Omit<SurfaceLayout, 'runs'> | undefined
  for (const { start, joints } of lines)
    for (const splicing of house.splicing ? [house.splicing] : splicings) {
      let spliced = false
      const purlins =
        covering.family === 'glass' ? undefined : { datum: surface.datum, spacing: house.purlinSpacing }
      const splices = (bottom: number, top: number): number[] => {
        const cuts = spliceLines(bottom, top, limits, purlins, splicing, rules.narrowestStrip)
        spliced ||= cuts.length > 0
        return cuts
      }
      const panels = panelsOf(surface.polygon, openings, { joints, splices, narrowest: rules.narrowestStrip })
      const laid = panels.map((panel) => layOutPanel(panel, surface.polygon, covering, house, rules))
      const sheets = costOfPanels(laid, covering, choice, rules)
      if (!sheets.ok) return sheets
      const jointPrice = covering.jointProfile?.price ?? 0
      const beside = laid.reduce((sum, one) => sum + (one.rightJoint ? one.size.right : 0), 0)
      const cost = sheets.value + jointPrice * beside
      if (!best || cost < best.cost - 1e-9) best = { start, splicing, joints, panels: laid, cost }
      if (!spliced) break
    }
  if (!best) throw new Error('a surface without a layout')
  return succeed({ ...best, runs: runsOf(best.panels) })
}

function limitsOf(
  covering: Covering,
  choice: SheetChoice,
  house: HouseInput,
  rules: LayoutRules,
): PieceLimits {
  const [first] = choice.sheets
  const width = first?.width ?? house.rafterSpacing
  const length = choice.sheets.reduce((most, sheet) => Math.max(most, sheet.length), 0)
  if (!first) return { strip: width, whole: Number.POSITIVE_INFINITY, spliced: Number.POSITIVE_INFINITY }
  return pieceLimits(
    covering,
    { width, length },
    largestPane(covering.thickness / covering.layers, house.lengthUnit),
    rules,
  )
}

function layOutPanel(
  panel: Panel,
  surface: Polygon,
  covering: Covering,
  house: HouseInput,
  rules: LayoutRules,
): LaidPanel {
  const blank = blankOf(panel.polygon, surface)
  const angle = (Math.atan2(blank.right - blank.left, blank.width) * 180) / Math.PI
  return { ...panel, size: cutSize(blank, panel, covering, house.temperatures, rules), angle }
}

function costOfPanels(
  panels: readonly LaidPanel[],
  covering: Covering,
  { sheets }: SheetChoice,
  rules: LayoutRules,
): Result<number> {
  if (sheets.length === 0)
    return succeed(panels.reduce((sum, { size }) => sum + size.width * size.length * covering.areaPrice, 0))
  return sheetEstimate(
    panels.map((panel, i) => sheetPiece(panel, String(i))),
    sheets,
    rules.sheetKerf,
  )
}

export function sheetPiece({ size }: LaidPanel, mark: string): SheetPiece {
  const { width, length, rise } = size
  return rise === undefined ? { mark, width, length } : { mark, width, length, rise }
}

function same(a: readonly number[], b: readonly number[]): boolean {
  return a.length === b.length && a.every((value, i) => Math.abs(value - (b[i] ?? 0)) < 1e-9)
}
