import { describe, expect, it } from 'vitest'
import { commandById, entriesFor, makeIndex, namedInputs, optionsOf, searchCommands } from '@/lib/commands'
import { buildWorkbook } from '@/lib/estimate'
import { contextOf } from './house'

function template(system: 'us' | 'si') {
  const built = buildWorkbook({ system })
  if (!built.ok) throw new Error(built.failure.text)
  const [sheet] = built.value.sheets
  return contextOf(built.value, {
    selection: { sheet: sheet?.id ?? '', row: 1, column: 1, rowCount: 1, columnCount: 1 },
  })
}

const queries: readonly (readonly [query: string, expected: string])[] = [
  ["frame width 24'", 'typed:set-input:frame_width'],
  ['width 7.5 m', 'typed:set-input:frame_width'],
  ['eave 9 ft', 'typed:set-input:eave_height'],
  ['snow load 40 psf', 'typed:set-input:ground_snow_load'],
  ['markup 30%', 'typed:set-input:markup_rate'],
  ['frame type hoop', 'typed:set-input:frame_type'],
  ['night temperature 50 °F', 'typed:set-input:inside_night_temperature'],
  ['heat', 'sheet:heat'],
  ['take-off', 'sheet:take-off'],
  ['takeoff', 'sheet:take-off'],
  ['design heat loss', 'name:design_heat_loss'],
  ['cover', 'command:cover'],
]

describe('on the seeded workbook', () => {
  it.each(queries)('%s → %s', (query, expected) => {
    const ids = searchCommands(makeIndex(template('us')), query).map(({ id }) => id)
    expect(ids.slice(0, 3)).toContain(expected)
  })

  it.each(['us', 'si'] as const)('%s: each covering is a choice for each part of the house', (system) => {
    const context = template(system)
    const [part, covering] = commandById('cover')?.arguments ?? []
    if (!part || !covering) throw new Error('cover asks for a part and a covering')
    expect(optionsOf(part, context, {})?.map(({ value }) => value)).toEqual(['roof', 'side', 'end', 'all'])
    const table = context.workbook.names.get('coverings')
    const options = optionsOf(covering, context, { part: 'roof' }) ?? []
    expect(options.length).toBeGreaterThan(8)
    expect(options.length).toBeLessThanOrEqual(table?.area.rowCount ?? 0)
    for (const option of options) {
      expect(option.figure?.value, option.value).toBeGreaterThan(0)
      expect(option.title, option.value).not.toBe(option.value)
      const effect = commandById('cover')?.run(context, { part: 'all', covering: option.value })
      expect(effect?.kind, option.value).toBe('operations')
    }
  })

  it('lists every sheet, every named value and every row of every table once', () => {
    const context = template('us')
    const ids = entriesFor(context).map(({ id }) => id)
    expect(new Set(ids).size).toBe(ids.length)
    for (const sheet of context.workbook.sheets) expect(ids).toContain(`sheet:${sheet.id}`)
    for (const named of context.workbook.names.values()) {
      if (named.role !== 'table') expect(ids).toContain(`name:${named.name}`)
    }
    for (const named of namedInputs(context)) expect(ids).toContain(`set:${named.name}`)
    const tables = context.workbook.sheets.filter(({ kind }) => kind === 'table')
    for (const { id } of tables)
      expect(
        ids.some((row) => row.startsWith(`row:${id}:`)),
        id,
      ).toBe(true)
  })
})
