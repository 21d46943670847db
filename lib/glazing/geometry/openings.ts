import { fail, type Result, succeed } from '../../failures'
import { boundsOf, heightsAt, isUprightRectangle, type Polygon, type Rectangle } from './polygon'
import type { Surface, SurfaceKind } from './surfaces'

export interface HouseOpening {
  readonly name: string
  readonly kind: string
  readonly surface: SurfaceKind
  readonly width: number
  readonly height: number
  readonly count: number
  /** Lower left corner, seen from outside: from the surface's left end, and above grade or the eave. Free when absent. */
  readonly along?: number
  readonly up?: number
}

export interface PlacedOpening extends Rectangle {
  readonly name: string
  readonly kind: string
}

/**
 * G8 Openings of a count stand in the bays in turn, and within a bay evenly from the first place to the right end.
 * G9 An opening lower than the covered ground stands on its lower edge: the whole of it is taken out of the covering.
 * G10 Where no place is given, doors stand on the lower edge, roof vents under the upper edge and others half way up,
 * spread evenly, each at the nearest place where it fits. Openings that do not fit, or meet one another, are refused.
 */
export function placeOpenings(
  surfaces: readonly Surface[],
  openings: readonly HouseOpening[],
): Result<ReadonlyMap<Surface, readonly PlacedOpening[]>> {
  const placed = new Map<Surface, PlacedOpening[]>(surfaces.map((surface) => [surface, []]))
  const given = openings.map((opening, index) => ({ opening, index }))
  // Those with a given place stand first; the free ones look for room among them.
  const fixed = (one: (typeof given)[number]) => (one.opening.along === undefined ? 1 : 0)
  for (const { opening, index } of given.sort((a, b) => fixed(a) - fixed(b) || a.index - b.index)) {
    const called = opening.name === '' ? `opening ${index + 1}` : opening.name
    const bays = surfaces.filter((surface) => surface.kind === opening.surface)
    if (bays.length === 0)
      return fail('invalid', `${called}: expected a surface that this house has, not ${opening.surface}.`)
    for (const [bay, surface] of bays.entries()) {
      const count = Math.floor((opening.count + bays.length - 1 - bay) / bays.length)
      const others = placed.get(surface) ?? []
      for (let k = 0; k < count; k += 1) {
        const place = placeOne(surface, opening, k, count, others)
        if (!place)
          return fail(
            'invalid',
            `${called}: expected room for it on ${surface.name}, clear of other openings.`,
          )
        others.push({ name: called, kind: opening.kind, ...place })
      }
    }
  }
  return succeed(placed)
}

function placeOne(
  surface: Surface,
  opening: HouseOpening,
  k: number,
  count: number,
  others: readonly Rectangle[],
): Rectangle | undefined {
  const { left, right, bottom, top } = boundsOf(surface.polygon)
  const { width, height, along, up } = opening
  const slack = 1e-9 * Math.max(1, right - left, top - bottom)
  const even = (from: number) => from + ((right - from) * (k + 0.5)) / count - width / 2
  const u = along === undefined ? even(left) : along + ((right - along) * k) / count
  const floor = heightsAt(surface.polygon, Math.min(right, Math.max(left, u + width / 2)))?.[0] ?? bottom
  const v =
    up === undefined
      ? freeHeight(surface, opening, floor)
      : Math.max(up, surface.part === 'roof' ? bottom : floor)
  const free = (place: Rectangle) =>
    fits(surface.polygon, place, slack) && others.every((other) => apart(place, other, slack))
  const wished = { u, v, width, height }
  if (free(wished)) return wished
  if (along !== undefined && up !== undefined && k === 0) return undefined
  return nearestFree(surface, wished, free, along !== undefined && k === 0, up !== undefined)
}

function freeHeight(surface: Surface, { kind, height }: HouseOpening, floor: number): number {
  const { top } = boundsOf(surface.polygon)
  if (surface.part === 'roof') {
    const upper = surface.kind === 'Arch roof' ? (top + floor) / 2 + height / 2 : top
    return upper - height
  }
  return kind === 'door'
    ? floor
    : Math.max(floor, floor + (surface.part === 'side' ? top - floor - height : height) / 2)
}

/** Tries a net of places, nearest first; a given coordinate stays. */
function nearestFree(
  surface: Surface,
  wished: Rectangle,
  free: (place: Rectangle) => boolean,
  keepU: boolean,
  keepV: boolean,
): Rectangle | undefined {
  const { left, right, bottom, top } = boundsOf(surface.polygon)
  const steps = 64
  const spread = (low: number, high: number, size: number, own: number, keep: boolean) =>
    keep
      ? [own]
      : [
          own,
          low,
          high - size,
          ...Array.from({ length: steps + 1 }, (_, i) => low + ((high - size - low) * i) / steps),
        ]
  const places = spread(left, right, wished.width, wished.u, keepU).flatMap((u) =>
    spread(bottom, top, wished.height, wished.v, keepV).map((v) => ({ ...wished, u, v })),
  )
  const far = (place: Rectangle) => Math.abs(place.u - wished.u) + Math.abs(place.v - wished.v)
  return places
    .map((place, i) => ({ place, i }))
    .sort((a, b) => far(a.place) - far(b.place) || a.i - b.i)
    .find(({ place }) => free(place))?.place
}

function fits(polygon: Polygon, place: Rectangle, slack: number): boolean {
  const { left, right, bottom, top } = boundsOf(polygon)
  if (place.u < left - slack || place.u + place.width > right + slack) return false
  if (place.v < bottom - slack || place.v + place.height > top + slack) return false
  if (isUprightRectangle(polygon)) return true
  // Both edges are straight between corners, so the ends and the corners between them decide.
  const ends = [place.u, place.u + place.width]
  const between = polygon.flatMap(([u]) => (u > place.u && u < place.u + place.width ? [u] : []))
  return [...ends, ...between].every((u) => {
    const heights = heightsAt(polygon, Math.min(right, Math.max(left, u)))
    return heights && place.v >= heights[0] - slack && place.v + place.height <= heights[1] + slack
  })
}

function apart(a: Rectangle, b: Rectangle, slack: number): boolean {
  return (
    a.u + a.width <= b.u + slack ||
    b.u + b.width <= a.u + slack ||
    a.v + a.height <= b.v + slack ||
    b.v + b.height <= a.v + slack
  )
}
