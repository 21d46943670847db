import { describe, expect, test } from 'vitest'
import { coveringRows } from '@/lib/estimate/tables/coverings'

const btu = 5.678263341

/** U in Btu/(h·ft²·°F) as [lowest, highest] that the source gives, and how much the table may differ from it. */
const published: readonly [string, string, number, number, number, string, string][] = [
  ['SU2', 'FILM-2', 0.6, 0.7, 0.03, 'Extension Foundation, farm energy course 2.6', 'read'],
  ['SU3', 'GLASS-1', 1.1, 1.13, 0.03, 'ASABE EP406 / ASHRAE HVAC Applications', 'from memory'],
  ['SU5', 'GLASS-2', 0.65, 0.65, 0.03, 'ASHRAE table', 'from memory'],
  ['SU6', 'FILM-1', 1.2, 1.2, 0.03, 'ASHRAE table', 'from memory'],
  ['SU7', 'FILM-2', 0.7, 0.7, 0.03, 'ASHRAE / EP406', 'from memory'],
  ['SU8', 'FILM-2-IR', 0.5, 0.5, 0.03, 'ASHRAE table', 'from memory'],
  ['SU10', 'PC-TWIN-4', 0.72, 0.72, 0.03, 'trade data sheets, ASTM C976 column', 'read'],
  ['SU10', 'PC-TWIN-6', 0.62, 0.62, 0.03, 'trade data sheets, ASTM C976 column', 'read'],
  ['SU10', 'PC-TWIN-8', 0.6, 0.6, 0.03, 'trade data sheets, ASTM C976 column', 'read'],
  ['SU10', 'PC-TWIN-10', 0.56, 0.56, 0.03, 'trade data sheets, ASTM C976 column', 'read'],
  ['SU10', 'PC-TRIPLE-16', 0.42, 0.42, 0.03, 'trade data sheets, ASTM C976 column', 'read'],
]

/** R in h·ft²·°F/Btu that people who build work with: common practice, no source. */
const practice: readonly [string, number, number][] = [
  ['FILM-1', 0.75, 0.85],
  ['PC-CORR', 0.85, 0.95],
  ['PC-TWIN-3', 0.95, 1.05],
  ['PC-TWIN-6', 1.45, 1.65],
  ['PC-TRIPLE-16', 2.4, 2.5],
]

const light: readonly [string, string, number, string][] = [
  ['SU31', 'GLASS-1', 0.88, 'growers’ manufacturers’ association FAQ (read)'],
  ['SU31', 'GLASS-2', 0.77, 'growers’ manufacturers’ association FAQ (read)'],
  ['SU33', 'PC-TWIN-4', 0.82, 'trade data sheets (read)'],
  ['SU33', 'PC-TWIN-6', 0.8, 'trade data sheets (read)'],
  ['SU33', 'PC-TRIPLE-8', 0.72, 'trade data sheets (read)'],
  ['SU33', 'PC-TRIPLE-16', 0.73, 'trade data sheets (read)'],
]

/** SP8: minimum cold-bend radius in mm. SP9: weight in kg/m². Both: trade data sheets (read). */
const handling: readonly [string, number, number][] = [
  ['PC-TWIN-4', 750, 0.8],
  ['PC-TWIN-6', 1000, 1.3],
  ['PC-TWIN-8', 1250, 1.5],
  ['PC-TWIN-10', 1500, 1.7],
]

function property(code: string, column: string): number {
  const cell = coveringRows.find((row) => row.code === code)?.[column]
  if (typeof cell === 'number') return cell
  if (typeof cell === 'object' && 'in' in cell) return cell.value
  throw new Error(`${code} has no ${column}`)
}

describe('coverings against published values', () => {
  test.each(published)('%s %s: U from %d to %d', (_, code, low, high, tolerance) => {
    const u = 1 / property(code, 'resistance')
    expect(u).toBeGreaterThanOrEqual(low * (1 - tolerance))
    expect(u).toBeLessThanOrEqual(high * (1 + tolerance))
  })
  test.each(practice)('%s: R from %d to %d (common practice, no source)', (code, low, high) => {
    expect(property(code, 'resistance')).toBeGreaterThanOrEqual(low)
    expect(property(code, 'resistance')).toBeLessThanOrEqual(high)
  })
  test.each(light)('%s %s lets %d of the light through: %s', (_, code, wanted) => {
    expect(property(code, 'light transmittance')).toBeCloseTo(wanted, 6)
  })
  test.each(handling)('SP8, SP9 %s bends to %d mm and weighs %d kg/m²', (code, radius, weight) => {
    expect(property(code, 'minimum bend radius')).toBe(radius)
    expect(property(code, 'weight')).toBe(weight)
  })
  test('SU1: every single layer lies from 1.0 to 1.2 Btu/(h·ft²·°F), 5.7 to 6.8 W/(m²·K) (Extension Foundation; read)', () => {
    for (const code of ['FILM-1', 'GLASS-1', 'PC-CORR', 'ACRYL-1', 'FILM-1-IR']) {
      const u = 1 / property(code, 'resistance')
      expect(u).toBeGreaterThan(0.97)
      expect(u).toBeLessThan(1.24)
      expect(u * btu).toBeLessThan(7.1)
    }
  })
  test('every row has a source beside its properties and its price', () => {
    for (const row of coveringRows) {
      expect(row['source of the properties']).toMatch(/\w/)
      expect(row['source of the price']).toBe('invented (demo)')
    }
  })
})
