import { mkdtempSync, readFileSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterEach, beforeEach, describe, expect, test, vi } from 'vitest'
import { type Calculator, createCalculator } from '@/app/_server/calculator/calculator'
import type { Job } from '@/app/_server/calculator/jobs'
import { buildWorkbook } from '@/lib/estimate'
import { fromJson, type Operation, type StoredValues, toJson, type WorkbookJson } from '@/lib/workbook'
import { createEngine } from '@/lib/workbook/engine'

const state = { workbook: gable(), operations: [] }
const real = join(process.cwd(), 'app/_server/calculator/calculator.node.ts')
const stubborn = join(process.cwd(), 'tests/_support/stubborn-calculator.ts')
let calculator: Calculator

vi.setConfig({ testTimeout: 90_000 })

beforeEach(() => {
  vi.spyOn(process.stdout, 'write').mockReturnValue(true)
})
afterEach(() => {
  vi.restoreAllMocks()
  calculator.close()
})

function open(entry: string, { values = 60_000, waiting = 10 } = {}): Calculator {
  calculator = createCalculator({ entry, limit: { values, xlsx: 60_000 }, waiting })
  return calculator
}

function asked(title: string): Job & { readonly kind: 'xlsx' } {
  return { kind: 'xlsx', state, title, created: '2030-04-15T12:00:00Z', path: '/nowhere' }
}

function gable(): WorkbookJson {
  const built = buildWorkbook({ system: 'us', inputs: { frame_type: 'gable' } })
  if (!built.ok) throw new Error(built.failure.text)
  return toJson(built.value)
}

describe('the calculator’s process', () => {
  test('computes every value that the engine here computes, with later operations in', async () => {
    const operations: Operation[] = [
      { kind: 'rename-sheet', sheet: state.workbook.sheets[0]?.id ?? '', name: 'Renamed' },
      { kind: 'insert-lines', sheet: state.workbook.sheets[1]?.id ?? '', axis: 'row', at: 2, count: 3 },
    ]
    const answer = await open(real).run({ kind: 'values', state: { workbook: state.workbook, operations } })
    if (!answer.ok) throw new Error(answer.failure.text)
    const engine = createEngine(fromJson(state.workbook))
    engine.apply(operations)
    const { values, tally } = answer.value
    expect(tally.quotationTotal).toBe(engine.named('quotation_total')?.[0])
    expect(tally.quotationTotal).toBeGreaterThan(0)
    expect(tally.system).toBe('us')
    expect(differences(values, engine)).toEqual([])
    expect(Object.keys(values).sort()).toEqual(state.workbook.sheets.map(({ id }) => id).sort())
  })

  test('writes an XLSX file of the size that it says', async () => {
    const folder = mkdtempSync(join(tmpdir(), 'calculator-test-'))
    try {
      const path = join(folder, 'a.xlsx')
      const answer = await open(real).run({ ...asked('A house'), path })
      const file = readFileSync(path)
      expect(answer).toEqual({ ok: true, value: { bytes: file.byteLength } })
      expect(file.subarray(0, 2).toString()).toBe('PK')
    } finally {
      rmSync(folder, { recursive: true })
    }
  })
})

describe('a process that misbehaves', () => {
  test('that hangs is ended at the limit, and the next job gets a new one', async () => {
    open(stubborn, { values: 1_500 })
    const [hung, next] = await Promise.all([
      calculator.run({ kind: 'values', state }),
      calculator.run(asked('good')),
    ])
    expect(hung.ok ? 'done' : hung.failure).toMatchObject({ code: 'unavailable', message: 'time limit' })
    expect(next.ok).toBe(true)
  })

  test('that dies fails its own job only', async () => {
    open(stubborn)
    const [before, died, after] = await Promise.all([
      calculator.run(asked('good')),
      calculator.run(asked('die')),
      calculator.run(asked('good')),
    ])
    expect(before.ok && after.ok && before.value.bytes !== after.value.bytes).toBe(true)
    expect(died.ok ? 'done' : died.failure.code).toBe('unavailable')
  })

  test('that answers with an error is kept, and its detail is not passed on', async () => {
    open(stubborn)
    const [first, thrown, last] = await Promise.all([
      calculator.run(asked('good')),
      calculator.run(asked('throw')),
      calculator.run(asked('good')),
    ])
    expect(first.ok && last.ok && first.value.bytes === last.value.bytes).toBe(true)
    expect(JSON.stringify(thrown)).not.toContain('inside')
  })
})

test('a file that somebody waits for goes before values that nobody does', async () => {
  open(stubborn)
  const order: string[] = []
  const run = (job: Job, name: string) => calculator.run(job).then(() => order.push(name))
  const files = [run(asked('good'), 'first')]
  const values = run({ kind: 'values', state }, 'values')
  files.push(run(asked('good'), 'file'), run(asked('good'), 'second file'))
  await Promise.all(files)
  expect(order).toEqual(['first', 'file', 'second file'])
  calculator.close()
  await values
})

test('more than may wait is refused at once, and closing answers what waits', async () => {
  open(stubborn, { waiting: 1 })
  const silent = calculator.run(asked('silent'))
  const waiting = calculator.run(asked('good'))
  const refused = await calculator.run(asked('good'))
  expect(refused.ok ? 'done' : refused.failure.text).toMatch(/busy/)
  calculator.close()
  for (const answer of [await silent, await waiting]) {
    expect(answer.ok ? 'done' : answer.failure.text).toBe('The server is closing.')
  }
})

function differences(values: StoredValues, engine: ReturnType<typeof createEngine>): string[] {
  return Object.entries(values).flatMap(([sheet, rows]) =>
    rows.flatMap((line, row) =>
      line.flatMap((value, column) =>
        JSON.stringify(value) === JSON.stringify(engine.value({ sheet, row, column }))
          ? []
          : [`${sheet} ${row} ${column}`],
      ),
    ),
  )
}
