import fc from 'fast-check'
import { describe, expect, test, vi } from 'vitest'
import { fromJson, type PackedChanges, unpack } from '@/lib/workbook'
import { createEngine } from '@/lib/workbook/engine'
import { operation, setCellsOperation, workbook } from '../arbitrary'

vi.setConfig({ testTimeout: 60_000 })

function shown(packed: PackedChanges): Record<string, unknown> {
  const values: Record<string, unknown> = {}
  unpack(packed, ({ sheet, row, column }, value) => {
    values[`${sheet} ${row} ${column}`] = value
  })
  return values
}

describe('trying one after another', () => {
  test('[E11] each is as if it were tried alone, and the workbook is left as it was', () => {
    const names = ['width', 'rate']
    const lists = fc.array(
      fc.oneof(fc.array(setCellsOperation, { maxLength: 3 }), fc.array(operation, { maxLength: 3 })),
      { minLength: 1, maxLength: 5 },
    )
    fc.assert(
      fc.property(workbook, lists, fc.nat(5), (json, tries, between) => {
        const one = createEngine(fromJson(json))
        const other = createEngine(fromJson(json))
        const before = shown(one.all())
        for (const [index, list] of tries.entries()) {
          expect(one.tryNext(list, names)).toEqual(other.tryOut(list, names))
          if (index === between) expect(one.named('width')).toEqual(other.named('width'))
        }
        expect(shown(one.all())).toEqual(before)
        const change = tries[0] ?? []
        one.tryNext(tries.at(-1) ?? [], names)
        expect(shown(one.apply(change))).toEqual(shown(other.apply(change)))
        one.destroy()
        other.destroy()
      }),
      { numRuns: 40 },
    )
  })
})
