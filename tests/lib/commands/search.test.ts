import { describe, expect, it } from 'vitest'
import { entriesFor, makeIndex, rank, searchCommands } from '@/lib/commands'
import { contextOf, house, listContext } from './house'

const context = contextOf(house())
const index = makeIndex(context)

/** Query, and the id of an entry that must stand among the first three (`!` before it: must be first). */
const table: readonly (readonly [query: string, expected: string])[] = [
  // commands by title, beginning, middle word, synonym
  ['undo', '!command:undo'],
  ['und', '!command:undo'],
  ['take back', 'command:undo'],
  ['copy', '!command:copy'],
  ['cut', '!command:cut'],
  ['paste', '!command:paste'],
  ['insert rows', 'command:insert-rows-above'],
  ['rows below', '!command:insert-rows-below'],
  ['add row', 'command:insert-rows-below'],
  ['insert col', 'command:insert-columns-before'],
  ['delete rows', '!command:remove-rows'],
  ['remove rows', '!command:remove-rows'],
  ['delete columns', '!command:remove-columns'],
  ['move up', '!command:move-rows-up'],
  ['move rows down', '!command:move-rows-down'],
  ['note', 'command:edit-note'],
  ['comment', '!command:edit-note'],
  ['clear', '!command:clear-cells'],
  ['export', '!command:export-xlsx'],
  ['download', '!command:export-xlsx'],
  ['xlsx', '!command:export-xlsx'],
  ['dark mode', '!command:switch-theme'],
  ['theme', '!command:switch-theme'],
  ['sign out', '!command:sign-out'],
  ['log out', '!command:sign-out'],
  ['new workbook', '!command:new-workbook'],
  ['all workbooks', '!command:list-workbooks'],
  ['home', '!command:list-workbooks'],
  ['rename sheet', '!command:rename-sheet'],
  ['add sheet', '!command:add-sheet'],
  ['delete sheet', '!command:remove-sheet'],
  ['decimals', '!command:set-digits'],
  ['number format', 'command:set-kind'],
  ['name cells', 'command:name-cells'],
  ['next sheet', '!command:next-sheet'],
  ['cover', '!command:cover'],
  ['glazing', '!command:cover'],
  // typos
  ['exprot', '!command:export-xlsx'],
  ['isnert rows', 'command:insert-rows-below'],
  ['pasre', 'command:paste'],
  ['renmae sheet', '!command:rename-sheet'],
  ['polycarbonte', 'row:coverings:TR8:3'],
  ['desing heat', 'name:design_heat_loss'],
  ['frame widht', 'set:frame_width'],
  // sheets, names, rows, workbooks
  ['heat', '!sheet:heat'],
  ['hea', '!sheet:heat'],
  ['go heat', '!sheet:heat'],
  ['go to heat', '!sheet:heat'],
  ['coverings', '!sheet:coverings'],
  ['sheets in stock', '!sheet:stock'],
  ['design heat loss', '!name:design_heat_loss'],
  ['heat loss', 'name:design_heat_loss'],
  ['design_heat_loss', '!name:design_heat_loss'],
  ['quotation', '!name:quotation_total'],
  ['roof area', '!name:roof_area'],
  ['frame width', '!set:frame_width'],
  ['set frame width', '!set:frame_width'],
  ['ridge', '!set:ridge_height'],
  ['snow load', '!set:ground_snow_load'],
  ['snow', '!set:ground_snow_load'],
  ['markup', '!set:markup_rate'],
  ['triple 16', '!row:coverings:TR16:4'],
  ['TR16', '!row:coverings:TR16:4'],
  ['double film', '!row:coverings:DF:6'],
  ['south roof', '!row:surfaces:South roof:1'],
  ['heron', '!workbook:w-1'],
  ['open heron', '!workbook:w-1'],
  ['millbrook', '!workbook:w-2'],
  ['hoop house', 'workbook:w-2'],
  // arguments typed in the line
  ["frame width 24'", '!typed:set-input:frame_width'],
  ["set frame width 24'", '!typed:set-input:frame_width'],
  ['set frame width to 7.5 m', '!typed:set-input:frame_width'],
  ['width 24 ft', '!typed:set-input:frame_width'],
  [`frame width = 24' 6 1/2"`, '!typed:set-input:frame_width'],
  ['length 60', '!typed:set-input:frame_length'],
  ['ridge 4.2 m', '!typed:set-input:ridge_height'],
  ['snow 40 psf', '!typed:set-input:ground_snow_load'],
  ['night temperature 50', '!typed:set-input:inside_night_temperature'],
  ['markup 28%', '!typed:set-input:markup_rate'],
  ['frame type hoop', '!typed:set-input:frame_type'],
  ['roof covering triple 16', '!typed:set-input:roof_covering'],
  ['roof is slippery yes', '!typed:set-input:roof_is_slippery'],
  ['cover roof triple', 'typed:cover:roof:TR16'],
  ['cover roof with triple 16', '!typed:cover:roof:TR16'],
  ['cover sides with TW10', '!typed:cover:side:TW10'],
  ['cover ends glass', '!typed:cover:end:GL3'],
  ['cover roof', '!typed:cover:roof'],
  ['cover everything with glass', '!typed:cover:all:GL3'],
  ['glaze roof double film', '!typed:cover:roof:DF'],
  ['b7', '!typed:go-to-cell:cell'],
  ['B7:D9', '!typed:go-to-cell:cell'],
  ['heat!b7', '!typed:go-to-cell:cell'],
  ['heat b7', '!typed:go-to-cell:cell'],
  ['go to heat!b7', '!typed:go-to-cell:cell'],
  ["'Sheets in stock'!A2", '!typed:go-to-cell:cell'],
  ['rename sheet to Costs', '!typed:rename-sheet:text'],
  ['add sheet Site visit', '!typed:add-sheet:text'],
  ['new workbook Hill farm', '!typed:new-workbook:text'],
]

describe('the palette finds', () => {
  it.each(table)('[C1] %s → %s', (query, expected) => {
    const ids = searchCommands(index, query).map(({ id }) => id)
    if (expected.startsWith('!')) expect(ids[0]).toBe(expected.slice(1))
    else expect(ids.slice(0, 3)).toContain(expected)
  })

  it.each(['zzzz', 'qqq 7', '!!', '=', '~~~'])('[C4] nothing for %s', (query) => {
    expect(searchCommands(index, query)).toEqual([])
  })

  it('[C3] lists what was used lately first', () => {
    const recent = ['sheet:heat', 'command:export-xlsx']
    expect(
      searchCommands(index, '', { recent })
        .slice(0, 2)
        .map(({ id }) => id),
    ).toEqual(recent)
    const rows = (lately: readonly string[]) =>
      searchCommands(index, 'insert rows', { recent: lately }).map(({ id }) => id)[0]
    expect(rows(['command:insert-rows-below'])).toBe('command:insert-rows-below')
    expect(rows(['command:insert-rows-above'])).toBe('command:insert-rows-above')
  })

  it('[C4] lists an entry once, by its id', () => {
    for (const query of ['', 'heat', 'go heat', 'cover roof', 'b7', 'r']) {
      const ids = searchCommands(index, query, { limit: 500 }).map(({ id }) => id)
      expect(new Set(ids).size).toBe(ids.length)
    }
  })

  it('offers on the workbooks list only what needs no workbook', () => {
    const ids = entriesFor(listContext()).map(({ id }) => id)
    expect(ids.sort()).toEqual([
      'command:list-workbooks',
      'command:new-workbook',
      'command:open-workbook',
      'command:sign-out',
      'command:switch-theme',
      'workbook:w-1',
      'workbook:w-2',
    ])
  })

  it('puts what may not run after what may, with its reason', () => {
    const looking = makeIndex(contextOf(house(), { may: { change: false, changeLocked: false } }))
    const found = searchCommands(looking, 'insert rows')
    expect(found[0]?.available).toBe('You may look but not change this workbook')
    const all = searchCommands(looking, '', { limit: 500 }).map(({ available }) => available === true)
    expect(all.lastIndexOf(true)).toBeLessThan(all.indexOf(false))
  })
})

describe('ranking', () => {
  const titles = (query: string, ...all: string[]) =>
    rank(
      all.map((title) => ({ id: title, title })),
      query,
    ).map(({ entry }) => entry.title)

  it.each([
    [
      'heat',
      ['Sheath', 'Design heat', 'Heater output', 'Heat'],
      ['Heat', 'Heater output', 'Design heat', 'Sheath'],
    ],
    ['el no', ['Élan vital north', 'Elan', 'El Norte'], ['El Norte', 'Élan vital north']],
    ['width', ['Wdith', 'Frame width'], ['Frame width', 'Wdith']],
    ['gtc', ['Go to cell', 'Got'], ['Go to cell']],
    ['abx', ['abc', 'ab'], []],
  ])('[C1] %s', (query, given, expected) => {
    expect(titles(query, ...given)).toEqual(expected)
  })

  it('[C3] equal matches stand in the order of weight, length, id', () => {
    const entries = [
      { id: 'b', title: 'Row same' },
      { id: 'a', title: 'Row same' },
      { id: 'c', title: 'Row same', weight: 3 },
    ]
    expect(rank(entries, 'row').map(({ entry }) => entry.id)).toEqual(['c', 'a', 'b'])
  })

  it('finds one among more than 5,000 entries, arguments typed in the line among them', () => {
    const large = house()
    for (let i = 0; i < 5000; i++) {
      const area = { sheet: 'frame', row: 1 + (i % 30), column: 1, rowCount: 1, columnCount: 1 }
      const name = `line_${i}_length`
      const role = i % 10 === 0 ? ('input' as const) : ('result' as const)
      large.names.set(name, { name, area, quantity: 'length', role, label: `Length of purlin line ${i}` })
    }
    const found = makeIndex(contextOf(large))
    expect(found.entries.length).toBeGreaterThan(5000)
    for (const [query, title] of [
      ['line_4931_length', 'purlin line 4931'],
      ['pruline legnth', 'purlin line'],
      ["frame width 24'", "width to 24'"],
    ] as const) {
      const titles = searchCommands(found, query).map((entry) => entry.title)
      expect(titles.slice(0, 3), query).toContainEqual(expect.stringContaining(title))
    }
  })
})
