import { describe, expect, it } from 'vitest'
import {
  type ArgumentValues,
  type CommandContext,
  checkArgument,
  commandById,
  commands,
  type Effect,
  sayCommand,
  unitHint,
} from '@/lib/commands'
import { applyOperation, operationSchema, toJson, type Workbook } from '@/lib/workbook'
import { contextOf, house } from './house'

function run(id: string, args: ArgumentValues = {}, change: Partial<CommandContext> = {}) {
  const workbook = house()
  const context = contextOf(workbook, change)
  const command = commandById(id)
  if (!command) throw new Error(`no command ${id}`)
  const effect = command.run(context, args)
  return { workbook, context, command, effect }
}

/** Applies what the command made, operation by operation, each checked against the logged form. */
function applied(workbook: Workbook, effect: Effect): Workbook {
  if (effect.kind !== 'operations') throw new Error(`expected operations, got ${JSON.stringify(effect)}`)
  for (const operation of effect.operations) {
    const done = applyOperation(workbook, operationSchema.parse(operation))
    if (!done.ok) throw new Error(done.failure.text)
  }
  return workbook
}

const inputAt = (workbook: Workbook, sheet: string, row: number, column: number) =>
  workbook.sheets.find(({ id }) => id === sheet)?.rows[row]?.[column]?.input

const area = (sheet: string, row: number, column: number, rowCount = 1, columnCount = 1) => ({
  selection: { sheet, row, column, rowCount, columnCount },
})

describe('set a named input', () => {
  it.each([
    ['frame_width', "24'", 'frame', 1, 24],
    ['frame_width', `24' 6"`, 'frame', 1, 24.5],
    ['frame_width', '3.048 m', 'frame', 1, 10],
    ['ground_snow_load', '40 psf', 'frame', 9, 40],
    ['inside_night_temperature', '10 °C', 'frame', 10, 50],
    ['waste_allowance', '12%', 'frame', 11, 0.12],
    ['frame_type', 'hoop', 'frame', 5, 'hoop'],
    ['roof_is_slippery', 'true', 'frame', 12, true],
    ['fuel_price', '$1.35', 'frame', 15, 1.35],
    ['frame_width', '=frame_length/2', 'frame', 1, '=frame_length/2'],
    ['frame_width', 30, 'frame', 1, 30],
  ] as const)('%s to %s', (input, value, sheet, row, expected) => {
    const { workbook, effect } = run('set-input', { input, value })
    expect(inputAt(applied(workbook, effect), sheet, row, 1)).toEqual(
      typeof expected === 'number' ? expect.closeTo(expected, 12) : expected,
    )
  })

  it('keeps the cell an input, with its format', () => {
    const { workbook, effect } = run('set-input', { input: 'frame_width', value: '30 ft' })
    expect(applied(workbook, effect).sheets[1]?.rows[1]?.[1]).toEqual({
      input: 30,
      ground: 'input',
      format: { quantity: 'length' },
    })
    expect(effect).toMatchObject({ label: 'Set frame width' })
  })

  it('fills twelve months with one value, or with twelve', () => {
    const one = run('set-input', { input: 'monthly_mean_temperature', value: '41 °F' })
    const months = (workbook: Workbook) =>
      Array.from({ length: 12 }, (_, month) => inputAt(workbook, 'site', month + 1, 1))
    expect(months(applied(one.workbook, one.effect))).toEqual(Array(12).fill(41))
    const twelve = run('set-input', {
      input: 'monthly_mean_temperature',
      value: '20; 22; 31; 43; 55; 64; 69; 67; 59; 48; 37; 26',
    })
    expect(months(applied(twelve.workbook, twelve.effect))).toEqual([
      20, 22, 31, 43, 55, 64, 69, 67, 59, 48, 37, 26,
    ])
    const two = run('set-input', { input: 'monthly_mean_temperature', value: '20; 22' })
    expect(two.effect).toEqual({ kind: 'refused', text: 'Give one value, or 12 parted by ";" (there are 2)' })
  })

  it.each([
    ['frame_width', '24 kg', /Expected a length such as/],
    ['frame_width', '', /Expected a length such as/],
    ['ground_snow_load', '3 m', /Expected a pressure such as/],
    ['fuel_price', '€1.35', /USD/],
    ['frame_type', 'igloo', /takes one of: gable, hoop/],
    ['roof_covering', 'XX', /takes one of: TW8, TW10/],
    ['nothing_such', '1', /no longer there/],
    ['design_heat_loss', '1', /no longer there/],
  ])('refuses %s = "%s"', (input, value, expected) => {
    const { effect } = run('set-input', { input, value })
    expect(effect).toMatchObject({ kind: 'refused', text: expect.stringMatching(expected) })
  })

  it('says what it will change, and the unit typed in both systems', () => {
    const { command, context } = run('set-input', { input: 'frame_width', value: "24'" })
    const args = { input: 'frame_width', value: "24'" }
    expect(sayCommand(command, context, args)).toBe("Set frame width to 24'")
    expect(command.says?.(context, args)).toBe(`Sets Frame B2, now 24' 0".`)
    const spec = command.arguments?.[1]
    if (!spec) throw new Error('no second argument')
    const checked = checkArgument(spec, context, { input: 'frame_width' }, "24'")
    expect(checked).toMatchObject({ ok: true, value: { hint: `24' = 7.315 m` } })
  })

  it.each([
    ['frame_width', '24', `24' 0" = 7.315 m`],
    ['frame_width', `24' 6"`, `24' 6" = 7.468 m`],
    ['frame_width', '7.5 m', `7.5 m = 24' 7 1/4"`],
    ['frame_width', '300 in', `300 in = 25' 0" = 7.620 m`],
    ['ground_snow_load', '40 psf', '40 psf = 1.915 kPa'],
    ['inside_night_temperature', '-10 °F', '-10 °F = -23.3 °C'],
    ['inside_night_temperature', '10 °C', '10 °C = 50.0 °F'],
    ['waste_allowance', '0.125', '0.125 = 12.5%'],
    ['frame_width', '=frame_length/2', undefined],
    ['frame_width', '24 kg', undefined],
  ])('%s: the unit of %s', (name, text, hint) => {
    const context = contextOf(house())
    const named = context.workbook.names.get(name)
    expect(named && unitHint(context, named, text)).toBe(hint)
  })
})

describe('cover', () => {
  it.each([
    ['roof', 'TR16', ['TR16', 'TW8', 'TW8']],
    ['side', 'GL3', ['TW8', 'GL3', 'TW8']],
    ['end', 'DF', ['TW8', 'TW8', 'DF']],
    ['all', 'TW10', ['TW10', 'TW10', 'TW10']],
  ])('%s with %s', (part, covering, expected) => {
    const { workbook, effect } = run('cover', { part, covering })
    const done = applied(workbook, effect)
    expect([6, 7, 8].map((row) => inputAt(done, 'frame', row, 1))).toEqual(expected)
  })

  it('offers the rows of the table, the closing row left out, with their resistance', () => {
    const { command, context } = run('cover', { part: 'roof', covering: 'TW8' })
    const spec = command.arguments?.[1]
    const options = spec?.kind === 'choice' ? spec.options(context, { part: 'roof' }) : []
    expect(options.map(({ value }) => value)).toEqual(['TW8', 'TW10', 'TR8', 'TR16', 'GL3', 'DF'])
    expect(options[3]).toMatchObject({
      title: 'Triple-wall polycarbonate 16 mm',
      detail: 'diffusing',
      figure: { label: 'R', value: 2.4, quantity: 'thermal-resistance' },
    })
    expect(command.says?.(context, { part: 'roof' })).toBe('Sets Frame B7, now Twin-wall polycarbonate 8 mm.')
  })
})

describe('go to', () => {
  it.each([
    ['go-to-sheet', { sheet: 'heat' }, { sheet: 'heat', row: 1, column: 0 }],
    ['go-to-name', { name: 'design_heat_loss' }, { sheet: 'heat', row: 1, column: 1 }],
    ['go-to-name', { name: 'monthly_mean_temperature' }, { sheet: 'site', row: 1, rowCount: 12 }],
    ['go-to-cell', { cell: 'B7' }, { sheet: 'frame', row: 6, column: 1, rowCount: 1 }],
    ['go-to-cell', { cell: 'Heat!b7' }, { sheet: 'heat', row: 6, column: 1 }],
    ['go-to-cell', { cell: "'Sheets in stock'!$A$2" }, { sheet: 'stock', row: 1, column: 0 }],
    ['go-to-cell', { cell: 'D9:B7' }, { sheet: 'frame', row: 6, column: 1, rowCount: 3, columnCount: 3 }],
    ['next-sheet', {}, { sheet: 'surfaces' }],
    ['previous-sheet', {}, { sheet: 'site' }],
  ])('%s %j', (id, args, selection) => {
    expect(run(id, args as ArgumentValues).effect).toMatchObject({
      kind: 'view',
      change: { kind: 'select', selection },
    })
  })

  it.each([
    ['ZZ9', 'Frame ends at F40'],
    ['B41', 'Frame ends at F40'],
    ['Attic!B7', 'No sheet is called Attic'],
    ['seven', 'Type a cell, such as B7 or Heat!B7'],
    ['B7:C8:D9', 'Type a cell, such as B7 or Heat!B7'],
  ])('refuses %s: %s', (cell, text) => {
    expect(run('go-to-cell', { cell }).effect).toEqual({ kind: 'refused', text })
  })
})

describe('edit', () => {
  it('clears inputs and leaves formats, notes and empty cells', () => {
    const { workbook, effect } = run('clear-cells', {}, area('frame', 1, 0, 2, 3))
    const done = applied(workbook, effect)
    expect([1, 2].flatMap((row) => [0, 1, 2].map((column) => inputAt(done, 'frame', row, column)))).toEqual(
      Array(6).fill(undefined),
    )
    expect(done.sheets[1]?.rows[1]?.[1]?.format).toEqual({ quantity: 'length' })
    expect(run('clear-cells', {}, area('frame', 30, 0)).effect.kind).toBe('refused')
  })

  it.each([
    ['insert-rows-above', area('frame', 2, 1, 2, 1), 4, 42],
    ['insert-rows-below', area('frame', 2, 1, 2, 1), 2, 42],
    ['remove-rows', area('frame', 1, 1), 1, 39],
    ['move-rows-up', area('frame', 2, 1), 1, 40],
    ['move-rows-down', area('frame', 2, 1, 2, 1), 3, 40],
  ])('%s moves Frame length to row %s', (id, change, row, rowCount) => {
    const { workbook, effect } = run(id, {}, change)
    const done = applied(workbook, effect)
    expect(inputAt(done, 'frame', row, 0)).toBe('Frame length')
    expect(done.sheets[1]?.rowCount).toBe(rowCount)
    expect(done.names.get('frame_length')?.area.row).toBe(row)
  })

  it.each([
    ['insert-columns-before', area('frame', 1, 1), 2, 7],
    ['insert-columns-after', area('frame', 1, 0, 1, 2), 1, 8],
    ['remove-columns', area('frame', 1, 0), 0, 5],
  ])('%s leaves the widths in column %s', (id, change, column, columnCount) => {
    const { workbook, effect } = run(id, {}, change)
    const done = applied(workbook, effect)
    expect(inputAt(done, 'frame', 1, column)).toBe(24)
    expect(done.sheets[1]?.columns).toHaveLength(columnCount)
  })
})

describe('sheets', () => {
  it('adds one after the selected, with an id of its own', () => {
    const { workbook, effect } = run('add-sheet', { title: ' Site visit ' })
    const done = applied(workbook, effect)
    expect(done.sheets.map(({ name }) => name).slice(0, 4)).toEqual([
      'Site',
      'Frame',
      'Site visit',
      'Surfaces',
    ])
    expect(done.sheets[2]?.id).toBe('site-visit')
    const again = run('add-sheet', { title: 'Frame!' }, { newId: () => 'A1B2-C3D4-E5F6' })
    expect(again.effect).toMatchObject({ operations: [{ sheet: 'frame-a1b2c3d4' }] })
  })

  it.each([
    ['add-sheet', { title: 'heat' }, 'There is a sheet called Heat already'],
    ['add-sheet', { title: 'a/b' }, /Give a name of 1 to 31 characters/],
    ['rename-sheet', { title: 'Heat' }, 'There is a sheet called Heat already'],
    ['remove-sheet', { sheet: 'coverings' }, /Coverings is pinned/],
    ['name-cells', { name: 'frame_width' }, 'frame_width already names Frame B2'],
    ['name-cells', { name: 'a1' }, /address of a cell/],
    ['name-cells', { name: 'Door count' }, /small letters/],
    ['set-digits', { digits: '11' }, /0 to 10/],
    ['set-kind', { quantity: 'colour' }, /Pick a kind/],
  ])('%s refuses %j', (id, args, text) => {
    const expected = typeof text === 'string' ? text : expect.stringMatching(text)
    expect(run(id, args as ArgumentValues).effect).toEqual({ kind: 'refused', text: expected })
  })

  it('renames, removes, names and formats', () => {
    const renamed = run('rename-sheet', { title: 'The frame' })
    expect(applied(renamed.workbook, renamed.effect).sheets[1]?.name).toBe('The frame')
    const removed = run('remove-sheet', { sheet: 'stock' })
    expect(applied(removed.workbook, removed.effect).sheets).toHaveLength(6)
    const named = run('name-cells', { name: 'door_count' }, area('surfaces', 1, 1, 2, 1))
    expect(applied(named.workbook, named.effect).names.get('door_count')?.area.rowCount).toBe(2)
    const kind = run('set-kind', { quantity: 'area' }, area('frame', 5, 1))
    expect(applied(kind.workbook, kind.effect).sheets[1]?.rows[5]?.[1]?.format).toEqual({
      quantity: 'area',
      choices: ['gable', 'hoop'],
    })
    const digits = run('set-digits', { digits: '2' }, area('frame', 1, 1))
    expect(applied(digits.workbook, digits.effect).sheets[1]?.rows[1]?.[1]?.format).toEqual({
      quantity: 'length',
      digits: 2,
    })
  })
})

describe('view changes', () => {
  it.each([
    ['undo', {}, { kind: 'undo' }],
    ['copy', {}, { kind: 'copy' }],
    ['export-xlsx', {}, { kind: 'export-xlsx' }],
    ['switch-theme', {}, { kind: 'switch-theme' }],
    ['sign-out', {}, { kind: 'sign-out' }],
    ['list-workbooks', {}, { kind: 'list-workbooks' }],
    ['open-workbook', { workbook: 'w-2' }, { kind: 'open-workbook', workbook: 'w-2' }],
    [
      'new-workbook',
      { title: ' Hill farm ', frame: 'hoop', system: 'si' },
      { kind: 'new-workbook', title: 'Hill farm', frame: 'hoop', system: 'si' },
    ],
  ])('%s', (id, args, change) => {
    expect(run(id, args as ArgumentValues).effect).toEqual({ kind: 'view', change })
  })
})

describe('every command', () => {
  it('has an id and a title of its own, and leaves the workbook alone until its operations are applied', () => {
    expect(new Set(commands.map(({ id }) => id)).size).toBe(commands.length)
    expect(new Set(commands.map(({ title }) => title)).size).toBe(commands.length)
    for (const command of commands) {
      const workbook = house()
      const before = JSON.stringify(toJson(workbook))
      const context = contextOf(workbook)
      command.when(context)
      command.says?.(context, {})
      command.run(context, {})
      expect(JSON.stringify(toJson(workbook)), command.id).toBe(before)
    }
  })

  it('places each of its arguments once in its line', () => {
    for (const { id, phrase, arguments: specs = [] } of commands) {
      if (!phrase) continue
      const placed = phrase.flatMap((part) => (typeof part === 'string' ? [] : [part.argument]))
      expect(placed, id).toEqual(specs.map((spec) => spec.id))
    }
  })
})
