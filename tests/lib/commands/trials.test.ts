import { describe, expect, it, vi } from 'vitest'
import {
  type ArgumentValues,
  type CommandContext,
  checkArgument,
  commandById,
  coveringTrials,
  type Effect,
  makeIndex,
  optionsOf,
  searchCommands,
} from '@/lib/commands'
import { buildWorkbook } from '@/lib/estimate'
import { applyAll, fromJson, operationSchema, solveFor, toJson, type Workbook } from '@/lib/workbook'
import { createEngine } from '@/lib/workbook/engine'
import { contextOf, house } from './house'

vi.setConfig({ testTimeout: 60_000 })

function seeded() {
  const built = buildWorkbook({ system: 'us' })
  if (!built.ok) throw new Error(built.failure.text)
  const workbook = built.value
  const engine = createEngine(workbook)
  const selection = { sheet: 'frame', row: 1, column: 1, rowCount: 1, columnCount: 1 }
  const context = contextOf(workbook, {
    selection,
    value: (at) => engine.value(at),
    named: (name) => engine.named(name),
  })
  return { workbook, engine, context }
}

function run(context: CommandContext, id: string, args: ArgumentValues): Effect {
  const command = commandById(id)
  if (!command) throw new Error(`no command ${id}`)
  return command.run(context, args)
}

describe('converting the units', () => {
  it.each([
    ['convert-to-si', 'si', true],
    ['convert-to-us', 'us', 'This workbook is in feet and °F already'],
  ] as const)('%s', (id, system, may) => {
    const { context, engine } = seeded()
    const command = commandById(id)
    expect(command?.when(context)).toBe(may)
    expect(command?.says?.(context, {})).toMatch(/^Writes \d{3,} numbers in /)
    expect(command?.run(context, {})).toEqual({
      kind: 'operations',
      label: expect.stringContaining('Convert to'),
      operations: [{ kind: 'convert-units', system }],
    })
    engine.destroy()
  })

  it('says how many numbers it will write, which are those that change', () => {
    const workbook = house()
    const before = inputs(workbook)
    expect(commandById('convert-to-si')?.says?.(contextOf(workbook), {})).toMatch(/^Writes 13 numbers/)
    applyAll(workbook, [{ kind: 'convert-units', system: 'si' }])
    expect(inputs(workbook).filter((input, index) => input !== before[index])).toHaveLength(13)
  })

  it.each(['metric', 'celsius', 'convert to metres', 'convert units'])('is found by %s', (query) => {
    const ids = searchCommands(makeIndex(contextOf(house())), query).map(({ id }) => id)
    expect(ids.slice(0, 3)).toContain('command:convert-to-si')
  })
})

const inputs = (workbook: Workbook) =>
  toJson(workbook).sheets.flatMap(({ cells }) => cells.map(([, , cell]) => cell.input))

describe('trying every covering', () => {
  it('makes one trial a row of the table, each of which sets that part alone', () => {
    const { workbook, engine, context } = seeded()
    const effect = run(context, 'try-every-covering', { part: 'side' })
    if (effect.kind !== 'try-every') throw new Error(JSON.stringify(effect))
    const codes = engine
      .named('coverings')
      ?.filter((_, index) => index % (workbook.names.get('coverings')?.area.columnCount ?? 1) === 0)
    expect(effect.trials.map(({ code }) => code)).toEqual(
      codes?.filter((code) => typeof code === 'string' && effect.trials.some((one) => one.code === code)),
    )
    expect(effect.trials.length).toBeGreaterThanOrEqual(17)
    expect(effect).toMatchObject({ part: 'the sides', now: engine.named('side_covering')?.[0] })
    expect(effect.names).toEqual(['quotation_total', 'annual_heat_demand', 'darkest_month_light'])
    const before = toJson(workbook)
    for (const { code, operations } of effect.trials) {
      const there = fromJson(before)
      expect(
        applyAll(
          there,
          operations.map((one) => operationSchema.parse(one)),
        ),
      ).toMatchObject({ ok: true })
      const area = there.names.get('side_covering')?.area
      expect(
        there.sheets.find(({ id }) => id === area?.sheet)?.rows[area?.row ?? 0]?.[area?.column ?? 0]?.input,
      ).toBe(code)
    }
    engine.destroy()
  })

  it('on the whole house: every figure is a number, coverings differ, and nothing stays changed', () => {
    const { engine, context } = seeded()
    const effect = run(context, 'try-every-covering', { part: 'all' })
    if (effect.kind !== 'try-every') throw new Error(JSON.stringify(effect))
    const before = effect.names.map((name) => engine.named(name))
    const outcomes = effect.trials.map(({ operations }) => engine.tryNext(operations, effect.names))
    for (const name of effect.names) {
      const values = outcomes.map((outcome) => outcome[name]?.[0])
      for (const value of values) expect(value).toEqual(expect.any(Number))
      expect(new Set(values).size).toBeGreaterThan(8)
    }
    const same = effect.trials.findIndex(({ code }) => code === engine.named('roof_covering')?.[0])
    expect(same).toBeGreaterThanOrEqual(0)
    expect(effect.names.map((name) => engine.named(name))).toEqual(before)
    engine.destroy()
  })

  it('is refused in words where it cannot be', () => {
    const context = contextOf(house())
    expect(coveringTrials(context, { part: 'cellar' })).toMatchObject({
      ok: false,
      failure: { text: expect.stringContaining('takes no covering') },
    })
    const workbook = house()
    for (const name of ['quotation_total', 'design_heat_loss']) workbook.names.delete(name)
    expect(run(contextOf(workbook), 'try-every-covering', { part: 'roof' })).toEqual({
      kind: 'refused',
      text: 'This workbook names no price, heat or light to compare',
    })
    expect(run(context, 'try-every-covering', { part: 'roof' })).toMatchObject({
      kind: 'try-every',
      now: 'TW8',
      names: ['quotation_total', 'design_heat_loss'],
    })
  })
})

describe('solving for a named input', () => {
  const args = { result: 'quotation_total', target: '24,000', input: 'frame_length' }

  it('comes to what the engine is to search for', () => {
    expect(run(contextOf(house()), 'solve-for', args)).toEqual({
      kind: 'solve',
      label: 'Solve quotation for $24,000.00',
      result: 'quotation_total',
      target: 24000,
      tolerance: expect.closeTo(0.005, 6),
      input: 'frame_length',
      from: 48,
      low: 0,
    })
    const change = { result: 'design_heat_loss', target: '20 kW', input: 'inside_night_temperature' }
    const effect = run(contextOf(house()), 'solve-for', change)
    expect(effect).toMatchObject({ kind: 'solve', target: expect.closeTo(68242.8, 1), from: 55 })
    expect(effect).not.toHaveProperty('low')
  })

  it.each<[string, ArgumentValues, RegExp]>([
    ['a target of another kind', { ...args, target: '12 kW' }, /money/],
    ['a formula', { ...args, target: '=5' }, /number, not as a formula/],
    ['a result that is not there', { ...args, result: 'none' }, /result is no longer there/],
    ['an input with choices', { ...args, input: 'roof_covering' }, /no single number/],
    ['an input that is a list', { ...args, input: 'monthly_mean_temperature' }, /no single number/],
  ])('%s is refused', (_, given, text) => {
    expect(run(contextOf(house()), 'solve-for', given)).toEqual({
      kind: 'refused',
      text: expect.stringMatching(text),
    })
  })

  it('a formula is not written over, a locked sheet not written on', () => {
    const workbook = house()
    const cells = [{ row: 2, column: 1, input: '=2*B2' }]
    applyAll(workbook, [{ kind: 'set-cells', sheet: 'frame', cells }])
    expect(run(contextOf(workbook), 'solve-for', args)).toMatchObject({ kind: 'refused' })
    const locked = fromJson({
      ...toJson(house()),
      sheets: toJson(house()).sheets.map((sheet) => ({ ...sheet, lock: 'agreed' })),
    })
    expect(run(contextOf(locked), 'solve-for', args)).toEqual({
      kind: 'refused',
      text: 'Frame is locked: agreed',
    })
  })

  it('checks the target as it is typed, by the kind of the result', () => {
    const context = contextOf(house())
    const [result, target, input] = commandById('solve-for')?.arguments ?? []
    if (!result || !target || !input) throw new Error('solve-for asks for three things')
    const of = { result: 'design_heat_loss' }
    expect(optionsOf(result, context, {})?.map(({ value }) => value)).toEqual([
      'design_heat_loss',
      'quotation_total',
      'roof_area',
    ])
    expect(checkArgument(target, context, of, '12 kW')).toMatchObject({ ok: true })
    expect(checkArgument(target, context, of, '$12')).toMatchObject({ ok: false })
    expect(optionsOf(input, context, of)?.map(({ value }) => value)).toContain('markup_rate')
    expect(optionsOf(input, context, of)?.map(({ value }) => value)).not.toContain('currency')
  })

  it('on the seeded workbook, the effect is all that the search needs', async () => {
    const { engine, context, workbook } = seeded()
    const effect = run(context, 'solve-for', {
      result: 'quotation_total',
      target: '20,000',
      input: 'markup_rate',
    })
    if (effect.kind !== 'solve') throw new Error(JSON.stringify(effect))
    const area = workbook.names.get(effect.input)?.area
    if (!area) throw new Error('no input')
    const total = (input: number) => {
      const cells = [{ row: area.row, column: area.column, input }]
      const tried = engine.tryNext([{ kind: 'set-cells', sheet: area.sheet, cells }], [effect.result])
      return Promise.resolve(tried[effect.result]?.[0] ?? null)
    }
    const solved = await solveFor(total, effect)
    if (!solved.ok) throw new Error(solved.failure.text)
    expect(Number(await total(solved.value.input))).toBeCloseTo(20_000, 2)
    engine.destroy()
  })
})
