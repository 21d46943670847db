import type { CellAddress } from './contracts'
import type { Cell, NamedValue, Sheet, Workbook } from './model'

export function sheetById(workbook: Workbook, id: string): Sheet | undefined {
  return workbook.sheets.find((sheet) => sheet.id === id)
}

/** Sheet names are compared without regard to case. */
export function sheetByName(workbook: Workbook, name: string): Sheet | undefined {
  const wanted = name.toLowerCase()
  return workbook.sheets.find((sheet) => sheet.name.toLowerCase() === wanted)
}

export function cellAt(workbook: Workbook, address: CellAddress): Cell | undefined {
  return sheetById(workbook, address.sheet)?.rows[address.row]?.[address.column]
}

/** The named values whose area holds the cell, the smallest area first. */
export function namedAt(workbook: Workbook, address: CellAddress): NamedValue[] {
  const found: NamedValue[] = []
  for (const named of workbook.names.values()) {
    const { area } = named
    if (
      area.sheet === address.sheet &&
      address.row >= area.row &&
      address.row < area.row + area.rowCount &&
      address.column >= area.column &&
      address.column < area.column + area.columnCount
    ) {
      found.push(named)
    }
  }
  const size = (named: NamedValue) => named.area.rowCount * named.area.columnCount
  return found.sort((a, b) => size(a) - size(b) || (a.name < b.name ? -1 : 1))
}
