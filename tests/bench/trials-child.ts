import { buildWorkbook } from '@/lib/estimate'
import type { CellValue, Workbook } from '@/lib/workbook'
import { createEngine } from '@/lib/workbook/engine'
import { engineConfig } from '@/lib/workbook/engine/config'
import { answer, childArgument } from './child'
import { cpuClock } from './cpu-clock'
import { buildRaw, rawAddress, rawSource } from './raw-engine'

/** Milliseconds for the seeded house under every covering, and what each of them came to. */
export interface TrialTimes {
  readonly trials: number
  readonly time: number
  readonly totals: readonly CellValue[]
}

function seeded(): Workbook {
  const built = buildWorkbook({ system: 'us' })
  if (!built.ok) throw new Error(built.failure.text)
  return built.value
}

function placeOf(workbook: Workbook, name: string) {
  const area = workbook.names.get(name)?.area
  if (!area) throw new Error(`the workbook has no ${name}`)
  return { sheet: area.sheet, row: area.row, column: area.column }
}

function codesOf(workbook: Workbook): string[] {
  const area = workbook.names.get('coverings')?.area
  const sheet = workbook.sheets.find(({ id }) => id === area?.sheet)
  if (!area || !sheet) throw new Error('the workbook has no table of coverings')
  return sheet.rows.slice(area.row, area.row + area.rowCount).flatMap((row) => {
    const code = row?.[area.column]?.input
    return typeof code === 'string' && code !== 'code' ? [code] : []
  })
}

function raw(workbook: Workbook, codes: readonly string[]): TrialTimes {
  const engine = buildRaw(rawSource(workbook, engineConfig))
  const covering = rawAddress(engine, workbook, placeOf(workbook, 'roof_covering'))
  const total = rawAddress(engine, workbook, placeOf(workbook, 'quotation_total'))
  const once = () =>
    codes.map((code) => {
      engine.setCellContents(covering, code)
      return engine.getCellValue(total) as CellValue
    })
  return timed(codes, once)
}

function app(workbook: Workbook, codes: readonly string[]): TrialTimes {
  const { sheet, row, column } = placeOf(workbook, 'roof_covering')
  const engine = createEngine(workbook)
  const once = () =>
    codes.map((input) => {
      const tried = engine.tryNext(
        [{ kind: 'set-cells', sheet, cells: [{ row, column, input }] }],
        ['quotation_total'],
      )
      return tried.quotation_total?.[0] ?? null
    })
  return timed(codes, once)
}

/** The first time over runs code that is not compiled yet; it is made, not counted. */
function timed(codes: readonly string[], once: () => CellValue[]): TrialTimes {
  once()
  const started = cpuClock()
  const totals = once()
  return { trials: codes.length, time: cpuClock() - started, totals }
}

const { who } = childArgument<{ who: 'raw' | 'app' }>()
const workbook = seeded()
const codes = codesOf(workbook)
answer(who === 'raw' ? raw(workbook, codes) : app(workbook, codes))
