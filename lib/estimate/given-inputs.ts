import { fail, type Result, succeed } from '../failures'
import type { Workbook } from '../workbook'
import { checkValue, type Surroundings } from './check-value'
import { inSystem } from './compile'
import type { Scalar } from './declare'
import { isRecord } from './json'
import { nearest, quoted } from './nearest'
import { frameChecks, type House } from './sheets/frame-checks'
import { type TemplateInput, templateInputs } from './template'

export type InputValue = number | string | boolean | readonly (number | string)[]

/** `unit_system` is set with the workbook, not by name, but stands among the inputs that people give. */
export const inputNames: readonly string[] = ['unit_system', ...templateInputs.map(({ name }) => name)]

const byName = new Map(templateInputs.map((one) => [one.name, one]))

/** Every given value checked against its kind, limits and choices; one cell value each, or twelve. */
export function readInputs(given: unknown, around: Surroundings): Result<Map<string, readonly Scalar[]>> {
  const read = new Map<string, readonly Scalar[]>()
  if (given === undefined) return succeed(read)
  if (!isRecord(given)) return fail('invalid', 'inputs: expected an object of named values.')
  for (const [name, value] of Object.entries(given)) {
    if (name === 'unit_system') {
      if (value === around.system) continue
      return fail('invalid', `unit_system: expected ${around.system}, the workbook's own.`, { name })
    }
    const spec = byName.get(name)
    if (!spec) {
      const near = nearest(name, inputNames)
      return fail('invalid', `Expected a named input; the nearest to ${quoted(name)} is ${near}.`, { name })
    }
    const checked = readOne(spec, value, around)
    if (!checked.ok) return checked
    read.set(name, checked.value)
  }
  const wrong = houseFault(read, around)
  return wrong ?? succeed(read)
}

function readOne(spec: TemplateInput, value: unknown, around: Surroundings): Result<readonly Scalar[]> {
  const { name, count } = spec
  if (count === 1) {
    const one = checkValue(spec, value, around)
    return one.ok ? succeed([one.value]) : one
  }
  if (!Array.isArray(value) || value.length !== count) {
    return fail('invalid', `${name}: expected a list of ${count} values, one a month.`, { name })
  }
  const list: Scalar[] = []
  for (const [index, each] of value.entries()) {
    const one = checkValue(spec, each, around)
    if (!one.ok)
      return fail('invalid', one.failure.text.replace(name, `${name}, value ${index + 1}`), { name })
    list.push(one.value)
  }
  return succeed(list)
}

/** The first rule that the house breaks, as a failure that names the input to change. */
function houseFault(read: ReadonlyMap<string, readonly Scalar[]>, { system }: Surroundings) {
  const of = (name: keyof House): Scalar => {
    const given = read.get(name)?.[0]
    if (given !== undefined) return given
    const spec = byName.get(name)
    if (spec?.default === undefined) throw new Error(`${name} has no default`)
    return inSystem(spec.default, spec.quantity, system)
  }
  const house: House = {
    frame_type: String(of('frame_type')),
    frame_width: Number(of('frame_width')),
    eave_height: Number(of('eave_height')),
    ridge_height: Number(of('ridge_height')),
    knee_wall_height: Number(of('knee_wall_height')),
    front_wall_tilt: Number(of('front_wall_tilt')),
    bay_count: Number(of('bay_count')),
  }
  for (const { about, rules } of frameChecks) {
    const broken = rules.find(({ wrong }) => wrong(house))
    if (!broken) continue
    const says = broken.says.charAt(0).toLowerCase() + broken.says.slice(1)
    return fail('invalid', `${about}: ${says}.`, { name: about })
  }
  return undefined
}

/** Writes checked values into their named cells. */
export function setInputs(workbook: Workbook, read: ReadonlyMap<string, readonly Scalar[]>): void {
  for (const [name, values] of read) {
    const area = workbook.names.get(name)?.area
    const sheet = workbook.sheets.find(({ id }) => id === area?.sheet)
    if (!area || !sheet) throw new Error(`${name} has no cell`)
    values.forEach((value, index) => {
      const row = sheet.rows[area.row + index]
      if (!row) throw new Error(`${name} has no row ${index}`)
      row[area.column] = { ...row[area.column], input: value }
    })
  }
}
