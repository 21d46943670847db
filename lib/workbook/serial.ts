import type { UnitSystem } from '../units/quantities'
import type { Cell, Column, NamedValue, Sheet, SheetKind, Workbook } from './model'

/** The workbook as JSON: cells as `[row, column, cell]` in row-major order, names sorted. */
export interface WorkbookJson {
  readonly version: 1
  readonly system: UnitSystem
  readonly sheets: readonly SheetJson[]
  readonly names: readonly NamedValue[]
}

export interface SheetJson {
  readonly id: string
  readonly name: string
  readonly kind: SheetKind
  readonly about?: string
  readonly lock?: string
  readonly rowCount: number
  readonly columns: readonly Column[]
  readonly cells: readonly (readonly [row: number, column: number, cell: Cell])[]
}

export function toJson(workbook: Workbook): WorkbookJson {
  return {
    version: 1,
    system: workbook.system,
    sheets: workbook.sheets.map(sheetToJson),
    names: [...workbook.names.values()].sort((a, b) => (a.name < b.name ? -1 : 1)),
  }
}

/** Trusts its input: parse foreign JSON before. */
export function fromJson(json: WorkbookJson): Workbook {
  return {
    version: 1,
    system: json.system,
    sheets: json.sheets.map(sheetFromJson),
    names: new Map(json.names.map((named) => [named.name, named])),
  }
}

function sheetToJson(sheet: Sheet): SheetJson {
  const cells: [number, number, Cell][] = []
  sheet.rows.forEach((row, r) => {
    row?.forEach((cell, c) => {
      if (cell) cells.push([r, c, cell])
    })
  })
  const { rows: _rows, ...rest } = sheet
  return { ...rest, columns: [...sheet.columns], cells }
}

function sheetFromJson(json: SheetJson): Sheet {
  const { cells, ...rest } = json
  const rows: Sheet['rows'] = []
  for (const [r, c, cell] of cells) {
    const row = rows[r] ?? []
    row[c] = cell
    rows[r] = row
  }
  return { ...rest, columns: [...json.columns], rows }
}
