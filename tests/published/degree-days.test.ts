import { readFileSync } from 'node:fs'
import { join } from 'node:path'
import { afterAll, describe, expect, test, vi } from 'vitest'
import { openLive } from '../lib/estimate/compute'

vi.setConfig({ testTimeout: 120_000 })

const si = openLive({ system: 'si' })
afterAll(() => si.close())

const january = 0
const days = [31, 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31]
const byHitchin = (base: number, means: readonly number[]): readonly number[] => {
  si.set({ degree_day_base: base, monthly_mean_temperature: means })
  return si.numbersOf('month_hitchin_degree_days')
}
const months = (mean: (month: number) => number): number[] => days.map((_, month) => mean(month))

describe('degree-days by Hitchin’s formula, k 0.71', () => {
  /** January and November have the days that the rows ask for. */
  test.each([
    [6, january, 294.85],
    [12, 10, 114.54],
    [15.5, 10, 42.25],
    [18, january, 15.82],
  ])(
    'SF9: mean %d °C against 15.5 °C in month %d: %d K·day (CIBSE TM41, from memory; computed)',
    (mean, month, expected) => {
      expect(
        Math.abs(
          (byHitchin(
            15.5,
            months(() => mean),
          )[month] ?? 0) - expected,
        ),
      ).toBeLessThanOrEqual(0.01)
    },
  )

  test('SF10, SF11: from degree-days to 15.5 °C to those to 18.5 and 10 °C (standard degree-days for the UK; read)', () => {
    const printed = [
      { month: 0, at: 395, high: 488, low: 226, highBy: 1, lowBy: 1 },
      { month: 1, at: 342, high: 426, low: 189, highBy: 426 * 0.03, lowBy: 189 * 0.15 },
      { month: 2, at: 297, high: 390, low: 134, highBy: 390 * 0.03, lowBy: 134 * 0.15 },
      { month: 5, at: 77, high: 148, low: 9, highBy: 148 * 0.03, lowBy: 2 },
      { month: 8, at: 83, high: 162, low: 10, highBy: 162 * 0.03, lowBy: 2 },
    ]
    // The mean that gives the printed degree-days, every month at once, by halving.
    const [low, high] = [months(() => -40), months(() => 40)]
    const middle = () => months((month) => ((low[month] ?? 0) + (high[month] ?? 0)) / 2)
    for (let step = 0; step < 30; step += 1) {
      const means = middle()
      const found = byHitchin(15.5, means)
      for (const { month, at } of printed) {
        const side = (found[month] ?? 0) > at ? low : high
        side[month] = means[month] ?? 0
      }
    }
    const means = middle()
    expect(Math.abs((means[january] ?? 0) - 2.76)).toBeLessThanOrEqual(0.01)
    const [upper, lower] = [byHitchin(18.5, means), byHitchin(10, means)]
    for (const one of printed) {
      expect(Math.abs((upper[one.month] ?? 0) - one.high), `18.5 °C, month ${one.month}`).toBeLessThanOrEqual(
        one.highBy,
      )
      expect(Math.abs((lower[one.month] ?? 0) - one.low), `10 °C, month ${one.month}`).toBeLessThanOrEqual(
        one.lowBy,
      )
    }
  })
})

interface Day {
  readonly year: string
  readonly month: number
  readonly mean: number
}

/** Daily weather of NOAA, in the data set `vega-datasets` 3.2.1: location, date, precipitation, highest, lowest, … */
const weather = readFileSync(
  join(import.meta.dirname, '../../node_modules/vega-datasets/data/weather.csv'),
  'utf8',
)
  .trim()
  .split('\n')
  .slice(1)
  .map((line) => line.split(','))
const daysOf = (city: string): Day[] =>
  weather
    .filter(([location]) => location === city)
    .map(([, date = '', , highest, lowest]) => ({
      year: date.slice(0, 4),
      month: Number(date.slice(5, 7)) - 1,
      mean: (Number(highest) + Number(lowest)) / 2,
    }))
const below = (list: readonly Day[], base: number): number =>
  list.reduce((sum, { mean }) => sum + Math.max(0, base - mean), 0)

describe('degree-days from monthly means against the sum over the days of two cities', () => {
  const seattle = daysOf('Seattle')
  const newYork = daysOf('New York')

  test('SD1: the data are those that the values were computed from', () => {
    expect([seattle.length, newYork.length]).toEqual([1461, 1461])
    const years = ['2012', '2013', '2014', '2015']
    const sums = (base: number) =>
      years.map((year) =>
        below(
          seattle.filter((day) => day.year === year),
          base,
        ),
      )
    for (const [base, printed] of [
      [15.5, [1835.2, 1729.75, 1466.4, 1408.75]],
      [18.3, [2660.85, 2462.7, 2192.1, 2141.3]],
    ] as const) {
      sums(base).forEach((sum, year) => {
        expect(sum).toBeCloseTo(printed[year] ?? 0, 6)
      })
    }
  })

  /** Errors of both formulas at these bases stay under 6 % of the year; SF13 gives −3.3 to +3.2 % for Seattle. */
  test.each([
    ['Seattle', seattle, 15.5, 3.2, -3.3],
    ['Seattle', seattle, 18.3, 2.0, -2.6],
    ['New York', newYork, 15.5, undefined, undefined],
    ['New York', newYork, 18.3, undefined, undefined],
  ] as const)('SF13: %s to %4$d °C (NOAA days; computed)', (_, list, base, hitchin, erbs) => {
    const means = months((month) => {
      const own = list.filter((day) => day.month === month)
      return own.reduce((sum, { mean }) => sum + mean, 0) / own.length
    })
    si.set({ degree_day_base: base, monthly_mean_temperature: means })
    const daily = below(list, base) / 4
    const off = (name: string): number => (si.number(name) / daily - 1) * 100
    expect(Math.abs(off('hitchin_degree_days'))).toBeLessThanOrEqual(6)
    expect(Math.abs(off('heating_degree_days'))).toBeLessThanOrEqual(6)
    if (hitchin !== undefined) expect(Math.abs(off('hitchin_degree_days') - hitchin)).toBeLessThanOrEqual(0.2)
    if (erbs !== undefined) expect(Math.abs(off('heating_degree_days') - erbs)).toBeLessThanOrEqual(0.2)
  })
})
