import { describe, expect, it } from 'vitest'
import { type HouseInput, type HouseOpening, layOutHouse } from '@/lib/glazing'
import { placeOpenings } from '@/lib/glazing/geometry/openings'
import { surfacesOf } from '@/lib/glazing/geometry/surfaces'
import { engagementOf } from '@/lib/glazing/layout/cut-size'
import { givenLines, jointLines, jointPitch, spliceLines } from '@/lib/glazing/layout/joints'
import { layoutRules } from '@/lib/glazing/layout/rules'
import { corrugated, coverings, everywhere, glass, multiwall, toSize, trims } from './house-inputs'

const frame = {
  kind: 'gable',
  width: 6,
  length: 10,
  eave: 2.4,
  ridge: 4,
  kneeWall: 0.4,
  frontTilt: 90,
  overhang: 0,
  bays: 1,
} as const
const house: HouseInput = {
  lengthUnit: 'm',
  frame,
  purlinSpacing: 1,
  rafterSpacing: 0.6,
  openings: [],
  coverings,
  coveringOf: everywhere('WALL-10'),
  trims,
  temperatures: { fitting: 16, lowest: -20, highest: 56 },
}
function layOut(more: Partial<HouseInput>) {
  const made = layOutHouse({ ...house, ...more })
  if (!made.ok) throw new Error(made.failure.text)
  return made.value
}

describe('joints', () => {
  it.each([
    [1.2, 0.6, 1.2],
    [1.2, 0.5, 1],
    [1.2, 1.2, 1.2],
    [0.61, 0.6, 0.6],
    [1.2, 2, 1.2],
  ])('[T5] a sheet of %f on rafters %f apart has joints %f apart', (sheet, rafters, apart) => {
    expect(jointPitch(sheet, rafters)).toBeCloseTo(apart, 12)
  })

  it.each([
    ['left', [1.2, 2.4, 3.6, 4.8]],
    ['centred', [1.4, 2.6, 3.8]],
    ['symmetrical', [1.4, 2.6, 3.8]],
  ] as const)('[T6] %s over 5.2 m', (start, lines) => {
    // Centred: a sheet from 2.0 to 3.2; symmetrical: a joint at 2.6.
    const expected =
      start === 'centred' ? [0.8, 2, 3.2, 4.4] : start === 'symmetrical' ? [0.2, ...lines, 5] : lines
    const found = jointLines(0, 5.2, 1.2, start, 0.1)
    expect(found.map((value) => Number(value.toFixed(9)))).toEqual(expected)
  })

  it('[T7] a last strip of 50 mm takes 50 mm from its neighbour', () => {
    expect(jointLines(0, 3.65, 1.2, 'left', 0.1).map((value) => Number(value.toFixed(9)))).toEqual([
      1.2, 2.4, 3.55,
    ])
  })

  it('[T8] joints that a person gives stand, and are refused when a strip could not be cut', () => {
    expect(givenLines('Front wall', 0, 3, [2, 1], 1.2)).toEqual({ ok: true, value: [1, 2] })
    const wide = givenLines('Front wall', 0, 3, [1], 1.2)
    expect(wide.ok ? '' : wide.failure.text).toMatch(/Front wall: expected joints at most 1.2 apart, not 2/)
    const outside = givenLines('Front wall', 0, 3, [1, 2, 3.5], 1.2)
    expect(outside.ok).toBe(false)
    const layout = layOut({ joints: { 'Front wall': [0.7, 1.9, 3, 4, 5, 6, 7, 8, 9] } })
    expect(layout.surfaces.find((one) => one.name === 'Front wall')?.joints).toEqual([
      0.7, 1.9, 3, 4, 5, 6, 7, 8, 9,
    ])
  })

  it('[T9] splices stand on purlins as high as the sheet reaches, and never leave less than the narrowest', () => {
    const purlins = { datum: 0, spacing: 0.75 }
    const limits = { whole: 3, spliced: 3 }
    expect(spliceLines(0, 2.9, limits, purlins, 'long', 0.1)).toEqual([])
    expect(spliceLines(0, 7, limits, purlins, 'long', 0.1)).toEqual([3, 6])
    expect(spliceLines(0, 7, limits, purlins, 'even', 0.1)).toEqual([2.25, 4.5])
    expect(spliceLines(0, 3.05, limits, purlins, 'long', 0.1)).toEqual([2.25])
    expect(spliceLines(0, 4, limits, undefined, 'even', 0.1)).toEqual([2])
  })

  it('[T14] the cheapest start is taken: 6 m of end on 1.2 m sheets is laid from the left, five sheets and no rips', () => {
    const layout = layOut({})
    const end = layout.surfaces.find((one) => one.name === 'Left end')
    expect(end?.start).toBe('left')
    for (const start of ['centred', 'symmetrical'] as const) {
      const other = layOut({ starts: { 'Left end': start, 'Right end': start } })
      const cost = (of: typeof layout) => of.plans.reduce((sum, plan) => sum + plan.cost, 0)
      expect(cost(layout)).toBeLessThanOrEqual(cost(other) + 1e-9)
    }
  })
})

describe('coverings', () => {
  it('[T3] corrugated sheets cover their width less a lap and are wider than their strip by half a lap a joint', () => {
    const layout = layOut({
      coveringOf: { ...everywhere('WALL-10'), 'Front wall': 'CORR' },
      starts: { 'Front wall': 'left' },
      coverings: [multiwall, { ...corrugated, expansion: 0 }],
    })
    const wall = layout.pieces.filter((piece) => piece.surface === 'Front wall')
    // 0.9 − 0.076 = 0.824 carries one module of 0.6; 1.26 − 0.076 = 1.184 too: the narrower sheet is the cheaper.
    expect(layout.stock.find((one) => one.covering === 'CORR')?.width).toBe(0.9)
    expect(wall[1]?.width).toBeCloseTo(0.6 + 0.076, 9)
    expect(wall[0]?.width).toBeCloseTo(0.6 + 0.038, 9)
  })

  it('[T3] a corrugated piece that just fits its sheet below a slant is not made longer by its lap', () => {
    // 2.57 − 0.4 at the eave and 0.6 · 1.43 / 3 more at the first joint: 2.456 m out of sheets of 2.5 m.
    const layout = layOut({
      frame: { ...frame, eave: 2.57 },
      coverings: [{ ...corrugated, stock: [{ width: 0.9, length: 2.5, price: 30 }] }],
      coveringOf: everywhere('CORR'),
    })
    const [first] = layout.pieces.filter((piece) => piece.surface === 'Right end')
    expect(first?.length).toBeGreaterThan(2.4)
    expect(first?.length).toBeLessThanOrEqual(2.5)
  })

  it('[T4] panes are no larger than their thickness carries, and overhead ones are to be safety glass', () => {
    const big = { ...glass, expansion: 0, stock: [{ width: 1, length: 3, price: 60 }] }
    const layout = layOut({ rafterSpacing: 1, coverings: [big], coveringOf: everywhere('GLASS-4') })
    for (const piece of layout.pieces) expect(piece.width * piece.length).toBeLessThanOrEqual(1.5)
    expect(layout.notes.join()).toMatch(/safety glass/)
  })

  it('[C14] what is not stocked is bought cut to size, by area', () => {
    const layout = layOut({ coveringOf: everywhere('TO-SIZE') })
    for (const piece of layout.pieces)
      expect(layout.stock[piece.stock]).toMatchObject({
        width: piece.width,
        length: piece.length,
        pieces: [piece.mark],
      })
    const area = layout.pieces.reduce((sum, piece) => sum + piece.width * piece.length, 0)
    expect(layout.plans[0]?.cost).toBeCloseTo(area * toSize.areaPrice, 6)
  })

  it('[T12] a profile 30 mm deep holds 20 mm of a sheet of 4.0 m on the coldest day, and not of one of 4.1 m', () => {
    // 6.5e-5 · L · (40 + 36) / 2 = 10 mm at L = 4.05 m with these temperatures.
    const held = (length: number) => engagementOf(length, 6.5e-5, house.temperatures, layoutRules('m'))
    expect(held(4.0)).toBeGreaterThan(0.02)
    expect(held(4.1)).toBeLessThan(0.02)
  })

  it('[C15] offcuts of 1.2 m by 300 mm and more are kept', () => {
    const offcuts = layOut({}).stock.flatMap((one) => one.offcuts)
    expect(offcuts.length).toBeGreaterThan(0)
    for (const { width, length, kept } of offcuts) expect(kept).toBe(length >= 1.2 && width >= 0.3)
  })
})

describe('openings', () => {
  const surfaces = surfacesOf({ ...frame, bays: 2 }, 0.0005)
  const opening = (more: Partial<HouseOpening>): HouseOpening => ({
    name: 'O',
    kind: 'vent',
    surface: 'Front roof',
    width: 1,
    height: 0.5,
    count: 1,
    ...more,
  })
  const place = (...openings: HouseOpening[]) => {
    const placed = placeOpenings(surfaces, openings)
    if (!placed.ok) return placed.failure.text
    return surfaces.flatMap((surface) =>
      (placed.value.get(surface) ?? []).map(({ u, v }) => [
        surface.name,
        Number(u.toFixed(6)),
        Number(v.toFixed(6)),
      ]),
    )
  }
  // Half of 6 m is 3 m run and 1.6 m rise: √11.56 = 3.4 m of slope.
  it('[G8] stand in the bays in turn and evenly within each', () => {
    expect(place(opening({ count: 3, along: 1, up: 2 }))).toEqual([
      ['Front roof 1', 1, 2],
      ['Front roof 1', 5.5, 2],
      ['Front roof 2', 1, 2],
    ])
  })

  it('[G9] stand on the knee wall when they are placed lower', () => {
    expect(place(opening({ surface: 'Front wall', along: 2, up: 0 }))).toEqual([['Front wall', 2, 0.4]])
  })

  it('[G10] without a place: doors below, roof vents under the ridge, others half way up', () => {
    expect(place(opening({ count: 2 }))).toEqual([
      ['Front roof 1', 4.5, 2.9],
      ['Front roof 2', 4.5, 2.9],
    ])
    expect(place(opening({ surface: 'Right end', kind: 'door', height: 1.9, width: 0.9 }))).toEqual([
      ['Right end 1', 2.55, 0.4],
    ])
    // 0.4 + (2.4 − 0.4 − 0.5) / 2.
    expect(place(opening({ surface: 'Back wall', kind: 'window' }))).toEqual([['Back wall', 4.5, 1.15]])
  })

  it('[G10] find room beside one another, and are refused where there is none', () => {
    const both = place(opening({ surface: 'Back wall' }), opening({ surface: 'Back wall' }))
    expect(both).toHaveLength(2)
    expect(both[0]).not.toEqual(both[1])
    expect(place(opening({ along: 9.5, up: 1 }))).toMatch(/O: expected room for it on Front roof 1/)
    expect(place(opening({ along: 1, up: 1 }), opening({ along: 1.5, up: 1, name: 'Second' }))).toMatch(
      /Second: expected room/,
    )
    expect(place(opening({ surface: 'Arch roof' }))).toMatch(/expected a surface that this house has/)
  })
})
