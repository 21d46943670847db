import { type Region, stripOf, within, without } from '../geometry/clip'
import { boundsOf, heightsAt, type Polygon, type Rectangle } from '../geometry/polygon'

/** What one piece covers, up to joint centre lines, and where its sides meet neighbours. */
export interface Panel {
  readonly polygon: Polygon
  readonly leftJoint: boolean
  readonly rightJoint: boolean
  readonly bottomSplice: boolean
  readonly topSplice: boolean
}

export interface Cutting {
  readonly joints: readonly number[]
  /** Of a strip that stands between these heights. */
  readonly splices: (bottom: number, top: number) => readonly number[]
  readonly narrowest: number
}

/**
 * T1 Panels are upright strips between joint lines, parted at splice lines; with the openings taken out they tile the surface.
 * T10 An opening notches the panels it reaches into; one that stands clear within a panel gets a joint at a jamb.
 */
export function panelsOf(surface: Polygon, openings: readonly Rectangle[], how: Cutting): Panel[] {
  const { left, right, bottom, top } = boundsOf(surface)
  const tolerance = 1e-9 * Math.max(1, right - left, top - bottom)
  const edges = [left, ...how.joints, right]
  const panels: Panel[] = []
  const jambs = new Set<number>()
  const splices = new Set<number>()
  for (let i = 1; i < edges.length; i += 1) {
    const [from, to] = [edges[i - 1] ?? left, edges[i] ?? right]
    const strip = stripOf(surface, from, to, tolerance)
    for (const part of strip) {
      const reach = boundsOf(part.outline)
      const cuts = how.splices(reach.bottom, reach.top)
      for (const cut of cuts) splices.add(cut)
      const levels = [reach.bottom, ...cuts, reach.top]
      for (let k = 1; k < levels.length; k += 1) {
        const [low, high] = [levels[k - 1] ?? bottom, levels[k] ?? top]
        const band = within(part, { u: from, v: low, width: to - from, height: high - low }, tolerance)
        for (const region of band.flatMap((one) => without(one, openings, tolerance)))
          for (const { outline } of splitHoles(region, how.narrowest, tolerance, jambs)) {
            const at = boundsOf(outline)
            panels.push({
              polygon: outline,
              leftJoint: near(at.left, how.joints, tolerance) || near(at.left, [...jambs], tolerance),
              rightJoint: near(at.right, how.joints, tolerance) || near(at.right, [...jambs], tolerance),
              bottomSplice: near(at.bottom, cuts, tolerance),
              topSplice: near(at.top, cuts, tolerance),
            })
          }
      }
    }
  }
  return panels
}

function near(value: number, lines: readonly number[], tolerance: number): boolean {
  return lines.some((line) => Math.abs(line - value) <= tolerance)
}

function splitHoles(region: Region, narrowest: number, tolerance: number, jambs: Set<number>): Region[] {
  const hole = region.holes.map(boundsOf).sort((a, b) => a.left - b.left || a.bottom - b.bottom)[0]
  if (!hole) return [region]
  const { left, right, bottom, top } = boundsOf(region.outline)
  const jamb = hole.left - left < narrowest && right - hole.right > hole.left - left ? hole.right : hole.left
  jambs.add(jamb)
  const side = (u: number, width: number) =>
    within(region, { u, v: bottom, width, height: top - bottom }, tolerance).flatMap((part) =>
      splitHoles(part, narrowest, tolerance, jambs),
    )
  return [...side(left, jamb - left), ...side(jamb, right - jamb)]
}

/** The blank a panel is cut from: a rectangle, its upper end slanted where the surface's is. */
export interface Blank {
  readonly width: number
  /** Of the rectangle around it. */
  readonly length: number
  readonly left: number
  readonly right: number
  /** Right less left where the upper end is one straight slant, otherwise undefined. */
  readonly rise: number | undefined
}

/** T11 Notches are cut after the blank: its left and right lengths are those of the surface's outline above its lower end. */
export function blankOf(panel: Polygon, surface: Polygon): Blank {
  const at = boundsOf(panel)
  const tolerance = 1e-9 * Math.max(1, at.top - at.bottom, at.right - at.left)
  const high = (u: number): number => heightsAt(surface, u)?.[1] ?? at.top
  const clamp = (v: number): number => Math.min(at.top, Math.max(at.bottom, v))
  // From inside by a hair, so that an upright edge of the surface does not stand for what lies beside it.
  const hair = 1e-6 * (at.right - at.left)
  const end = (u: number, inwards: number): number =>
    clamp(2 * high(u + inwards * hair) - high(u + 2 * inwards * hair))
  const [left, right] = [end(at.left, 1), end(at.right, -1)]
  const middle = clamp(high((at.left + at.right) / 2))
  const steep = Math.abs(right - left) > 1e3 * tolerance
  const straight =
    Math.abs(middle - (left + right) / 2) <= 1e2 * tolerance &&
    Math.max(left, right) >= at.top - 1e2 * tolerance
  return {
    width: at.right - at.left,
    length: at.top - at.bottom,
    left: tidy(left - at.bottom, at.top - at.bottom),
    right: tidy(right - at.bottom, at.top - at.bottom),
    rise: steep && straight ? right - left : undefined,
  }
}

/** A length that is all of the blank's but a hair is the blank's. */
function tidy(length: number, whole: number): number {
  if (Math.abs(length - whole) <= 1e-7 * Math.max(1, whole)) return whole
  return length <= 1e-7 * Math.max(1, whole) ? 0 : length
}
