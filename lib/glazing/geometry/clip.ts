import clipping from 'polygon-clipping'
import {
  areaOf,
  boundsOf,
  isUprightRectangle,
  type Point,
  type Polygon,
  type Rectangle,
  rectangle,
} from './polygon'

/** An outline with the holes in it, all rings as corners without a repeated first. */
export interface Region {
  readonly outline: Polygon
  readonly holes: readonly Polygon[]
}

type Ring = [number, number][]
const ring = (polygon: Polygon): Ring => polygon.map(([u, v]): [number, number] => [u, v])

/** What of `region` lies in the box; slivers narrower than `tolerance` are left out. */
export function within(region: Region, box: Rectangle, tolerance: number): Region[] {
  const { left, right, bottom, top } = boundsOf(region.outline)
  const [u, v] = [Math.max(left, box.u), Math.max(bottom, box.v)]
  const [width, height] = [Math.min(right, box.u + box.width) - u, Math.min(top, box.v + box.height) - v]
  if (width <= tolerance || height <= tolerance) return []
  if (box.u <= left && box.v <= bottom && width === right - left && height === top - bottom) return [region]
  if (region.holes.length === 0 && isUprightRectangle(region.outline))
    return [{ outline: rectangle({ u, v, width, height }), holes: [] }]
  return regions(clipping.intersection(rings(region), [ring(rectangle(box))]), tolerance)
}

/**
 * The upright strip of an outline that has one height range at every u, as all surfaces have: cut along two lines,
 * which leaves one region.
 */
export function stripOf(outline: Polygon, from: number, to: number, tolerance: number): Region[] {
  const { left, right, bottom, top } = boundsOf(outline)
  const [u, width] = [Math.max(left, from), Math.min(right, to) - Math.max(left, from)]
  if (width <= tolerance) return []
  if (isUprightRectangle(outline))
    return [{ outline: rectangle({ u, v: bottom, width, height: top - bottom }), holes: [] }]
  const cut = keepBeside(keepBeside(outline, from, 1), to, -1)
  return cut.length < 3 ? [] : [{ outline: cut, holes: [] }]
}

function keepBeside(outline: Polygon, line: number, side: 1 | -1): Polygon {
  const kept: Point[] = []
  let before = outline.at(-1)
  for (const point of outline) {
    const [a, b] = [side * ((before ?? point)[0] - line), side * (point[0] - line)]
    if (before && ((a < 0 && b > 0) || (a > 0 && b < 0)))
      kept.push([line, before[1] + (a / (a - b)) * (point[1] - before[1])])
    if (b >= 0) kept.push(point)
    before = point
  }
  return kept
}

/** What is left of `region` without the rectangles. */
export function without(region: Region, cuts: readonly Rectangle[], tolerance: number): Region[] {
  const { left, right, bottom, top } = boundsOf(region.outline)
  const near = cuts.filter(
    (cut) => cut.u < right && cut.u + cut.width > left && cut.v < top && cut.v + cut.height > bottom,
  )
  if (near.length === 0) return [region]
  return regions(clipping.difference(rings(region), ...near.map((cut) => [ring(rectangle(cut))])), tolerance)
}

export function areaOfRegion({ outline, holes }: Region): number {
  return holes.reduce((sum, hole) => sum - Math.abs(areaOf(hole)), Math.abs(areaOf(outline)))
}

function rings({ outline, holes }: Region): Ring[] {
  return [ring(outline), ...holes.map(ring)]
}

/** Counter-clockwise, from the lowest of the leftmost corners, by place: the same input gives the same order. */
function regions(found: readonly (readonly Ring[])[], tolerance: number): Region[] {
  const tidy = (corners: Ring | undefined): Polygon => {
    const open = (corners ?? []).slice(0, -1)
    const turned = areaOf(open) < 0 ? [...open].reverse() : open
    let first = 0
    turned.forEach(([u, v], i) => {
      const [u0, v0] = turned[first] ?? [u, v]
      if (u < u0 || (u === u0 && v < v0)) first = i
    })
    return [...turned.slice(first), ...turned.slice(0, first)].map(([u, v]): Point => [u, v])
  }
  return found
    .map(([outline, ...holes]): Region => ({ outline: tidy(outline), holes: holes.map(tidy) }))
    .filter(({ outline }) => {
      const { left, right, bottom, top } = boundsOf(outline)
      return right - left > tolerance && top - bottom > tolerance && areaOf(outline) > tolerance * tolerance
    })
    .sort((a, b) => compare(boundsOf(a.outline), boundsOf(b.outline)))
}

function compare(a: ReturnType<typeof boundsOf>, b: ReturnType<typeof boundsOf>): number {
  return a.left - b.left || a.bottom - b.bottom || a.right - b.right || a.top - b.top
}
