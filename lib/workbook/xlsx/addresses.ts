import { columnName } from '../address'
import type { Area, NamedValue } from '../model'

/** `'Take-off'!$A$2:$B$9`. The name is always quoted, which is right for any. */
export function absoluteRange(area: Area, sheetName: string): string {
  const corner = (row: number, column: number) => `$${columnName(column)}$${row + 1}`
  const first = corner(area.row, area.column)
  const last = corner(area.row + area.rowCount - 1, area.column + area.columnCount - 1)
  const sheet = `'${sheetName.replaceAll("'", "''")}'`
  return first === last ? `${sheet}!${first}` : `${sheet}!${first}:${last}`
}

export interface DefinedName {
  readonly name: string
  readonly ranges: readonly string[]
}

/**
 * Names of the file, sorted. A name that reads as an address (`fan10`, `r1c1`) would damage the file and cannot be
 * used in a formula either, and one whose sheet is gone points nowhere: both are left out.
 */
export function definedNames(
  names: Iterable<NamedValue>,
  sheetNames: ReadonlyMap<string, string>,
): DefinedName[] {
  const defined: DefinedName[] = []
  for (const { name, area } of names) {
    const sheetName = sheetNames.get(area.sheet)
    if (sheetName === undefined || readsAsAddress(name)) continue
    defined.push({ name, ranges: [absoluteRange(area, sheetName)] })
  }
  return defined.sort((a, b) => (a.name < b.name ? -1 : 1))
}

const lastColumn = 'xfd'
const lastRow = 1_048_576

function readsAsAddress(name: string): boolean {
  if (/^(?:r\d*(?:c\d*)?|c\d*)$/.test(name)) return true
  const [, letters, digits] = /^([a-z]{1,3})(\d+)$/.exec(name) ?? []
  if (letters === undefined || digits === undefined) return false
  const inColumns = letters.length < 3 || letters <= lastColumn
  return inColumns && Number(digits) >= 1 && Number(digits) <= lastRow
}
