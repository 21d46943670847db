/** A point of a surface in its own plane: u along the eave, v along the flutes. */
export type Point = readonly [u: number, v: number]
/** Corners counter-clockwise, the first not repeated. */
export type Polygon = readonly Point[]

export interface Rectangle {
  readonly u: number
  readonly v: number
  readonly width: number
  readonly height: number
}

export interface Bounds {
  readonly left: number
  readonly right: number
  readonly bottom: number
  readonly top: number
}

/** Signed area, positive counter-clockwise; taken about the first corner, so that a far place costs no digits. */
export function areaOf(polygon: Polygon): number {
  const [u0, v0] = polygon[0] ?? [0, 0]
  let doubled = 0
  for (let i = 0; i < polygon.length; i += 1) {
    const [u1, v1] = polygon[i] ?? [0, 0]
    const [u2, v2] = polygon[(i + 1) % polygon.length] ?? [0, 0]
    doubled += (u1 - u0) * (v2 - v0) - (u2 - u0) * (v1 - v0)
  }
  return doubled / 2
}

export function boundsOf(polygon: Polygon): Bounds {
  let [left, bottom] = [Number.POSITIVE_INFINITY, Number.POSITIVE_INFINITY]
  let [right, top] = [Number.NEGATIVE_INFINITY, Number.NEGATIVE_INFINITY]
  for (const [u, v] of polygon) {
    left = Math.min(left, u)
    right = Math.max(right, u)
    bottom = Math.min(bottom, v)
    top = Math.max(top, v)
  }
  return { left, right, bottom, top }
}

export function edgesOf(polygon: Polygon): [from: Point, to: Point][] {
  return polygon.map((from, i) => [from, polygon[(i + 1) % polygon.length] ?? from])
}

/** The heights between which the polygon stands at `u`, edges included; undefined beside it. */
export function heightsAt(polygon: Polygon, u: number, tolerance = 0): readonly [number, number] | undefined {
  let low = Number.POSITIVE_INFINITY
  let high = Number.NEGATIVE_INFINITY
  let from = polygon.at(-1)
  for (const to of polygon) {
    const [u1, v1] = from ?? to
    const [u2, v2] = to
    from = to
    if (u < Math.min(u1, u2) - tolerance || u > Math.max(u1, u2) + tolerance) continue
    const span = u2 - u1
    if (Math.abs(span) <= tolerance) {
      low = Math.min(low, v1, v2)
      high = Math.max(high, v1, v2)
      continue
    }
    const part = Math.min(1, Math.max(0, (u - u1) / span))
    const v = part === 1 ? v2 : v1 + part * (v2 - v1)
    low = Math.min(low, v)
    high = Math.max(high, v)
  }
  return high >= low ? [low, high] : undefined
}

export function rectangle({ u, v, width, height }: Rectangle): Polygon {
  return [
    [u, v],
    [u + width, v],
    [u + width, v + height],
    [u, v + height],
  ]
}

export function isUprightRectangle(polygon: Polygon): boolean {
  if (polygon.length !== 4) return false
  const { left, right, bottom, top } = boundsOf(polygon)
  return polygon.every(([u, v]) => (u === left || u === right) && (v === bottom || v === top))
}

/** The same outline seen from the other side, about the upright line `u = axis / 2`. */
export function mirrored(polygon: Polygon, axis: number): Polygon {
  return polygon.map(([u, v]): Point => [axis - u, v]).reverse()
}
