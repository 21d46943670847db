import { addTime, getPosition, getTimes } from 'suncalc'
import { afterAll, describe, expect, test, vi } from 'vitest'
import { openLive } from '../lib/estimate/compute'

vi.setConfig({ testTimeout: 60_000 })

/**
 * The sun's direction through the Sun sheet: a facet's cosine of incidence is a + b·cos ω + c·sin ω, so a south wall,
 * a west wall and a roof that is all but flat see its three components. Duffie and Beckman, chapter 1; read-2.
 */
const live = openLive({
  system: 'si',
  inputs: { frame_type: 'gable', frame_width: 10, eave_height: 3, ridge_height: 3 + 1e-9, ridge_azimuth: 90 },
})
afterAll(() => live.close())

const degrees = 180 / Math.PI
const [roof, south, west] = [0, 6, 8]
const meanDays = [17, 47, 75, 105, 135, 162, 198, 228, 258, 288, 318, 344]

function direction(month: number, hour: number) {
  const angle = ((hour - 12) * 15) / degrees
  const seen = (facet: number): number => {
    const at = (name: string): number => live.numbers(name)[facet * 12 + month] ?? 0
    return at('sun_always') + at('sun_noon') * Math.cos(angle) + at('sun_evening') * Math.sin(angle)
  }
  const [up, toSouth, toWest] = [seen(roof), seen(south), seen(west)]
  return {
    altitude: Math.asin(up) * degrees,
    /** From south, west positive. */
    azimuth: Math.atan2(toWest, toSouth) * degrees,
    /** Up over what points to a wall turned so far from south. */
    profile: (turn: number) =>
      Math.atan2(up, toSouth * Math.cos(turn / degrees) + toWest * Math.sin(turn / degrees)) * degrees,
  }
}

const onDay = (latitude: number, month: number, day: number): void =>
  live.set({ latitude, mean_day: meanDays.map((mean, order) => (order === month ? day : mean)) })

describe('[S1] where the sun stands', () => {
  test('SS3: example 1.6.2a, 43° on day 44 at 9:30: zenith 66.5°, azimuth −40.1°', () => {
    onDay(43, 1, 44)
    const { altitude, azimuth } = direction(1, 9.5)
    expect(Math.abs(90 - altitude - 66.5)).toBeLessThanOrEqual(0.1)
    expect(Math.abs(azimuth + 40.1)).toBeLessThanOrEqual(0.1)
  })

  test('SS4: example 1.6.3, 43° on day 75 at 16:00: altitude 19.67°, azimuth 66.76°, profile angle 25.6°', () => {
    onDay(43, 2, 75)
    const { altitude, azimuth, profile } = direction(2, 16)
    expect(Math.abs(altitude - 19.67)).toBeLessThanOrEqual(0.1)
    expect(Math.abs(azimuth - 66.76)).toBeLessThanOrEqual(0.1)
    expect(Math.abs(profile(25) - 25.6)).toBeLessThanOrEqual(0.1)
    expect(Math.abs((live.numbers('day_length')[2] ?? 0) - (17.85 - 6.15))).toBeLessThanOrEqual(0.01)
  })

  test('SS10: example 2.15.1, an hour of 1.04 MJ/m² on 60°: terms 0.418, 0.597, 0.156, together 1.17', () => {
    const own = openLive({
      system: 'si',
      inputs: {
        latitude: 40,
        frame_type: 'gable',
        frame_width: 10,
        eave_height: 2,
        ridge_height: 2 + 5 * Math.tan(60 / degrees),
      },
    })
    own.set({ mean_day: meanDays.map((mean, month) => (month === 1 ? 51 : mean)) })
    const at = (name: string): number => own.numbers(name)[1] ?? 0
    const angle = (-2.5 * 15) / degrees
    const onRoof = at('sun_always') + at('sun_noon') * Math.cos(angle) + at('sun_evening') * Math.sin(angle)
    onDay(40, 1, 51)
    const ratio = onRoof / Math.sin(direction(1, 9.5).altitude / degrees)
    expect(Math.abs(ratio - 1.71)).toBeLessThanOrEqual(0.01)
    own.setCell('monthly_irradiation', 1, 1.04)
    own.setCell('monthly_ground_reflectance', 1, 0.6)
    own.setCell('diffuse_fraction', 1, 0.796 / 1.04)
    own.setCell('beam_ratio', 1, ratio)
    expect(Math.abs(at('sun_beam') - 0.418)).toBeLessThanOrEqual(0.003)
    expect(Math.abs(at('sun_diffuse') - 0.597 - 0.156)).toBeLessThanOrEqual(0.002)
    expect(Math.abs(at('sun_irradiation') - 1.17)).toBeLessThanOrEqual(0.01)
    own.close()
  })

  /** suncalc (BSD) computes the sun's place from its longitude; Cooper's declination is within 1.2° of it. */
  addTime(0, 'up', 'down')
  test.each([0, 23, 43, 60, -38])(
    'at latitude %d: noon, day length and position are near those of suncalc',
    (latitude) => {
      live.set({ latitude, mean_day: meanDays })
      meanDays.forEach((day, month) => {
        const date = new Date(Date.UTC(2023, 0, day, 12))
        const times = getTimes(date, latitude, 0)
        const [up, down] = [times.up, times.down]
        if (!(up instanceof Date) || !(down instanceof Date)) throw new Error('the sun does not set')
        // Refraction lifts suncalc's sun by half a degree at the horizon.
        const length = (down.getTime() - up.getTime()) / 3.6e6
        const allowed = 0.15 + 0.25 / Math.cos(latitude / degrees) ** 2
        expect(Math.abs((live.numbers('day_length')[month] ?? 0) - length), `day ${day}`).toBeLessThanOrEqual(
          allowed,
        )
        for (const hour of [9, 12, 15]) {
          const when = new Date(times.solarNoon.getTime() + (hour - 12) * 3.6e6)
          const theirs = getPosition(when, latitude, 0)
          const ours = direction(month, hour)
          // As the angle between the two directions: azimuths mean little when the sun is overhead.
          const unit = (altitude: number, azimuth: number): number[] => [
            Math.cos(altitude / degrees) * Math.cos(azimuth / degrees),
            Math.cos(altitude / degrees) * Math.sin(azimuth / degrees),
            Math.sin(altitude / degrees),
          ]
          const theirsAt = unit(theirs.altitude, theirs.azimuth)
          const cosine = unit(ours.altitude, ours.azimuth + 180).reduce(
            (sum, part, axis) => sum + part * (theirsAt[axis] ?? 0),
            0,
          )
          const apart = Math.acos(Math.min(1, cosine)) * degrees
          expect(apart, `day ${day}, ${hour} h`).toBeLessThanOrEqual(1.5)
        }
      })
    },
  )
})
