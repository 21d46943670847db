import { fail, type Result, succeed } from '../failures'
import { type UnitSystem, unitOf } from '../units'
import { type CellValue, type Engine, isCellError, type NamedValue, type Workbook } from '../workbook'
import { createEngine } from '../workbook/engine'
import { buildWorkbook, type WorkbookRequest } from './build'
import { inOrder } from './declare'
import { isRecord } from './json'
import { nearest, quoted } from './nearest'
import { lineNames, templateChecks } from './template'
import { uncomputed, type Warning, warningsOf } from './warnings'

export interface EstimatedValue {
  readonly value: Plain | readonly Plain[]
  readonly unit: string
}
type Plain = number | string | boolean | null

/** What `--json` prints. */
export interface EstimateReport {
  readonly unit_system: UnitSystem
  readonly values: Readonly<Record<string, EstimatedValue>>
  readonly warnings: readonly Warning[]
}

export interface Estimate {
  readonly workbook: Workbook
  /** Open; whoever asked for the estimate destroys it. */
  readonly engine: Engine
  readonly report: EstimateReport
}

const parts = ['inputs', 'openings', 'overrides'] as const

/**
 * The whole workbook of a JSON request, computed. The request is an object of `inputs`, `openings` and `overrides`,
 * all optional; what is absent is the blank template's. Refused with what was expected.
 */
export function estimate(json: unknown): Result<Estimate> {
  const request = readRequest(json)
  if (!request.ok) return request
  const built = buildWorkbook(request.value)
  if (!built.ok) return built
  const engine = createEngine(built.value)
  const read = reader(built.value, engine)
  for (const { name, about, severity } of templateChecks) {
    const says = read(name)[0]
    if (severity !== 'impossible' || says === inOrder) continue
    engine.destroy()
    const text = typeof says === 'string' ? says : 'expected a house that can be computed'
    return fail('invalid', `${about}: ${text.charAt(0).toLowerCase()}${text.slice(1)}.`, { name: about })
  }
  return succeed({ workbook: built.value, engine, report: reportOf(built.value, read, engine) })
}

function readRequest(json: unknown): Result<WorkbookRequest> {
  if (!isRecord(json)) return fail('invalid', 'Expected a JSON object with inputs, openings and overrides.')
  for (const key of Object.keys(json)) {
    if (parts.some((part) => part === key)) continue
    return fail(
      'invalid',
      `Expected inputs, openings or overrides; the nearest to ${quoted(key)} is ${nearest(key, parts)}.`,
    )
  }
  const asked = isRecord(json.inputs) ? json.inputs.unit_system : undefined
  if (asked !== undefined && asked !== 'us' && asked !== 'si') {
    return fail('invalid', 'unit_system: expected us or si.', { name: 'unit_system' })
  }
  // Shapes are read by `buildWorkbook`, which trusts none of them.
  const { inputs, openings, overrides } = json as Omit<WorkbookRequest, 'system'>
  return succeed({
    system: asked ?? 'us',
    ...(inputs === undefined ? {} : { inputs }),
    ...(openings === undefined ? {} : { openings }),
    ...(overrides === undefined ? {} : { overrides }),
  })
}

type Read = (name: string) => readonly CellValue[]

function reader(workbook: Workbook, engine: Engine): Read {
  return (name) => {
    const values = engine.named(name)
    if (!values || !workbook.names.has(name)) throw new Error(`no named value ${name}`)
    return values
  }
}

/** Every named value but tables and their columns; a value that could not be computed is null, with a warning that says why. */
function reportOf(workbook: Workbook, read: Read, engine: Engine): EstimateReport {
  const values: Record<string, EstimatedValue> = {}
  const warnings: Warning[] = []
  const currency = String(read('currency')[0] ?? '')
  for (const named of workbook.names.values()) {
    if (named.role === 'table' || named.name === 'unit_system') continue
    const plain = read(named.name).map((value) => {
      const warning = uncomputed(workbook, named, value)
      if (warning) warnings.push(warning)
      return isCellError(value) ? null : value
    })
    values[named.name] = {
      value: plain.length === 1 ? (plain[0] ?? null) : plain,
      unit: unitText(named, workbook.system, currency, engine),
    }
  }
  return { unit_system: workbook.system, values, warnings: [...warnings, ...warningsOf(workbook, read)] }
}

/** A line's unit stands beside it, as text or formula; a column's is its kind's. The unit of a ratio is 1. */
function unitText(named: NamedValue, system: UnitSystem, currency: string, engine: Engine): string {
  if (named.quantity === 'ratio') return '1'
  if (!lineNames.has(named.name)) return unitOf(named.quantity, system, currency).symbol
  const { sheet, row, column } = named.area
  const unit = engine.value({ sheet, row, column: column + 1 })
  return typeof unit === 'string' ? unit : ''
}
