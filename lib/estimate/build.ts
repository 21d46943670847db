import { type Result, succeed } from '../failures'
import type { UnitSystem } from '../units'
import type { Workbook } from '../workbook'
import { compile } from './compile'
import type { Scalar } from './declare'
import { type InputValue, readInputs, setInputs } from './given-inputs'
import { type OpeningGiven, readOpenings } from './given-openings'
import { isRecord } from './json'
import { type Overrides, overrideTables } from './overrides'
import { steps } from './template'

export interface WorkbookRequest {
  readonly system: UnitSystem
  /** Numbers are in the system's units; strings may carry any unit of the kind. */
  readonly inputs?: Readonly<Record<string, InputValue>>
  readonly openings?: readonly OpeningGiven[]
  readonly overrides?: Overrides
}

/**
 * The seeded workbook: every sheet, formula and name, with the given inputs, openings and overrides in it.
 * Refused (`invalid`, with what was expected) when a name is unknown, a value is of the wrong kind or out of its
 * limits, or no such house can stand.
 */
export function buildWorkbook(request: WorkbookRequest): Result<Workbook> {
  const { system } = request
  const asked = isRecord(request.inputs) ? request.inputs.currency : undefined
  const around = { system, currency: typeof asked === 'string' ? asked.trim().toUpperCase() : 'USD' }
  const tables = overrideTables(request.overrides, around)
  if (!tables.ok) return tables
  const surroundings = { ...around, codes: tables.value.codes }
  const inputs = readInputs(request.inputs, surroundings)
  if (!inputs.ok) return inputs
  const openings = readOpenings(request.openings, surroundings)
  if (!openings.ok) return openings
  const workbook = compile([...steps(openings.value), ...tables.value.sheets], system)
  const values = new Map<string, readonly Scalar[]>(inputs.value)
  values.set('unit_system', [system])
  setInputs(workbook, values)
  return succeed(workbook)
}
