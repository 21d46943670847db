import fc from 'fast-check'
import { describe, expect, test, vi } from 'vitest'
import { applyAll, applyOperation, fromJson, operationSchema, toJson } from '@/lib/workbook'
import { operation, workbook } from './arbitrary'

// Laws run many cases, on machines that do other work too.
vi.setConfig({ testTimeout: 60_000 })

describe('laws of operations', () => {
  test('[W2 W4 W12 W16] an operation and then its inverse restore the workbook exactly', () => {
    fc.assert(
      fc.property(workbook, fc.array(operation, { maxLength: 4 }), operation, (json, before, last) => {
        const book = fromJson(json)
        for (const each of before) applyOperation(book, each)
        const state = toJson(book)
        const applied = applyOperation(book, last)
        if (!applied.ok) {
          expect(toJson(book)).toEqual(state)
          return
        }
        for (const back of applied.value.inverse) {
          operationSchema.parse(back)
          expect(applyOperation(book, back)).toMatchObject({ ok: true })
        }
        expect(toJson(book)).toEqual(state)
      }),
      { numRuns: 1500 },
    )
  })

  test('[W12] a list is applied whole or not at all, and its inverse restores', () => {
    let refused = 0
    let whole = 0
    fc.assert(
      fc.property(workbook, fc.array(operation, { minLength: 2, maxLength: 7 }), (json, list) => {
        const book = fromJson(json)
        const state = toJson(book)
        const applied = applyAll(book, list)
        if (applied.ok) {
          whole += 1
          expect(applyAll(book, applied.value.inverse)).toMatchObject({ ok: true })
        } else refused += 1
        expect(toJson(book)).toEqual(state)
      }),
      { numRuns: 800 },
    )
    expect(refused).toBeGreaterThan(50)
    expect(whole).toBeGreaterThan(50)
  })

  test('[W7] touched lists exactly the cells whose input text changed, by their new address', () => {
    fc.assert(
      fc.property(workbook, operation, (json, each) => {
        const book = fromJson(json)
        if (each.kind === 'add-sheet' || each.kind === 'set-cells' || each.kind === 'convert-units') return
        const before = new Set(inputs(book))
        const applied = applyOperation(book, each)
        if (!applied.ok) return
        for (const { sheet, row, column } of applied.value.touched) {
          const input = book.sheets.find(({ id }) => id === sheet)?.rows[row]?.[column]?.input
          expect(typeof input).toBe('string')
        }
        const after = inputs(book).filter((text) => !before.has(text))
        expect(after.length).toBeLessThanOrEqual(applied.value.touched.length)
      }),
    )
  })

  test('[W10] the workbook as JSON and back is the same workbook', () => {
    fc.assert(
      fc.property(workbook, fc.array(operation, { maxLength: 5 }), (json, list) => {
        const book = fromJson(json)
        for (const each of list) applyOperation(book, each)
        const state = toJson(book)
        expect(toJson(fromJson(JSON.parse(JSON.stringify(state))))).toEqual(state)
      }),
    )
  })
})

function inputs(book: Parameters<typeof toJson>[0]): string[] {
  return toJson(book).sheets.flatMap((sheet) => sheet.cells.map(([, , cell]) => String(cell.input)))
}
