import { fail, succeed } from '../../failures'
import { parseCellName } from '../address'
import { limits } from '../limits'
import type { NamedValue } from '../model'
import type { Operation } from '../operations'
import { type Apply, findSheet, type OperationOf } from './parts'

/**
 * W14 A name is lower case with underscores and stands for one area. Names that a formula would read as something else
 *     (cell addresses such as `a1`, row-column addresses such as `r1c1`, `true`, `false`, what begins with `offset`) are refused.
 */
export const applyNameValue: Apply<'name-value'> = (workbook, operation) => {
  const { name, target } = operation
  const before = workbook.names.get(name)
  const inverse: Operation = { kind: 'name-value', name, target: before ? nameTarget(before) : null }
  if (target === null) {
    if (!before) return succeed({ inverse: [], touched: [] })
    workbook.names.delete(name)
    return succeed({ inverse: [inverse], touched: [] })
  }
  const refused = refusedName(name)
  if (refused) return fail('invalid', refused, { name })
  const found = findSheet(workbook, target.area.sheet)
  if (!found.ok) return found
  const { area } = target
  const sheet = found.value
  if (area.row + area.rowCount > sheet.rowCount || area.column + area.columnCount > sheet.columns.length) {
    return fail(
      'invalid',
      `${name} must stand for cells of ${sheet.name}, which has ${sheet.rowCount} rows and ${sheet.columns.length} columns.`,
      { name },
    )
  }
  workbook.names.set(name, { name, ...target } as NamedValue)
  return succeed({ inverse: [inverse], touched: [] })
}

/** Why a name cannot be used, or undefined. [W14] */
export function refusedName(name: string): string | undefined {
  if (name.length > limits.nameLength) {
    return `A name has at most ${limits.nameLength} characters.`
  }
  if (!/^[a-z][a-z0-9_]*$/.test(name)) {
    return `Expected a name of small letters, digits and underscores that begins with a letter; found ${name}.`
  }
  if (parseCellName(name) || /^(r\d*)?(c\d*)?$/.test(name)) {
    return `${name} reads as the address of a cell; give a name such as ${name}_value.`
  }
  if (name === 'true' || name === 'false' || name.startsWith('offset')) {
    return `${name} means something else in a formula; give another name.`
  }
  return undefined
}

export function nameTarget(named: NamedValue): NonNullable<OperationOf<'name-value'>['target']> {
  const { name: _name, ...target } = named
  return target as NonNullable<OperationOf<'name-value'>['target']>
}
