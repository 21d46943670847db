import fc from 'fast-check'
import type { InputValue } from '@/lib/estimate'

export type HouseInputs = Readonly<Record<string, InputValue>>

const tidy = (low: number, high: number) =>
  fc.integer({ min: low * 4, max: high * 4 }).map((quarter) => quarter / 4)

/** Houses that can stand, in feet, of every frame type. */
export const houses: fc.Arbitrary<HouseInputs> = fc
  .record({
    type: fc.constantFrom('gable', 'hoop', 'gothic', 'lean-to', 'single-slope'),
    width: tidy(8, 60),
    length: tidy(10, 200),
    eave: tidy(0, 14),
    rise: fc.double({ min: 0.1, max: 1.6, noNaN: true }),
    knee: fc.double({ min: 0, max: 1, noNaN: true }),
    tilt: fc.constantFrom(90, 75, 60),
    overhang: fc.constantFrom(0, 0, 0.5, 1),
    bays: fc.integer({ min: 1, max: 5 }),
    coverings: fc.constantFrom('FILM-2', 'PC-TWIN-8', 'GLASS-1', 'PC-TRIPLE-16'),
    inside: tidy(35, 75),
    outside: tidy(-30, 40),
  })
  .map((one) => {
    const slope = one.type === 'lean-to' || one.type === 'single-slope'
    const rise = one.type === 'gothic' ? one.width * (0.5 + one.rise / 4) : one.width * one.rise * 0.6
    return {
      frame_type: one.type,
      frame_width: one.width,
      frame_length: one.length,
      eave_height: one.eave,
      ridge_height: one.eave + rise,
      knee_wall_height: one.eave * one.knee,
      front_wall_tilt: slope ? one.tilt : 90,
      overhang: one.overhang,
      bay_count: slope ? 1 : one.bays,
      roof_covering: one.coverings,
      inside_night_temperature: one.inside,
      outside_design_temperature: one.outside,
    }
  })

/** Height of a bay's outline above grade at `x` from the front eave, by the definition of the frame, not by its formulas. */
export function outline(house: HouseInputs): (x: number) => number {
  const {
    frame_type: type,
    frame_width,
    eave_height,
    ridge_height,
  } = house as Record<string, number | string>
  const width = Number(frame_width)
  const eave = Number(eave_height)
  const rise = Number(ridge_height) - eave
  const half = width / 2
  if (type === 'lean-to' || type === 'single-slope') return (x) => eave + (rise * x) / width
  if (type === 'gable') return (x) => eave + rise * (1 - Math.abs(x - half) / half)
  if (type === 'gothic') {
    const radius = (rise * rise + half * half) / width
    return (x) => {
      const from = Math.min(x, width - x)
      return eave + Math.sqrt(Math.max(0, radius * radius - (radius - from) ** 2))
    }
  }
  const radius = (half * half + rise * rise) / (2 * rise)
  return (x) => eave + rise - radius + Math.sqrt(Math.max(0, radius * radius - (x - half) ** 2))
}
