import fc from 'fast-check'
import { describe, expect, test, vi } from 'vitest'
import { buildWorkbook } from '@/lib/estimate'
import { type CellValue, type Evaluate, solveFor } from '@/lib/workbook'
import { createEngine } from '@/lib/workbook/engine'

vi.setConfig({ testTimeout: 60_000 })

const of =
  (f: (x: number) => CellValue): Evaluate =>
  (x) =>
    Promise.resolve(f(x))

describe('solving for one input', () => {
  test.each<[string, (x: number) => number, number, number, number]>([
    ['a line', (x) => 3 * x + 1, 2, 100, 33],
    ['downwards', (x) => 50 - 4 * x, 1, 10, 10],
    ['a square root of 2', (x) => x * x, 1, 2, Math.SQRT2],
    ['cube, from 0', (x) => x ** 3, 0, -27, -3],
    ['exponential', Math.exp, 0, 1e6, Math.log(1e6)],
    ['cosine', Math.cos, 1, 0, Math.PI / 2],
    ['Kepler', (x) => x - 0.9 * Math.sin(x), 0.1, 1, 1.8620869],
    ['a flat cubic root', (x) => (x - 1.5) ** 9, 4, 0, 1.5],
    ['steep at the end', (x) => 1 / (10 - Math.min(x, 9.999999)), 1, 100, 9.99],
    ['far away', (x) => x, 1, 1e6, 1e6],
  ])('[V1] %s', async (name, f, from, target, expected) => {
    let asked = 0
    const solved = await solveFor(
      of((x) => {
        asked += 1
        return f(x)
      }),
      { from, target, tolerance: 1e-10 * Math.max(1, Math.abs(target)) },
    )
    if (!solved.ok) throw new Error(solved.failure.text)
    expect(Math.abs(solved.value.input - expected)).toBeLessThan(
      (name === 'a flat cubic root' ? 0.1 : 1e-6) * Math.max(1, expected),
    )
    expect(solved.value.iterations).toBe(asked)
    expect(asked).toBeLessThan(80)
  })

  test('[V1] any rising or falling line or curve is solved to its tolerance, within few more steps than halving', async () => {
    await fc.assert(
      fc.asyncProperty(
        fc.double({ min: 0.01, max: 100, noNaN: true }),
        fc.double({ min: -500, max: 500, noNaN: true }),
        fc.constantFrom(1, 3, 5),
        fc.boolean(),
        async (slope, root, power, falls) => {
          const f = (x: number) =>
            (falls ? -1 : 1) * slope * Math.sign(x - root) * Math.abs(x - root) ** power
          const solved = await solveFor(of(f), { from: 20, target: 0, tolerance: 1e-7 })
          if (!solved.ok) throw new Error(solved.failure.text)
          expect(Math.abs(f(solved.value.input))).toBeLessThanOrEqual(1e-7)
          expect(solved.value.iterations).toBeLessThan(110)
        },
      ),
      { numRuns: 300 },
    )
  })

  test('[V1] nothing outside of the limits is computed', async () => {
    const asked: number[] = []
    const solved = await solveFor(
      of((x) => {
        asked.push(x)
        return x * x
      }),
      { from: 3, low: 1, high: 9, target: 80, tolerance: 1e-9 },
    )
    expect(solved).toMatchObject({ ok: true, value: { input: expect.closeTo(Math.sqrt(80), 9) } })
    expect(Math.min(...asked)).toBeGreaterThanOrEqual(1)
    expect(Math.max(...asked)).toBeLessThanOrEqual(9)
  })

  test('[V1] the present value, when it does already', async () => {
    expect(
      await solveFor(
        of((x) => x),
        { from: 5, target: 5.004, tolerance: 0.005 },
      ),
    ).toEqual({
      ok: true,
      value: { input: 5, iterations: 1 },
    })
  })

  test('[V3] an answer beside what is no number is found', async () => {
    const f = (x: number): CellValue =>
      x < 7.9 ? { error: '#NUM!', text: 'The ridge is below the eave.' } : x
    const solved = await solveFor(of(f), { from: 14, target: 7.95, tolerance: 1e-9 })
    expect(solved).toMatchObject({ ok: true, value: { input: expect.closeTo(7.95, 8) } })
  })

  const stay = { from: 5, tolerance: 1e-6 }
  test.each<[string, (x: number) => CellValue, Partial<Parameters<typeof solveFor>[1]>, RegExp]>([
    [
      'an error',
      () => ({ error: '#N/A', text: 'No such covering.' }),
      { target: 1 },
      /no number to begin with: No such covering/,
    ],
    ['a text', () => 'in order', { target: 1 }, /no number to begin with: it is in order/],
    ['blank', () => null, { target: 1 }, /it is blank/],
    ['no effect', () => 12, { target: 1 }, /stays at 12 whatever/],
    [
      'limits',
      (x) => x,
      { target: 20, low: 0, high: 10 },
      /from 0 to 10 and does not reach 20 within the limits; the nearest is at 10/,
    ],
    ['no crossing', (x) => x * x + 1, { target: 0 }, /does not cross 0/],
    [
      'an edge',
      (x) => (x > 8 ? 'no house' : x),
      { target: 20, low: 0 },
      /within the limits.*no number: it is no house/,
    ],
    ['a jump', (x) => Math.ceil(x) * 10, { target: 75 }, /jumps over 75 near 7: from 70 to 80/],
    [
      'a hole',
      (x) => (Math.abs(x - 6) < 0.15 ? 'a hole' : x),
      { target: 6 },
      /the result is no number: it is a hole/,
    ],
    ['outside', (x) => x, { target: 6, low: 6, high: 9 }, /present value, 5, is outside/],
    ['no number', (x) => x, { target: Number.NaN }, /Expected numbers/],
  ])('[V2] %s is said', async (_, f, change, text) => {
    const solved = await solveFor(of(f), { ...stay, target: 0, ...change })
    expect(solved).toMatchObject({ ok: false, failure: { text: expect.stringMatching(text) } })
  })

  test('[V2] what was given up is said', async () => {
    const solved = await solveFor(() => Promise.reject(new Error('Stopped.')), { ...stay, target: 1 })
    expect(solved).toMatchObject({ ok: false, failure: { code: 'unavailable', text: 'Stopped.' } })
  })
})

describe('solving on the seeded workbook', () => {
  test.each([
    ['frame_length', 61, 'quotation_total', 0.005],
    ['markup_rate', 0.41, 'quotation_total', 0.005],
    ['inside_night_temperature', 41, 'design_heat_loss', 1e-6],
    ['outside_design_temperature', -12, 'design_heat_loss', 1e-6],
    ['ridge_height', 15.25, 'roof_area', 1e-9],
    ['heater_efficiency', 0.7, 'annual_fuel_cost', 0.005],
  ])('[V1] %s: what %f gives as %s is found again', async (input, wanted, result, tolerance) => {
    const built = buildWorkbook({ system: 'us' })
    if (!built.ok) throw new Error(built.failure.text)
    const engine = createEngine(built.value)
    const area = built.value.names.get(input)?.area
    if (!area) throw new Error(`no ${input}`)
    const evaluate: Evaluate = (value) => {
      const cells = [{ row: area.row, column: area.column, input: value }]
      const tried = engine.tryOut([{ kind: 'set-cells', sheet: area.sheet, cells }], [result])
      return Promise.resolve(tried[result]?.[0] ?? null)
    }
    const from = Number(engine.named(input)?.[0])
    const target = Number(await evaluate(wanted))
    expect(Math.abs(target - Number(engine.named(result)?.[0]))).toBeGreaterThan(1)
    const solved = await solveFor(evaluate, { from, target, tolerance })
    if (!solved.ok) throw new Error(solved.failure.text)
    expect(Math.abs(Number(await evaluate(solved.value.input)) - target)).toBeLessThanOrEqual(tolerance)
    expect(solved.value.iterations).toBeLessThan(40)
    engine.destroy()
  })
})
