import fc from 'fast-check'
import type { Covering, HouseInput, HouseOpening, ProfileStock } from '@/lib/glazing'

/** Invented coverings in metres, one for each way of joining. */
const profile = (code: string, kind: string, length: number, price: number): ProfileStock => ({
  code,
  kind,
  length,
  price,
})
const joint = profile('H', 'joint', 6, 9)
const end = profile('U', 'end', 2.1, 4)

export const multiwall: Covering = {
  code: 'WALL-10',
  family: 'polycarbonate',
  layers: 2,
  thickness: 0.01,
  joining: 'profile',
  expansion: 6.5e-5,
  bending: 'cold',
  smallestRadius: 0.9,
  stock: [
    { width: 1.2, length: 3, price: 61 },
    { width: 1.2, length: 4, price: 80 },
    { width: 1.2, length: 6, price: 119 },
  ],
  areaPrice: 18,
  jointProfile: joint,
  endProfile: end,
}
export const corrugated: Covering = {
  ...multiwall,
  code: 'CORR',
  joining: 'lap',
  smallestRadius: 0.9,
  stock: [
    { width: 0.9, length: 2.5, price: 30 },
    { width: 1.26, length: 4, price: 62 },
  ],
}
export const film: Covering = {
  ...multiwall,
  code: 'FILM-D',
  family: 'film',
  joining: 'channel',
  expansion: 1.8e-4,
  bending: 'freely',
  stock: [{ width: 7, length: 30, price: 260 }],
  endProfile: profile('LOCK', 'end', 2.4, 4),
}
export const glass: Covering = {
  ...multiwall,
  code: 'GLASS-4',
  family: 'glass',
  layers: 1,
  thickness: 0.004,
  joining: 'bar',
  expansion: 9e-6,
  stock: [{ width: 0.61, length: 1.83, price: 29 }],
}
export const panel: Covering = {
  ...multiwall,
  code: 'PANEL',
  family: 'panel',
  joining: 'butt',
  expansion: 1.2e-5,
  stock: [{ width: 1, length: 6, price: 210 }],
}
export const toSize: Covering = { ...multiwall, code: 'TO-SIZE', stock: [] }
export const coverings = [multiwall, corrugated, film, glass, panel, toSize]

export const trims = [
  profile('EDGE', 'edge', 3, 5),
  profile('RIDGE', 'ridge', 3, 14),
  profile('CORNER', 'corner', 3, 9),
  profile('BASE', 'base', 3, 6),
]

export const everywhere = (code: string): HouseInput['coveringOf'] => ({
  'Front roof': code,
  'Back roof': code,
  'Arch roof': code,
  'Front wall': code,
  'Back wall': code,
  'Left end': code,
  'Right end': code,
})

/** Houses of every frame type that can stand and be covered, in metres; openings small enough to find room. */
export const houseInputs: fc.Arbitrary<HouseInput> = fc
  .record({
    kind: fc.constantFrom('gable', 'hoop', 'gothic', 'lean-to', 'single-slope'),
    width: fc.integer({ min: 10, max: 60 }).map((n) => n / 4),
    length: fc.integer({ min: 20, max: 140 }).map((n) => n / 4 + 0.13 * (n % 3)),
    eave: fc.constantFrom(0, 1.5, 2.4, 3.05),
    rise: fc.double({ min: 0.2, max: 0.95, noNaN: true }),
    knee: fc.constantFrom(0, 0, 0.25, 0.6),
    tilt: fc.constantFrom(90, 75, 60),
    overhang: fc.constantFrom(0, 0, 0.3),
    bays: fc.integer({ min: 1, max: 3 }),
    rafters: fc.constantFrom(0.5, 0.6, 1, 1.2, 2),
    purlins: fc.constantFrom(0.75, 1, 1.4),
    roof: fc.constantFrom(...coverings.map((one) => one.code)),
    side: fc.constantFrom(...coverings.map((one) => one.code)),
    openings: fc.array(
      fc.record({
        surface: fc.constantFrom('roof', 'Front wall', 'Left end', 'Right end'),
        kind: fc.constantFrom('door', 'vent', 'fan'),
        width: fc.constantFrom(0.4, 0.7, 1.1),
        height: fc.constantFrom(0.3, 0.5, 0.8),
        count: fc.integer({ min: 1, max: 3 }),
      }),
      { maxLength: 3 },
    ),
  })
  .map((one): HouseInput => {
    const oneSlope = one.kind === 'lean-to' || one.kind === 'single-slope'
    const rise = one.kind === 'gothic' ? one.width * (0.5 + one.rise / 4) : one.width * one.rise * 0.7
    const roofKind = one.kind === 'hoop' ? 'Arch roof' : 'Front roof'
    const bent = one.kind === 'hoop' || one.kind === 'gothic'
    return {
      lengthUnit: 'm',
      frame: {
        kind: one.kind,
        width: one.width,
        length: one.length,
        eave: one.eave,
        ridge: one.eave + rise,
        kneeWall: one.eave * one.knee,
        frontTilt: oneSlope ? one.tilt : 90,
        overhang: one.overhang,
        bays: oneSlope ? 1 : one.bays,
      },
      rafterSpacing: one.rafters,
      purlinSpacing: one.purlins,
      openings: one.openings
        .filter((opening) => opening.surface !== 'Front wall' || one.eave * (1 - one.knee) > 1)
        .map(
          (opening, i): HouseOpening => ({
            ...opening,
            name: `opening ${i}`,
            surface: opening.surface === 'roof' ? roofKind : (opening.surface as HouseOpening['surface']),
          }),
        ),
      coverings,
      coveringOf: {
        ...everywhere(one.side),
        'Front roof': bent && one.roof === 'GLASS-4' ? 'FILM-D' : one.roof,
        'Back roof': bent && one.roof === 'GLASS-4' ? 'FILM-D' : one.roof,
        'Arch roof': one.roof === 'GLASS-4' ? 'FILM-D' : one.roof,
      },
      trims,
      temperatures: { fitting: 16, lowest: -20, highest: 55 },
    }
  })
