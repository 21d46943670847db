export type FrameKind = 'gable' | 'lean-to' | 'single-slope' | 'hoop' | 'gothic'

/** A frame as it is measured, every length in one unit; heights above grade. */
export interface Frame {
  readonly kind: FrameKind
  readonly width: number
  readonly length: number
  readonly eave: number
  readonly ridge: number
  readonly kneeWall: number
  /** Degrees; 90 is upright. */
  readonly frontTilt: number
  readonly overhang: number
  readonly bays: number
}

export interface FrameShape {
  readonly rise: number
  /** Eave to top along the roof. */
  readonly halfRoof: number
  /** Of an arch; 0 where the roof is flat. */
  readonly radius: number
  /** Radians: of half the arch. */
  readonly halfAngle: number
  readonly frontWall: number
  /** The front eave stands so far behind the front base. */
  readonly setback: number
  readonly oneSlope: boolean
}

/**
 * G5 Hoop of width W and rise h: R = (W²/4 + h²)/(2h), half angle 2·atan(2h/W), beyond a half circle too.
 * Gothic, upright at the eave: R = (h² + W²/4)/W, half angle 2·atan(W/2h). A flat slope is the straight line from eave to top.
 */
export function shapeOf(frame: Frame): FrameShape {
  const { kind, width, eave } = frame
  const rise = frame.ridge - eave
  const half = width / 2
  const oneSlope = kind === 'lean-to' || kind === 'single-slope'
  const radius =
    kind === 'hoop'
      ? (half * half + rise * rise) / (2 * rise)
      : kind === 'gothic'
        ? (rise * rise + half * half) / width
        : 0
  const halfAngle =
    kind === 'hoop' ? 2 * Math.atan(rise / half) : kind === 'gothic' ? 2 * Math.atan(half / rise) : 0
  const tilt = (frame.frontTilt * Math.PI) / 180
  const upright = frame.frontTilt === 90
  return {
    rise,
    radius,
    halfAngle,
    halfRoof: radius > 0 ? radius * halfAngle : Math.hypot(oneSlope ? width : half, rise),
    frontWall: upright ? eave : eave / Math.sin(tilt),
    setback: upright ? 0 : (eave * Math.cos(tilt)) / Math.sin(tilt),
    oneSlope,
  }
}
