import type { Point } from './polygon'

/**
 * G7 An arch is drawn as a polyline of the arc's own area: the corners between its ends stand a little outside the arc,
 * so that areas are exact; nowhere is it further from the arc than `fineness`.
 */
export function archLine(centre: Point, radius: number, from: number, to: number, fineness: number): Point[] {
  const sweep = Math.abs(to - from)
  // The distance between chord and arc is radius · step² / 8; the corners move out by less than that.
  const segments = Math.max(8, Math.ceil(sweep / Math.sqrt((8 * fineness) / radius)))
  const step = sweep / segments
  const outer = equalAreaRadius(radius, step, segments)
  return Array.from({ length: segments + 1 }, (_, i): Point => {
    const angle = from + ((to - from) * i) / segments
    const reach = i === 0 || i === segments ? radius : outer
    return [centre[0] + reach * Math.cos(angle), centre[1] + reach * Math.sin(angle)]
  })
}

/** r of n − 2 triangles ½r² sin δ and two ½Rr sin δ that together have the sector's area ½R²nδ. */
function equalAreaRadius(radius: number, step: number, segments: number): number {
  const [a, b] = [(segments - 2) * Math.sin(step), 2 * radius * Math.sin(step)]
  const c = -radius * radius * segments * step
  return (-2 * c) / (b + Math.sqrt(b * b - 4 * a * c))
}
