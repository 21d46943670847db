import { fail, type Result, succeed } from '../failures'
import type { Quantity } from '../units'
import { checkValue, type Surroundings } from './check-value'
import type { Choices, GridRow, Limits, RichCell } from './declare'
import { isRecord } from './json'
import { nearest, quoted } from './nearest'
import { openingKinds } from './sheets/openings'
import { surfaceNames } from './sheets/surfaces'

/**
 * An opening as it is given: where it is, how large, how many, and what it is made of (a covering's code or a U-value;
 * without either it is of its surface's covering). `along` and `up` place its lower left corner on the surface.
 */
export interface OpeningGiven {
  readonly surface: string
  readonly width: number | string
  readonly height: number | string
  readonly name?: string
  readonly kind?: string
  readonly count?: number
  readonly along?: number | string
  readonly up?: number | string
  readonly covering?: string
  readonly u_value?: number | string
}

interface Field {
  readonly column: string
  readonly quantity: Quantity
  readonly limits?: Limits
  readonly choices?: Choices
  readonly required?: boolean
  readonly absent?: string | number
}

const size: Limits = { above: 0, max: 1000, in: 'si' }
const place: Limits = { min: 0, max: 1000, in: 'si' }
const fields: Readonly<Record<keyof OpeningGiven, Field>> = {
  surface: { column: 'Surface', quantity: 'text', choices: surfaceNames, required: true },
  width: { column: 'Width', quantity: 'length', limits: size, required: true },
  height: { column: 'Height', quantity: 'length', limits: size, required: true },
  name: { column: 'Opening', quantity: 'text' },
  kind: { column: 'Kind', quantity: 'text', choices: openingKinds, absent: 'vent' },
  count: { column: 'Count', quantity: 'count', limits: { min: 1, max: 1000, whole: true }, absent: 1 },
  along: { column: 'Along', quantity: 'length', limits: place },
  up: { column: 'Up', quantity: 'length', limits: place },
  covering: { column: 'Covering', quantity: 'text', choices: 'coverings' },
  u_value: { column: 'Own U-value', quantity: 'u-value', limits: { above: 0, max: 100 } },
}
const most = 200

/** Rows of the Openings sheet; refused whole with what was expected of the first that is wrong. */
export function readOpenings(given: unknown, around: Surroundings): Result<GridRow[]> {
  if (given === undefined) return succeed([])
  if (!Array.isArray(given)) return fail('invalid', 'openings: expected a list of openings.')
  if (given.length > most) return fail('invalid', `openings: expected at most ${most} of them.`)
  const rows: GridRow[] = []
  for (const [index, opening] of given.entries()) {
    const row = readOpening(opening, `opening ${index + 1}`, around)
    if (!row.ok) return row
    rows.push(row.value)
  }
  return succeed(rows)
}

function readOpening(opening: unknown, where: string, around: Surroundings): Result<GridRow> {
  if (!isRecord(opening)) {
    return fail('invalid', `${where}: expected an object with surface, width and height.`)
  }
  const names = Object.keys(fields)
  for (const written of Object.keys(opening)) {
    if (names.includes(written)) continue
    return fail(
      'invalid',
      `${where}: expected one of its fields; the nearest to ${quoted(written)} is ${nearest(written, names)}.`,
    )
  }
  if (opening.covering !== undefined && opening.u_value !== undefined) {
    return fail('invalid', `${where}: expected either covering or u_value, not both.`)
  }
  const row: Record<string, RichCell> = {}
  for (const [name, field] of Object.entries(fields)) {
    const value = opening[name] ?? field.absent
    if (value === undefined) {
      if (field.required) return fail('invalid', `${where}: expected ${name}.`)
      continue
    }
    const checked = checkValue({ ...field, name: `${where}, ${name}` }, value, around)
    if (!checked.ok) return checked
    row[field.column] = {
      value: typeof checked.value === 'number' ? { value: checked.value, in: around.system } : checked.value,
      ground: 'input',
    }
  }
  return succeed(row)
}
