import { boundsOf } from '../geometry/polygon'
import type { Surface } from '../geometry/surfaces'
import type { Covering, ProfileStock } from './covering'
import type { HouseInput } from './house-input'
import type { ProfileNeed } from './profiles'
import type { SurfaceLayout } from './surface-layout'
import type { Run } from './trims'

/** A trim's kind as it is named in marks. */
const letters: Record<string, string> = {
  joint: 'J',
  end: 'E',
  edge: 'G',
  ridge: 'R',
  corner: 'C',
  base: 'B',
}

/**
 * T15 Open flute ends are closed by end profiles, above and below and round openings; joints by joint profiles; film is
 * held in its channel at every edge. Free edges get edge profiles: of roofs, at jambs, between bays.
 * T16 Walls and ends stand on base profiles; corner profiles close the walls' upright edges; a ridge profile covers each
 * top edge of a roof that is not an arch over both eaves.
 */
export function profileNeeds(
  surface: Surface,
  surfaceMark: string,
  layout: SurfaceLayout,
  covering: Covering,
  house: HouseInput,
): ProfileNeed[] {
  const trim = (kind: string): ProfileStock | undefined => house.trims.find((one) => one.kind === kind)
  const counts = new Map<string, number>()
  const needs: ProfileNeed[] = []
  const add = (profile: ProfileStock | undefined, length: number, spliceable: boolean): void => {
    if (!profile) return
    const letter = letters[profile.kind] ?? 'P'
    const n = (counts.get(letter) ?? 0) + 1
    counts.set(letter, n)
    needs.push({
      profile,
      mark: `${surfaceMark}-${letter}${String(n).padStart(2, '0')}`,
      length,
      spliceable,
    })
  }
  const film = covering.joining === 'channel'
  const { left, right, bottom, top } = boundsOf(surface.polygon)
  const slack = 1e-6 * Math.max(right - left, top - bottom)
  const outer = (run: Run) => run.at[0] - left < slack || right - run.at[0] < slack
  for (const run of layout.runs) {
    if (film) {
      add(covering.endProfile, run.length, true)
      continue
    }
    if (run.kind === 'joint') add(covering.jointProfile, run.length, false)
    else if (run.kind === 'splice') {
      if (covering.joining === 'profile') add(covering.jointProfile, run.length, true)
    } else if (run.kind === 'upright') {
      if (!outer(run) || surface.part === 'roof') add(trim('edge'), run.length, true)
      else if (surface.part === 'side') add(trim('corner'), run.length, true)
      else if (freeEdge(surface, run.at[0] - left < slack, house)) add(trim('edge'), run.length, true)
    } else {
      add(covering.endProfile, run.length, true)
      const foot = run.kind === 'bottom' && run.at[1] - bottom < slack
      if (foot && surface.part !== 'roof') add(trim('base'), run.length, true)
    }
  }
  const ridge = surface.kind === 'Front roof' && !film
  if (ridge) add(trim('ridge'), house.frame.length, true)
  return needs
}

/** An end's upright edge without a wall's corner at it: between bays, and at the wall that a lean-to leans on. */
function freeEdge(surface: Surface, atLeft: boolean, house: HouseInput): boolean {
  const { kind, bays } = house.frame
  const towardsBack = surface.kind === 'Left end' ? atLeft : !atLeft
  if (kind === 'lean-to') return towardsBack
  return towardsBack ? surface.bay < bays - 1 : surface.bay > 0
}
