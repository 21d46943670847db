import type { SheetPiece } from './problem'

/** A piece on its sheet: its lower left corner as cut, and whether it is turned half round. */
export interface PlacedPiece {
  readonly mark: string
  readonly u: number
  readonly v: number
  readonly turned: boolean
}

/** Pieces side by side across a sheet, ripped from one crosscut length; or one or two that share a slanted cut. */
export interface Level {
  readonly v: number
  readonly length: number
  readonly width: number
  readonly pieces: readonly PlacedPiece[]
}

/** What a slanted cut of `kerf` takes along the flutes. */
export function slantedKerf(width: number, rise: number, kerf: number): number {
  return (kerf * Math.hypot(width, rise)) / width
}

/**
 * C11 Levels from one end of the sheet to the other. Slanted pieces of one slope stand two and two: the second turned
 * half round upon the first, so that both lie the weather side up.
 */
export function arrange(
  groups: readonly (readonly SheetPiece[])[],
  kerf: number,
  nests: (piece: SheetPiece) => string | undefined,
): Level[] {
  const levels: Level[] = []
  let v = 0
  const waiting = new Map<string, SheetPiece>()
  const put = (length: number, width: number, pieces: PlacedPiece[]): void => {
    levels.push({ v, length, width, pieces })
    v += length + kerf
  }
  const alone = (piece: SheetPiece): void =>
    put(piece.length, piece.width, [{ mark: piece.mark, u: 0, v, turned: false }])
  for (const group of groups) {
    const [only, second] = group
    if (!only) continue
    const slope = second ? undefined : nests(only)
    if (slope === undefined) {
      let u = 0
      const placed = group.map((piece): PlacedPiece => {
        const at = { mark: piece.mark, u, v, turned: false }
        u += piece.width + kerf
        return at
      })
      const longest = group.reduce((most, piece) => Math.max(most, piece.length), 0)
      put(longest, u - kerf, placed)
      continue
    }
    const partner = waiting.get(slope)
    if (!partner) {
      waiting.set(slope, only)
      continue
    }
    waiting.delete(slope)
    const rise = partner.rise ?? 0
    const lift = partner.length - Math.abs(rise) + slantedKerf(partner.width, rise, kerf)
    // The slants lie on one line when the pieces meet at the side where they are low.
    const wider = Math.max(partner.width, only.width)
    const beside = (width: number) => (rise < 0 ? wider - width : 0)
    put(Math.max(partner.length, lift + only.length), wider, [
      { mark: partner.mark, u: beside(partner.width), v, turned: false },
      { mark: only.mark, u: beside(only.width), v: v + lift, turned: true },
    ])
  }
  for (const piece of waiting.values()) alone(piece)
  return levels
}
