import { archLine } from './arch'
import { type Frame, type FrameShape, shapeOf } from './frame'
import { boundsOf, mirrored, type Point, type Polygon, rectangle } from './polygon'

export const surfaceKinds = [
  'Front roof',
  'Back roof',
  'Arch roof',
  'Front wall',
  'Back wall',
  'Left end',
  'Right end',
] as const
export type SurfaceKind = (typeof surfaceKinds)[number]

export interface Surface {
  /** The kind, with the bay's number where there is more than one bay. */
  readonly name: string
  readonly kind: SurfaceKind
  readonly part: 'roof' | 'side' | 'end'
  /** From 0; walls stand once for all bays. */
  readonly bay: number
  readonly polygon: Polygon
  /** Where purlins are counted from: the eave of a roof, the lower edge of the covering of a wall. */
  readonly datum: number
  /** Of the bend along v; 0 for a flat surface. */
  readonly radius: number
}

/**
 * G6 A surface is seen from outside, u to the right and v upwards; its polygon is the ground that is covered.
 * Walls and ends have v = 0 at grade and are covered above the knee wall; roofs have v = 0 at the eave,
 * and the overhang lies below it (both eaves of a hoop). Roofs and ends stand once a bay.
 * `fineness` is how far an arch's polyline may be from the arc.
 */
export function surfacesOf(frame: Frame, fineness: number): Surface[] {
  const shape = shapeOf(frame)
  const { kind, length, overhang, eave, ridge, kneeWall } = frame
  const roof = (top: number, below: number, above: number) =>
    rectangle({ u: 0, v: -below, width: length, height: top + below + above })
  const surfaces: Surface[] = []
  const add = (of: SurfaceKind, part: Surface['part'], polygon: Polygon, datum: number): void => {
    const { bottom, top } = boundsOf(polygon)
    if (!(top - bottom > 1e-9 * length)) return
    const count = part === 'side' ? 1 : frame.bays
    for (let bay = 0; bay < count; bay += 1) {
      const name = count === 1 ? of : `${of} ${bay + 1}`
      surfaces.push({ name, kind: of, part, bay, polygon, datum, radius: part === 'roof' ? shape.radius : 0 })
    }
  }
  if (kind === 'hoop') add('Arch roof', 'roof', roof(2 * shape.halfRoof, overhang, overhang), 0)
  else add('Front roof', 'roof', roof(shape.halfRoof, overhang, 0), 0)
  if (kind === 'gable' || kind === 'gothic') add('Back roof', 'roof', roof(shape.halfRoof, overhang, 0), 0)
  const wall = (height: number, knee: number): Polygon =>
    rectangle({ u: 0, v: knee, width: length, height: height - knee })
  const leaning = eave === 0 ? 0 : (shape.frontWall * kneeWall) / eave
  const front = wall(shape.frontWall, leaning)
  add('Front wall', 'side', front, leaning)
  const back = wall(kind === 'single-slope' ? ridge : eave, kneeWall)
  if (kind !== 'lean-to') add('Back wall', 'side', back, kneeWall)
  const end = endOf(frame, shape, fineness)
  add('Left end', 'end', mirrored(end, frame.width + shape.setback), kneeWall)
  add('Right end', 'end', end, kneeWall)
  return surfaces
}

/** The right end, the front to its left: its foot at u = 0, above the knee wall. */
function endOf(frame: Frame, shape: FrameShape, fineness: number): Polygon {
  const { kind, width, eave, ridge, kneeWall } = frame
  const { setback, radius, halfAngle } = shape
  const far = width + setback
  const foot = eave === 0 ? 0 : (setback * kneeWall) / eave
  const base: Point[] = [
    [foot, kneeWall],
    [far, kneeWall],
  ]
  const front: Point[] = kneeWall < eave ? [[setback, eave]] : []
  if (shape.oneSlope) return [...base, [far, ridge], ...front]
  const back: Point[] = kneeWall < eave ? [[far, eave]] : []
  if (kind === 'gable') return [...base, ...back, [far / 2, ridge], ...front]
  const quarter = Math.PI / 2
  const arch =
    kind === 'hoop'
      ? archLine([far / 2, ridge - radius], radius, quarter - halfAngle, quarter + halfAngle, fineness)
      : [
          ...archLine([far - radius, eave], radius, 0, halfAngle, fineness).slice(0, -1),
          [far / 2, ridge] as Point,
          ...archLine([radius, eave], radius, Math.PI - halfAngle, Math.PI, fineness).slice(1),
        ]
  // The arch's own ends are the eave's corners, exactly.
  return [...base, ...back, ...arch.slice(1, -1), ...front]
}
