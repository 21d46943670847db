import fc from 'fast-check'
import { afterAll, describe, expect, test, vi } from 'vitest'
import { buildWorkbook, type InputValue, inOrder, type TemplateInput, templateInputs } from '@/lib/estimate'
import { frameChecks, type House } from '@/lib/estimate/sheets/frame-checks'
import { convert } from '@/lib/units'
import { isCellError } from '@/lib/workbook'
import { openLive } from './compute'
import { type HouseInputs, houses, outline } from './houses'

// Many houses on a busy machine.
vi.setConfig({ testTimeout: 120_000, hookTimeout: 60_000 })

const runs = { numRuns: 25, seed: 20_271 }
const us = openLive({ system: 'us' })
const si = openLive({ system: 'si' })
afterAll(() => {
  us.close()
  si.close()
})

/** Simpson's rule after x = w(1 − cos t)/2, which takes the upright edges of an arch smoothly. */
function integrate(height: (x: number) => number, width: number, steps = 2000): number {
  const at = (t: number): number => (height((width * (1 - Math.cos(t))) / 2) * width * Math.sin(t)) / 2
  let sum = 0
  for (let i = 0; i <= steps; i++) {
    sum += at((Math.PI * i) / steps) * (i === 0 || i === steps ? 1 : i % 2 === 1 ? 4 : 2)
  }
  return (sum * Math.PI) / steps / 3
}

function arcLength(height: (x: number) => number, width: number, steps = 20_000): number {
  let length = 0
  let [x, y] = [0, height(0)]
  for (let i = 1; i <= steps; i++) {
    const nextX = (width * (1 - Math.cos((Math.PI * i) / steps))) / 2
    const nextY = height(nextX)
    length += Math.hypot(nextX - x, nextY - y)
    ;[x, y] = [nextX, nextY]
  }
  return length
}

const of = (house: HouseInputs, name: string): number => Number(house[name])
const beyondHalfCircle = (house: HouseInputs): boolean =>
  house.frame_type === 'hoop' &&
  of(house, 'ridge_height') - of(house, 'eave_height') > of(house, 'frame_width') / 2

describe('generated houses', () => {
  test('[G2] areas and volume are those of the outline, integrated', () => {
    fc.assert(
      fc.property(houses, (house) => {
        fc.pre(!beyondHalfCircle(house))
        const width = of(house, 'frame_width')
        const length = of(house, 'frame_length')
        const bays = of(house, 'bay_count')
        const eave = of(house, 'eave_height')
        const lean = (of(house, 'front_wall_tilt') * Math.PI) / 180
        const setback = house.front_wall_tilt === 90 ? 0 : eave / Math.tan(lean)
        const section = integrate(outline(house), width) + (setback * eave) / 2
        const slanted = eave / Math.sin(lean)
        const backs = { 'lean-to': 0, 'single-slope': of(house, 'ridge_height') } as Record<string, number>
        const walls = slanted + (backs[String(house.frame_type)] ?? eave)
        us.set(house)
        expect(us.number('enclosed_volume') / (section * bays * length)).toBeCloseTo(1, 6)
        expect(us.number('end_wall_area') / (2 * section * bays)).toBeCloseTo(1, 6)
        expect(us.number('roof_area') / (arcLength(outline(house), width) * length * bays)).toBeCloseTo(1, 5)
        expect(us.number('side_wall_area')).toBeCloseTo(walls * length, 6)
        expect(us.number('floor_area')).toBeCloseTo((width * bays + setback) * length, 6)
      }),
      runs,
    )
  })

  test('[G2] a hoop beyond a half circle is a circle less its segment below the feet', () => {
    const upright = { eave_height: 0, knee_wall_height: 0, front_wall_tilt: 90, bay_count: 1, overhang: 0 }
    for (const [width, rise] of [
      [20, 15],
      [20, 19.9],
      [12, 30],
    ] as const) {
      const radius = (width ** 2 / 4 + rise ** 2) / (2 * rise)
      const gap = Math.asin(width / (2 * radius))
      us.set({ ...upright, frame_type: 'hoop', frame_width: width, ridge_height: rise, frame_length: 50 })
      expect(us.number('roof_slope_length')).toBeCloseTo(2 * radius * (Math.PI - gap), 8)
      const segment = radius ** 2 * gap - (radius ** 2 * Math.sin(2 * gap)) / 2
      expect(us.number('end_section_area')).toBeCloseTo(Math.PI * radius ** 2 - segment, 8)
    }
  })

  test('[G1] covering area is gross area less knee wall, and nothing is lost between', () => {
    fc.assert(
      fc.property(houses, (house) => {
        us.set(house)
        const gross = us.number('roof_area') + us.number('side_wall_area') + us.number('end_wall_area')
        expect(us.number('covering_area')).toBeCloseTo(gross - us.number('knee_wall_area'), 6)
        expect(us.number('covering_area')).toBeGreaterThan(0)
        const nets = us.all().get('surface_net_area') ?? []
        const sum = nets.reduce<number>((total, net) => total + (typeof net === 'number' ? net : 0), 0)
        expect(sum).toBeCloseTo(gross, 6)
      }),
      runs,
    )
  })

  test('[H2] a greater difference of temperature means more heat', () => {
    fc.assert(
      fc.property(houses, fc.integer({ min: 1, max: 30 }), (house, colder) => {
        const outside = of(house, 'outside_design_temperature')
        fc.pre(outside - colder < of(house, 'inside_night_temperature'))
        us.set(house)
        const loss = us.number('design_heat_loss')
        us.set({ outside_design_temperature: outside - colder })
        expect(us.number('design_heat_loss')).toBeGreaterThan(loss)
      }),
      runs,
    )
  })

  test('[H1] resistance never adds heat', () => {
    fc.assert(
      fc.property(houses, fc.double({ min: 0.01, max: 8, noNaN: true }), (house, more) => {
        us.set({ ...house, roof_covering: 'FILM-2', screen_resistance: 0 })
        us.setRow('coverings', 'FILM-2', 'resistance', 1.43)
        const plain = us.number('design_heat_loss')
        us.setRow('coverings', 'FILM-2', 'resistance', 1.43 + more)
        expect(us.number('design_heat_loss')).toBeLessThanOrEqual(plain)
        us.setRow('coverings', 'FILM-2', 'resistance', 1.43)
        us.set({ screen_resistance: more })
        expect(us.number('design_heat_loss')).toBeLessThanOrEqual(plain)
        us.set({ screen_resistance: 0 })
      }),
      runs,
    )
  })

  test('[W2] the same house in US and SI agrees to 1e-9, and every result is finite', () => {
    fc.assert(
      fc.property(houses, (house) => {
        us.set(house)
        si.set(inMetric(house))
        const other = us.all()
        for (const [name, values] of si.all()) {
          const named = si.workbook.names.get(name)
          if (!named || named.role === 'table' || name === 'unit_system' || inOwnUnits.has(name)) continue
          for (const [index, value] of values.entries()) {
            const same = other.get(name)?.[index]
            if (value !== null && isCellError(value)) expect.fail(`${name}: ${value.text}`)
            if (typeof value !== 'number' || typeof same !== 'number') expect(value, name).toBe(same)
            else {
              // Amounts are rounded to the cent line by line, so a cent may fall on either side.
              const allowed = named.quantity === 'money' ? 1e-4 : 1e-9
              const difference = Math.abs(value - convert(same, named.quantity, 'us', 'si'))
              expect(difference, name).toBeLessThanOrEqual(allowed * Math.max(1, Math.abs(value)))
            }
          }
        }
      }),
      runs,
    )
  })

  test('[G4] what is refused before a workbook is made, its checks say once it is edited into being', () => {
    const size = fc.integer({ min: 0, max: 12 }).map((half) => half / 2)
    const any: fc.Arbitrary<House> = fc.record({
      frame_type: fc.constantFrom('gable', 'hoop', 'gothic', 'lean-to', 'single-slope', 'dome'),
      frame_width: size.map((value) => value + 1),
      eave_height: size,
      ridge_height: size.map((value) => value + 0.5),
      knee_wall_height: size,
      front_wall_tilt: fc.constantFrom(90, 90, 70),
      bay_count: fc.constantFrom(1, 1, 2),
    })
    fc.assert(
      fc.property(any, (house) => {
        us.set({ ...house })
        for (const { line, rules } of frameChecks) {
          const broken = rules.find(({ wrong }) => wrong(house))
          expect(us.text(line.name)).toBe(broken?.says ?? inOrder)
        }
        const given = buildWorkbook({ system: 'us', inputs: { ...house } })
        const expected = frameChecks.some(({ rules }) => rules.some(({ wrong }) => wrong(house)))
        expect(given.ok).toBe(!expected)
      }),
      { ...runs, numRuns: 80 },
    )
  })

  test('[W1] whatever the inputs within their limits, every value is finite or an error in words', () => {
    const values = templateInputs.map((spec) => [spec.name, withinLimits(spec)] as const)
    const every = fc.record(Object.fromEntries(values)) as fc.Arbitrary<HouseInputs>
    fc.assert(
      fc.property(every, houses, (inputs, house) => {
        us.set({ ...inputs, ...house })
        for (const [name, cells] of us.all()) {
          for (const cell of cells) {
            if (typeof cell === 'number') expect(Number.isFinite(cell), name).toBe(true)
            else if (cell !== null && isCellError(cell)) expect.fail(`${name}: ${cell.text}`)
          }
        }
      }),
      runs,
    )
  })
})

/** Any value that the template's own limits allow, the bounds among them. */
function withinLimits(spec: TemplateInput): fc.Arbitrary<InputValue> {
  const { quantity, limits = {}, choices, count } = spec
  if (quantity === 'boolean') return fc.boolean()
  if (quantity === 'date') return fc.constant(45_000)
  if (quantity === 'text')
    return fc.constantFrom(...(Array.isArray(choices) ? choices : [String(spec.default ?? '')]))
  const bound = (value: number): number => convert(value, quantity, limits.in ?? 'us', 'us')
  const max = bound(limits.max ?? 1)
  const min = limits.above === undefined ? bound(limits.min ?? 0) : bound(limits.above) + max / 1e4
  const one = limits.whole ? fc.integer({ min, max }) : fc.double({ min, max, noNaN: true })
  return count === 1 ? one : fc.array(one, { minLength: count, maxLength: count })
}

/** Constants that are the ratio of two units of the system. */
const inOwnUnits: ReadonlySet<string> = new Set([
  'energy_per_heat',
  'energy_per_irradiation',
  'hours_of_capacity',
  'light_per_irradiation',
  'megajoules_per_irradiation',
  'pressure_of_mass',
  'small_lengths',
  'gain_factor',
])
const lengths = ['frame_width', 'frame_length', 'eave_height', 'ridge_height', 'knee_wall_height', 'overhang']
const temperatures = ['inside_night_temperature', 'outside_design_temperature']

function inMetric(house: HouseInputs): HouseInputs {
  return Object.fromEntries(
    Object.entries(house).map(([name, value]) => {
      if (lengths.includes(name)) return [name, convert(Number(value), 'length', 'us', 'si')]
      if (temperatures.includes(name)) return [name, convert(Number(value), 'temperature', 'us', 'si')]
      return [name, value]
    }),
  )
}
