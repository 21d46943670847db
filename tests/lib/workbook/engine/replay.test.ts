import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import {
  applyOperation,
  type CellValue,
  type Engine,
  fromJson,
  isCellError,
  ValueCache,
  type Workbook,
} from '@/lib/workbook'
import { createEngine } from '@/lib/workbook/engine'
import { operation, workbook } from '../arbitrary'

/** Values by address; of errors the code only, since a sentence may name another cell of the same circle. */
function values(engine: Engine, book: Workbook): Record<string, unknown> {
  const found: Record<string, unknown> = {}
  for (const sheet of book.sheets) {
    for (let row = 0; row < sheet.rowCount; row += 1) {
      for (let column = 0; column < sheet.columns.length; column += 1) {
        const value = engine.value({ sheet: sheet.id, row, column })
        if (value !== null) found[`${sheet.id} ${row} ${column}`] = plain(value)
      }
    }
  }
  return found
}

function plain(value: CellValue): unknown {
  return isCellError(value) ? value.error : value
}

function cached(cache: ValueCache): Record<string, unknown> {
  const found: Record<string, unknown> = {}
  cache.each(({ sheet, row, column }, value) => {
    found[`${sheet} ${row} ${column}`] = plain(value)
  })
  return found
}

describe('the live engine', () => {
  test('[E11] equals an engine built from the final model, and so does a cache fed by its change lists', () => {
    fc.assert(
      fc.property(
        workbook,
        fc.array(fc.array(operation, { minLength: 1, maxLength: 3 }), { minLength: 1, maxLength: 6 }),
        (json, batches) => {
          const book = fromJson(json)
          const live = createEngine(book)
          const cache = new ValueCache()
          cache.applyPacked(live.all())
          for (const batch of batches) {
            const done = batch.filter((each) => applyOperation(book, each).ok)
            const packed = live.apply(done)
            for (const each of done) cache.follow(each)
            cache.applyPacked(packed)
          }
          const fresh = createEngine(book)
          const expected = values(fresh, book)
          expect(values(live, book)).toEqual(expected)
          expect(cached(cache)).toEqual(expected)
          live.destroy()
          fresh.destroy()
        },
      ),
      { numRuns: 150 },
    )
  }, 60_000)
})
