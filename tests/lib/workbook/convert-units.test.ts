import fc from 'fast-check'
import { describe, expect, test, vi } from 'vitest'
import { buildWorkbook, type FrameType, frameTypes } from '@/lib/estimate'
import { convert, type Quantity, quantities } from '@/lib/units'
import {
  applyAll,
  applyOperation,
  type CellValue,
  fromJson,
  isCellError,
  type Operation,
  operationSchema,
  rebase,
  refusal,
  squash,
  toJson,
  unpack,
  ValueCache,
  type Workbook,
  type WorkbookJson,
} from '@/lib/workbook'
import { createEngine } from '@/lib/workbook/engine'

vi.setConfig({ testTimeout: 120_000 })

const toSi: Operation = { kind: 'convert-units', system: 'si' }
const toUs: Operation = { kind: 'convert-units', system: 'us' }

const houses: Readonly<Record<FrameType, Readonly<Record<string, string | number>>>> = {
  gable: { knee_wall_height: 2, overhang: 0.7, bay_count: 3 },
  hoop: { frame_width: 21.3, ridge_height: 17.1, eave_height: 5.5 },
  gothic: { frame_width: 20, ridge_height: 20.1, eave_height: 6 },
  'lean-to': { frame_width: 11.9, ridge_height: 13, front_wall_tilt: 75 },
  'single-slope': { frame_width: 13, ridge_height: 15, front_wall_tilt: 60, overhang: 0.5 },
}

function house(type: FrameType, system: 'us' | 'si' = 'us'): Workbook {
  const built = buildWorkbook({
    system,
    inputs: { frame_type: type, ...(system === 'us' ? houses[type] : {}) },
  })
  if (!built.ok) throw new Error(built.failure.text)
  return built.value
}

/** Every named value before and after a conversion, by one engine. */
function values(workbook: Workbook, conversion: Operation) {
  const engine = createEngine(workbook)
  const all = () => new Map([...workbook.names.keys()].map((name) => [name, engine.named(name) ?? []]))
  const before = all()
  engine.apply([conversion])
  const after = all()
  engine.destroy()
  return { before, after }
}

const isMoney = (quantity: Quantity) => quantity.startsWith('money')

describe('the seeded workbook in the other units', () => {
  test.each(frameTypes)('[W33] %s: every named value agrees, there and back', (type) => {
    const workbook = house(type)
    const before = toJson(workbook)
    const { before: us, after: si } = values(workbook, toSi)
    const converted = applyOperation(workbook, toSi)
    if (!converted.ok) throw new Error(converted.failure.text)
    expect(workbook.system).toBe('si')
    expect(si.get('unit_system')).toEqual(['si'])
    expect(apart(workbook, us, si)).toEqual([])
    // Back by an operation of its own, and by the inverse.
    const there = toJson(workbook)
    expect(applyOperation(workbook, toUs)).toMatchObject({ ok: true })
    expect(toJson(workbook)).toEqual(before)
    const again = fromJson(there)
    for (const back of converted.value.inverse) {
      expect(applyOperation(again, operationSchema.parse(back))).toMatchObject({ ok: true })
    }
    expect(toJson(again)).toEqual(before)
  })

  test('[W33] a house that was begun in metres converts to feet and back', () => {
    const workbook = house('gable', 'si')
    const before = toJson(workbook)
    const { before: si, after: us } = values(workbook, toUs)
    expect(apart(workbook, us, si)).toEqual([])
    expect(applyOperation(workbook, toUs)).toMatchObject({ ok: true })
    expect(applyOperation(workbook, toSi)).toMatchObject({ ok: true })
    expect(toJson(workbook)).toEqual(before)
  })

  test('[E11] engine and values cache follow: what changed is all that differs from an engine made anew', () => {
    const workbook = house('gable')
    const engine = createEngine(workbook)
    const cache = new ValueCache()
    cache.applyPacked(engine.all())
    applyOperation(workbook, toSi)
    cache.follow(toSi)
    cache.applyPacked(engine.apply([toSi]))
    const fresh = createEngine(workbook)
    let cells = 0
    unpack(fresh.all(), (address, value) => {
      cells += 1
      expect(cache.get(address)).toEqual(value)
    })
    expect(cells).toBeGreaterThan(3000)
    engine.destroy()
    fresh.destroy()
  })
})

/** Named values that do not agree: 1e-9 of the value (and of 1), a cent in 100 where money is rounded to it. */
function apart(
  workbook: Workbook,
  us: ReadonlyMap<string, readonly CellValue[]>,
  si: ReadonlyMap<string, readonly CellValue[]>,
): string[] {
  const found: string[] = []
  let compared = 0
  for (const { name, area, quantity, role } of workbook.names.values()) {
    if (name === 'unit_system') continue
    us.get(name)?.forEach((value, index) => {
      const cell = workbook.sheets.find(({ id }) => id === area.sheet)?.rows[
        area.row + Math.floor(index / area.columnCount)
      ]?.[area.column + (index % area.columnCount)]
      const kind = role === 'table' ? (cell?.format?.quantity ?? 'text') : quantity
      const there = si.get(name)?.[index] ?? null
      if (typeof value === 'number' && typeof there === 'number') {
        compared += 1
        const expected = convert(value, kind, 'us', 'si') * (factors[name] ?? 1)
        const tolerance = isMoney(kind) ? 1e-4 : 1e-9
        if (Math.abs(expected - there) > tolerance * Math.max(1, Math.abs(expected))) {
          found.push(`${name} ${index}: ${value} as ${expected}, found ${there}`)
        }
      } else if (
        !(isCellError(value) && there !== null && isCellError(there)) &&
        value !== there &&
        typeof value !== 'string'
      ) {
        found.push(`${name} ${index}: ${JSON.stringify(value)}, found ${JSON.stringify(there)}`)
      }
    })
  }
  expect(compared).toBeGreaterThan(500)
  return found
}

/** Square foot and International Table Btu, exact (NIST SP 811). */
const foot2 = 0.3048 ** 2
const btu = 1055.05585262

/** Bare numbers whose unit follows the system, and how many of the one are of the other. */
const factors: Readonly<Record<string, number>> = {
  energy_per_heat: 1e-3 / 1e-5,
  energy_per_irradiation: 1 / 1e-5,
  gain_factor: 1 / 1e-5,
  hours_of_capacity: 1000,
  small_lengths: 1000 / 12,
  megajoules_per_irradiation: 3.6 / (btu / foot2 / 1e6),
  light_per_irradiation: 3.6 / (btu / foot2 / 1e6),
  day_degree_hours: 5 / 9,
  night_degree_hours: 5 / 9,
  sun_through: btu / 3.6e6,
  sun_beam_on_area: btu / 3.6e6,
  sun_diffuse_on_area: btu / 3.6e6,
  pressure_of_mass: 9.80665e-3,
}

const small: WorkbookJson = {
  version: 1,
  system: 'us',
  sheets: [
    {
      id: 'frame',
      name: 'Frame',
      kind: 'step',
      rowCount: 9,
      columns: [{}, { quantity: 'length' }, {}],
      cells: [
        [0, 0, { input: 'us' }],
        [1, 0, { input: 24.1, format: { quantity: 'temperature' } }],
        [1, 1, { input: 24.1 }],
        [1, 2, { input: 24.1 }],
        [2, 1, { input: '=B2*2' }],
        [3, 1, { input: 3, format: { quantity: 'money' } }],
        [4, 1, { input: "'24" }],
      ],
    },
    {
      id: 'table',
      name: 'Table',
      kind: 'table',
      lock: 'pinned',
      rowCount: 3,
      columns: [{ quantity: 'area' }],
      cells: [[1, 0, { input: 1 / 3 }]],
    },
  ],
  names: [
    {
      name: 'unit_system',
      area: { sheet: 'frame', row: 0, column: 0, rowCount: 1, columnCount: 1 },
      quantity: 'text',
      role: 'constant',
    },
  ],
}
const at = (workbook: Workbook, row: number, column: number, sheet = 0) =>
  workbook.sheets[sheet]?.rows[row]?.[column]?.input

describe('converting', () => {
  test('[W33] numbers by their format, else their column; formulas, texts, money and bare numbers stay', () => {
    const workbook = fromJson(small)
    const applied = applyOperation(workbook, toSi)
    expect(at(workbook, 0, 0)).toBe('si')
    expect(at(workbook, 1, 0)).toBeCloseTo(-4.3888888889, 9)
    expect(at(workbook, 1, 1)).toBe(7.34568)
    expect(at(workbook, 1, 2)).toBe(24.1)
    expect(at(workbook, 2, 1)).toBe('=B2*2')
    expect(at(workbook, 3, 1)).toBe(3)
    expect(at(workbook, 4, 1)).toBe("'24")
    expect(at(workbook, 1, 0, 1)).toBeCloseTo(0.09290304 / 3, 15)
    expect(applied.ok && applied.value.touched).toHaveLength(4)
  })

  test('[W33] to what it is already is refused, and so is what would be too large', () => {
    const workbook = fromJson(small)
    expect(applyOperation(workbook, toUs)).toMatchObject({ ok: false, failure: { code: 'invalid' } })
    applyOperation(workbook, toSi)
    applyOperation(workbook, set(1, 1, 1e308))
    const state = toJson(workbook)
    expect(applyOperation(workbook, toUs)).toMatchObject({
      ok: false,
      failure: { code: 'limit', text: expect.stringContaining('Frame B2') },
    })
    expect(toJson(workbook)).toEqual(state)
  })

  test('[W33] the inverse restores every number to the last bit, whatever it is', () => {
    const kinds = quantities.filter((kind) => kind !== 'text')
    let helped = 0
    fc.assert(
      fc.property(
        fc.array(fc.tuple(fc.double({ noNaN: true, min: -1e290, max: 1e290 }), fc.constantFrom(...kinds)), {
          minLength: 1,
          maxLength: 30,
        }),
        fc.constantFrom('us' as const, 'si' as const),
        (list, system) => {
          const json: WorkbookJson = {
            ...small,
            system,
            names: [],
            sheets: small.sheets.slice(0, 1).map((sheet) => ({
              ...sheet,
              rowCount: 40,
              cells: list.map(([input, quantity], row) => [
                row,
                0,
                { input: input + 0, format: { quantity } },
              ]),
            })),
          }
          const workbook = fromJson(json)
          const before = toJson(workbook)
          const applied = applyOperation(workbook, system === 'us' ? toSi : toUs)
          if (!applied.ok) throw new Error(applied.failure.text)
          const [inverse] = applied.value.inverse
          if (inverse?.kind === 'convert-units' && inverse.exact) helped += 1
          expect(applyAll(workbook, applied.value.inverse)).toMatchObject({ ok: true })
          expect(toJson(workbook)).toEqual(before)
        },
      ),
      { numRuns: 400 },
    )
    expect(helped).toBeGreaterThan(20)
  })

  test('[W34] what was typed with few digits comes back by converting alone', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: -9_999_999, max: 9_999_999 }),
        fc.integer({ min: 0, max: 6 }),
        fc.constantFrom(...quantities.filter((kind) => kind !== 'text' && kind !== 'temperature')),
        (digits, places, quantity) => {
          const typed = Number(`${digits}e-${places}`)
          const workbook = fromJson({
            ...small,
            names: [],
            sheets: small.sheets.slice(0, 1).map((sheet) => ({
              ...sheet,
              cells: [[0, 0, { input: typed + 0, format: { quantity } }]],
            })),
          })
          applyOperation(workbook, toSi)
          applyOperation(workbook, toUs)
          expect(at(workbook, 0, 0)).toBe(typed + 0)
        },
      ),
      { numRuns: 3000 },
    )
  })

  test('[W33] a number that does not mean the same is not taken for the one that stood there', () => {
    const workbook = fromJson(small)
    const exact = [
      { sheet: 'frame', row: 1, column: 1, value: 7.5 },
      { sheet: 'frame', row: 2, column: 1, value: 9 },
      { sheet: 'table', row: 1, column: 0, value: 99 },
      { sheet: 'none', row: 0, column: 0, value: 1 },
    ]
    applyOperation(workbook, { kind: 'convert-units', system: 'si', exact })
    expect(at(workbook, 1, 1)).toBe(7.34568)
    expect(at(workbook, 2, 1)).toBe('=B2*2')
    expect(at(workbook, 1, 0, 1)).toBeLessThan(1)
  })

  test('[W33] a cell that said something else about the units is restored too', () => {
    const workbook = fromJson(small)
    applyOperation(workbook, set(0, 0, 'metric'))
    const before = toJson(workbook)
    const applied = applyOperation(workbook, toSi)
    if (!applied.ok) throw new Error(applied.failure.text)
    expect(at(workbook, 0, 0)).toBe('si')
    applyAll(workbook, applied.value.inverse)
    expect(toJson(workbook)).toEqual(before)
  })

  test.each([
    ['estimator', true],
    ['manager', true],
    ['owner', true],
    ['viewer', false],
  ] as const)('[W36 W18] %s with a locked sheet: %s', (role, may) => {
    expect(refusal(fromJson(small), toSi, role) === undefined).toBe(may)
  })
})

const set = (row: number, column: number, input: string | number, system?: 'us' | 'si'): Operation => ({
  kind: 'set-cells',
  sheet: 'frame',
  cells: [{ row, column, input }],
  ...(system ? { system } : {}),
})
const insert: Operation = { kind: 'insert-lines', sheet: 'frame', axis: 'row', at: 1, count: 2 }

describe('edits that meet a conversion', () => {
  test.each<[string, Operation[], Operation[], Operation[]]>([
    ['a number keeps the system that it was typed in', [set(1, 1, 10)], [toSi], [set(1, 1, 10, 'us')]],
    ['a formula stays', [set(1, 1, '=B3')], [toSi], [set(1, 1, '=B3')]],
    ['so does a text', [set(1, 1, 'ten')], [toSi], [set(1, 1, 'ten')]],
    ['converted twice, it is still in the first', [set(1, 1, 10)], [toSi, toUs], [set(1, 1, 10, 'us')]],
    ['two conversions at once are one', [toSi], [toSi], []],
    ['what is typed after one’s own is in the new system', [toSi, set(1, 1, 3)], [toSi], [set(1, 1, 3)]],
    ['one’s own conversion after another’s edit stays', [toSi], [set(1, 1, 10)], [toSi]],
    ['lines and a conversion', [insert, set(3, 1, 10)], [toSi], [insert, set(3, 1, 10, 'us')]],
    [
      'numbers to bring back follow their lines',
      [{ ...toSi, exact: [{ sheet: 'frame', row: 1, column: 1, value: 7 }] }],
      [insert],
      [{ ...toSi, exact: [{ sheet: 'frame', row: 3, column: 1, value: 7 }] }],
    ],
    [
      'and go with their sheet',
      [{ ...toSi, exact: [{ sheet: 'frame', row: 1, column: 1, value: 7 }] }],
      [{ kind: 'remove-sheet', sheet: 'frame' }],
      [toSi],
    ],
  ])('[W37] %s', (_, pending, over, expected) => {
    const rebased = rebase(small.sheets, pending, over)
    expect(rebased.operations).toEqual(expected)
    expect(rebased.dropped).toEqual([])
  })

  test('[W35] such a number is converted by the quantity of its cell', () => {
    const workbook = fromJson(small)
    applyOperation(workbook, toSi)
    const before = toJson(workbook)
    const cells = [
      { row: 1, column: 1, input: 10 },
      { row: 1, column: 2, input: 10 },
      { row: 5, column: 2, input: 10, format: { quantity: 'area' as const } },
      { row: 6, column: 1, input: 10, format: null },
    ]
    const applied = applyOperation(workbook, { kind: 'set-cells', sheet: 'frame', cells, system: 'us' })
    if (!applied.ok) throw new Error(applied.failure.text)
    expect(at(workbook, 1, 1)).toBe(3.048)
    expect(at(workbook, 1, 2)).toBe(10)
    expect(at(workbook, 5, 2)).toBe(0.9290304)
    expect(at(workbook, 6, 1)).toBe(3.048)
    applyAll(workbook, applied.value.inverse)
    expect(toJson(workbook)).toEqual(before)
  })

  test('[W37] edit, then convert, is convert, then the rebased edit', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 0, max: 8 }),
        fc.integer({ min: 0, max: 2 }),
        fc.double({ min: -1e6, max: 1e6, noNaN: true }),
        (row, column, input) => {
          const mine = set(row, column, input + 0)
          const here = fromJson(small)
          applyAll(here, [mine, toSi])
          const there = fromJson(small)
          applyAll(there, [toSi, ...rebase(small.sheets, [mine], [toSi]).operations])
          expect(toJson(there)).toEqual(toJson(here))
        },
      ),
    )
  })

  test('[W10] edits written in another system are not made one', () => {
    expect(squash(set(1, 1, 1, 'us'), set(1, 2, 2))).toBeUndefined()
    expect(squash(set(1, 1, 1, 'us'), set(1, 1, 2, 'us'))).toBeUndefined()
    expect(squash(set(1, 1, 1), set(1, 1, 2))).toEqual(set(1, 1, 2))
  })
})
