import type { Area } from './model'

/** Addresses as people write them: columns by letters, rows from 1. Indexes in code are from 0. */

const names: string[] = []

export function columnName(column: number): string {
  const known = names[column]
  if (known !== undefined) return known
  const made = makeColumnName(column)
  if (column < 1000) names[column] = made
  return made
}

function makeColumnName(column: number): string {
  let name = ''
  for (let rest = column; rest >= 0; rest = Math.floor(rest / 26) - 1) {
    name = String.fromCharCode(65 + (rest % 26)) + name
  }
  return name
}

/** `A` is 0, `AA` is 26; undefined when it is not one to three letters. */
export function parseColumnName(name: string): number | undefined {
  if (!/^[A-Za-z]{1,3}$/.test(name)) return undefined
  let column = 0
  for (const letter of name.toUpperCase()) column = column * 26 + letter.charCodeAt(0) - 64
  return column - 1
}

export function cellName(row: number, column: number): string {
  return `${columnName(column)}${row + 1}`
}

/** `B7` or `$B$7` as indexes from 0; undefined when it is no cell address. */
export function parseCellName(name: string): { row: number; column: number } | undefined {
  const parts = /^\$?([A-Za-z]{1,3})\$?([1-9]\d{0,6})$/.exec(name.trim())
  const column = parseColumnName(parts?.[1] ?? '')
  return column === undefined ? undefined : { row: Number(parts?.[2]) - 1, column }
}

/** `B2` for one cell, else `B2:D9`. */
export function areaName(area: Omit<Area, 'sheet'>): string {
  const first = cellName(area.row, area.column)
  if (area.rowCount === 1 && area.columnCount === 1) return first
  return `${first}:${cellName(area.row + area.rowCount - 1, area.column + area.columnCount - 1)}`
}

/** The sheet's name as it stands before `!` in a formula. */
export function quoteSheetName(name: string): string {
  return /^[A-Za-z_][A-Za-z0-9_]*$/.test(name) && parseCellName(name) === undefined
    ? name
    : `'${name.replaceAll("'", "''")}'`
}

/** `'Price list'!$B$2:$D$9`, always fixed: what a named value stands for. */
export function fixedAreaName(sheetName: string, area: Omit<Area, 'sheet'>): string {
  return `${quoteSheetName(sheetName)}!${areaName(area).replace(/([A-Z]+)(\d+)/g, '$$$1$$$2')}`
}
