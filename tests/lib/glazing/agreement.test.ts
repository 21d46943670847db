import fc from 'fast-check'
import { afterAll, describe, expect, it } from 'vitest'
import { buildWorkbook, type WorkbookRequest } from '@/lib/estimate'
import { readHouse } from '@/lib/estimate/cuts/read-house'
import { layOutHouse } from '@/lib/glazing'
import { shapeOf } from '@/lib/glazing/geometry/frame'
import { areaOf } from '@/lib/glazing/geometry/polygon'
import { surfacesOf } from '@/lib/glazing/geometry/surfaces'
import { createEngine } from '@/lib/workbook/engine'
import { openLive } from '../estimate/compute'
import { houses } from '../estimate/houses'

const us = openLive({ system: 'us' })
afterAll(() => us.close())

function houseOf(request: WorkbookRequest) {
  const built = buildWorkbook(request)
  if (!built.ok) throw new Error(built.failure.text)
  const engine = createEngine(built.value)
  try {
    return readHouse(built.value, engine)
  } finally {
    engine.destroy()
  }
}

describe('surfaces and the workbook', { timeout: 60_000 }, () => {
  it('[G6] polygons have the workbook’s areas, overhang included, for every frame type', () => {
    fc.assert(
      fc.property(houses, (house) => {
        us.set(house)
        const of = (name: string) => us.number(name)
        const kind = us.text('frame_type') as Parameters<typeof shapeOf>[0]['kind']
        const frame = {
          kind,
          width: of('frame_width'),
          length: of('frame_length'),
          eave: of('eave_height'),
          ridge: of('ridge_height'),
          kneeWall: of('knee_wall_height'),
          frontTilt: of('front_wall_tilt'),
          overhang: of('overhang'),
          bays: of('bay_count'),
        }
        const surfaces = surfacesOf(frame, 0.5 / 304.8)
        const area = surfaces.reduce((sum, surface) => sum + areaOf(surface.polygon), 0)
        // No openings here: what is needed is the covering's area and the overhang's.
        expect(area / of('sheet_area_needed')).toBeCloseTo(1, 9)
        const slopes = { gable: 2, gothic: 2, hoop: 2, 'lean-to': 1, 'single-slope': 1 }[kind]
        const beyond = slopes * frame.overhang * frame.length * frame.bays
        expect((area - beyond) / of('covering_area')).toBeCloseTo(1, 9)
        expect(shapeOf(frame).halfRoof).toBeCloseTo(of('half_roof_length'), 9)
      }),
      { numRuns: 60, seed: 31 },
    )
  })

  it('[G7] an arch’s outline keeps to half a millimetre, and its area to the arc’s', () => {
    const frame = {
      kind: 'hoop',
      width: 7.3,
      length: 20,
      eave: 1,
      kneeWall: 0,
      frontTilt: 90,
      overhang: 0,
      bays: 1,
    } as const
    for (const rise of [0.4, 2, 3.65, 5]) {
      const fineness = 0.0005
      const end = surfacesOf({ ...frame, ridge: 1 + rise }, fineness).find((one) => one.kind === 'Right end')
      const radius = (frame.width ** 2 / 4 + rise ** 2) / (2 * rise)
      const [cu, cv] = [frame.width / 2, 1 + rise - radius]
      const arch = (end?.polygon ?? []).filter(([, v]) => v >= 1)
      for (const [i, [u, v]] of arch.entries()) {
        expect(Math.abs(Math.hypot(u - cu, v - cv) - radius)).toBeLessThan(fineness)
        const [nextU, nextV] = arch[i + 1] ?? [u, v]
        const middle = Math.hypot((u + nextU) / 2 - cu, (v + nextV) / 2 - cv)
        expect(Math.abs(middle - radius)).toBeLessThan(fineness)
      }
      // Circular segment: R²(φ − sin φ)/2 with φ the whole angle of the arch; the wall below is a rectangle.
      const angle = 4 * Math.atan((2 * rise) / frame.width)
      const segment = (radius ** 2 * (angle - Math.sin(angle))) / 2
      expect(areaOf(end?.polygon ?? [])).toBeCloseTo(segment + frame.width, 9)
    }
  })

  it('[T20] openings, coverings, stock and temperatures come from the workbook, in its units', () => {
    const read = houseOf({
      system: 'si',
      inputs: {
        frame_type: 'gable',
        side_covering: 'PC-TWIN-6',
        end_covering: 'PC-CORR',
        roof_covering: 'FILM-2',
      },
      openings: [{ surface: 'Left end', kind: 'door', width: 0.9, height: 2, name: 'Door', along: 1, up: 0 }],
      overrides: { 'Sheets in stock': { 'PC-TWIN-6-12': { length: 3.5, price: 77 } } },
    })
    if (!read.ok) throw new Error(read.failure.text)
    const house = read.value
    expect(house.lengthUnit).toBe('m')
    expect(house.openings).toEqual([
      { name: 'Door', kind: 'door', surface: 'Left end', width: 0.9, height: 2, count: 1, along: 1, up: 0 },
    ])
    const twin = house.coverings.find((one) => one.code === 'PC-TWIN-6')
    expect(twin?.thickness).toBeCloseTo(0.006, 12)
    expect(twin?.smallestRadius).toBeCloseTo(1, 12)
    expect(twin?.joining).toBe('profile')
    expect(twin?.stock).toContainEqual({ width: expect.closeTo(1.2192, 9), length: 3.5, price: 77 })
    expect(twin?.jointProfile?.code).toBe('H-6')
    expect(house.coverings.map((one) => one.joining).sort()).toEqual(['channel', 'lap', 'profile'])
    expect(house.temperatures.fitting).toBeGreaterThan(10)
    expect(house.temperatures.highest).toBeGreaterThan(house.temperatures.fitting)
  })

  it('[G6] both unit systems lay the same house out alike', () => {
    const inputs = {
      frame_type: 'gable',
      frame_width: `20'`,
      frame_length: `48'`,
      eave_height: `8'`,
      ridge_height: `13'`,
      rafter_spacing: `4'`,
      purlin_spacing: `4'`,
    }
    const [inUs, inSi] = (['us', 'si'] as const).map((system) => {
      const house = houseOf({ system, inputs })
      const layout = house.ok ? layOutHouse(house.value) : house
      if (!layout.ok) throw new Error(layout.failure.text)
      return layout.value
    })
    expect(inSi?.pieces.length).toBe(inUs?.pieces.length)
    inUs?.pieces.forEach((piece, i) => {
      const other = inSi?.pieces[i]
      expect(other?.mark).toBe(piece.mark)
      expect((other?.width ?? 0) / 0.3048).toBeCloseTo(piece.width, 7)
      expect((other?.left ?? 0) / 0.3048).toBeCloseTo(piece.left, 7)
    })
    expect(inSi?.stock.length).toBe(inUs?.stock.length)
  })
})
