import { describe, expect, it } from 'vitest'
import { differences, readTally, summary } from '@/app/(office)/workbooks/[workbookId]/_tally/figures'
import type { Quantity, UnitSystem } from '@/lib/units'
import type { CellValue, NamedValue, Workbook } from '@/lib/workbook'

const area = { sheet: 'job', row: 1, column: 1, rowCount: 1, columnCount: 1 }
const named = (name: string, quantity: Quantity): [string, NamedValue] => [
  name,
  { name, quantity, area, role: 'result' },
]

function workbookOf(system: UnitSystem): Workbook {
  return {
    version: 1,
    system,
    sheets: [],
    names: new Map([
      named('quotation_total', 'money'),
      named('design_heat_loss', 'heat-rate'),
      named('covering_area', 'area'),
      named('markup_rate', 'ratio'),
      named('covering_light_transmittance', 'ratio'),
    ]),
  }
}

const us = workbookOf('us')
const reader = (values: Record<string, CellValue>) => (name: string) => {
  const value = values[name]
  return value === undefined ? undefined : [value]
}
const before = {
  currency: 'USD',
  covering_area: 2518,
  design_heat_loss: 83_250,
  quotation_total: 19_302,
  markup_rate: 0.31,
  covering_light_transmittance: 0.8,
}
const after = {
  ...before,
  design_heat_loss: 58_940,
  quotation_total: 21_486,
  covering_light_transmittance: 0.73,
}

describe('the tally', () => {
  it('shows only the names that the workbook has, in reading order, number and unit apart', () => {
    const shown = readTally(us, reader(before)).map(({ label, text, unit }) => [label, text, unit])
    expect(shown).toEqual([
      ['Covering area', '2,518.0', 'ft²'],
      ['Design heat loss', '83,250', 'Btu/h'],
      ['Light let through', '80.0', '%'],
      ['Quotation', '$19,302', ''],
      ['Markup', '31.0', '%'],
    ])
  })

  it('says nothing of a figure that is not computed, and why of one in error', () => {
    const shown = readTally(
      us,
      reader({ design_heat_loss: { error: '#DIV/0!', text: 'It divides by zero.' } }),
    )
    expect(shown.map(({ text }) => text)).toEqual(['—', '—', '—', '—', '—'])
    expect(shown[1]?.error).toBe('It divides by zero.')
  })

  it('after an edit says what it did to each figure, and whether that is good news', () => {
    const then = readTally(us, reader(before))
    const now = readTally(us, reader(after))
    const changed = differences(then, now, us, reader(after))
    expect(Object.fromEntries(changed)).toEqual({
      design_heat_loss: { direction: 'down', text: '24,310', news: 'good' },
      quotation_total: { direction: 'up', text: '$2,184', news: 'bad' },
      covering_light_transmittance: { direction: 'down', text: '7.0 %', news: 'bad' },
    })
    expect(summary(now, changed)).toBe(
      'Design heat loss down 24,310 to 58,940 Btu/h; Light let through down 7.0 % to 73.0 %; Quotation up $2,184 to $21,486',
    )
  })

  it('a difference too small to be seen is none', () => {
    const tiny = { ...before, design_heat_loss: 83_250.0004 }
    expect(
      differences(readTally(us, reader(before)), readTally(us, reader(tiny)), us, reader(tiny)).size,
    ).toBe(0)
  })
})
