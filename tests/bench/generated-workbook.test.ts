import { describe, expect, test } from 'vitest'
import { isFormula, toJson } from '@/lib/workbook'
import { generatedSizes, generateWorkbook } from './generated-workbook'

describe('the generated workbook', () => {
  test('is the same each time, and another with another seed', () => {
    const text = (seed: number) => JSON.stringify(toJson(generateWorkbook(5_000, seed).workbook))
    expect(text(1)).toBe(text(1))
    expect(text(1)).not.toBe(text(2))
  })

  test.each(generatedSizes)('of %d cells has about as many, and its edits are of numbers', (size) => {
    const { workbook, cells, edits } = generateWorkbook(size)
    expect(Math.abs(cells - size)).toBeLessThan(size / 100)
    for (const { place, result } of Object.values(edits)) {
      const input = ({ sheet, row, column }: typeof place) =>
        workbook.sheets.find(({ id }) => id === sheet)?.rows[row]?.[column]?.input
      expect(input(place)).toBeTypeOf('number')
      expect(isFormula(input(result))).toBe(true)
    }
  })

  test('holds 50 to 65 % formulas in its take-off sheets', () => {
    const { workbook } = generateWorkbook(20_000)
    const inputs = workbook.sheets
      .filter(({ id }) => id.startsWith('bench-lines-'))
      .flatMap(({ rows }) => rows.flatMap((row) => row?.map((cell) => cell?.input) ?? []))
    const share = inputs.filter(isFormula).length / inputs.length
    expect(share).toBeGreaterThan(0.5)
    expect(share).toBeLessThan(0.65)
  })
})
