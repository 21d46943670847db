import type { Covering, SheetTemperatures } from './covering'
import type { Blank, Panel } from './pieces'
import type { LayoutRules } from './rules'

export interface CutSize {
  readonly width: number
  readonly length: number
  readonly left: number
  readonly right: number
  readonly rise?: number
}

/**
 * T12 Every sheet is free to move: cut size = opening − coefficient · opening · (hottest − fitting), half the gap at each
 * end; half a joint's web goes off at each joint. A blank too small for its allowances keeps half its size.
 */
export function cutSize(
  blank: Blank,
  panel: Pick<Panel, 'leftJoint' | 'rightJoint' | 'bottomSplice' | 'topSplice'>,
  covering: Covering,
  temperatures: SheetTemperatures,
  rules: LayoutRules,
): CutSize {
  const grow = covering.expansion * Math.max(0, temperatures.highest - temperatures.fitting)
  const beside = Number(panel.leftJoint) + Number(panel.rightJoint)
  const above = Number(panel.bottomSplice) + Number(panel.topSplice)
  const add: Record<Covering['joining'], readonly [across: number, along: number]> = {
    profile: [(-beside * rules.jointWeb) / 2, (-above * rules.jointWeb) / 2],
    bar: [-beside * rules.paneGap, -above * rules.paneGap],
    lap: [(beside * rules.sideLap) / 2, (above * rules.endLap) / 2],
    butt: [0, 0],
    channel: [2 * rules.anchorage, 2 * rules.anchorage],
  }
  const [across, along] = add[covering.joining]
  const cut = (opening: number, more: number): number =>
    round(Math.max(opening * (1 - grow) + more, opening / 2))
  const length = (of: number, more = 0): number =>
    of === 0 && covering.joining !== 'channel' ? 0 : cut(of, along + more)
  const size = { width: cut(blank.width, across), length: length(blank.length) }
  // Film is trimmed in place, and a lap lies beside the slant: neither shares its slanted cut.
  if (blank.rise === undefined || covering.joining === 'channel' || covering.joining === 'lap')
    return { ...size, left: length(blank.left), right: length(blank.right) }
  // The slant keeps its slope: what goes off (or on) at a joint takes its share of the rise with it.
  const lift = ((blank.rise / blank.width) * across) / Math.max(1, beside)
  const left = length(blank.left, panel.leftJoint ? -lift : 0)
  const right = length(blank.right, panel.rightJoint ? lift : 0)
  return { width: size.width, length: Math.max(left, right), left, right, rise: round(right - left) }
}

/** What the profile has to hold at the lowest temperature, and what it then holds, at the ends of the longest piece. */
export function engagementOf(
  longest: number,
  expansion: number,
  temperatures: SheetTemperatures,
  rules: LayoutRules,
): number {
  const gap = (expansion * longest * Math.max(0, temperatures.highest - temperatures.fitting)) / 2
  const shrink = (expansion * longest * Math.max(0, temperatures.fitting - temperatures.lowest)) / 2
  return rules.profileDepth - gap - shrink
}

function round(size: number): number {
  return Math.round(size * 1e9) / 1e9
}
