import {
  type CellValue as EngineValue,
  HyperFormula,
  type RawCellContent,
  type SimpleCellAddress,
} from 'hyperformula'
import { fixedAreaName } from '../address'
import type { CellAddress } from '../contracts'
import { sheetById } from '../lookup'
import type { NamedValue, Sheet, Workbook } from '../model'
import { engineConfig, registerFunctions } from './config'
import { encode } from './encode'

/** One instance of the formula engine that mirrors a workbook, and the two ways of naming its sheets. */
export interface Grid {
  readonly formulas: HyperFormula
  /** Engine's sheet numbers by our sheet ids. */
  readonly numbers: Map<string, number>
  /** Our sheet ids by the engine's numbers. */
  readonly ids: Map<number, string>
}

/** Builds from the model. May throw whatever the formula engine throws; the caller turns that into a stopped result. */
export function buildGrid(workbook: Workbook, stopped: ReadonlySet<string>): Grid {
  registerFunctions()
  const sheets: Record<string, RawCellContent[][]> = {}
  for (const sheet of workbook.sheets) sheets[sheet.name] = encodeSheet(sheet, stopped)
  const formulas = HyperFormula.buildFromSheets(sheets, engineConfig, [
    // Bare TRUE and FALSE are values of OpenFormula; the engine knows them as functions only.
    { name: 'TRUE', expression: '=TRUE()' },
    { name: 'FALSE', expression: '=FALSE()' },
    ...[...workbook.names.values()].map((named) => ({
      name: named.name,
      expression: nameExpression(workbook, named),
    })),
  ])
  const grid: Grid = { formulas, numbers: new Map(), ids: new Map() }
  for (const sheet of workbook.sheets) {
    const number = formulas.getSheetId(sheet.name)
    if (number !== undefined) register(grid, sheet.id, number)
  }
  return grid
}

export function register(grid: Grid, id: string, number: number): void {
  grid.numbers.set(id, number)
  grid.ids.set(number, id)
}

export function encodeSheet(sheet: Sheet, stopped: ReadonlySet<string>): RawCellContent[][] {
  return Array.from(sheet.rows, (cells) => Array.from(cells ?? [], (cell) => encode(cell?.input, stopped)))
}

export function nameExpression(workbook: Workbook, named: NamedValue): string {
  return `=${fixedAreaName(sheetById(workbook, named.area.sheet)?.name ?? '', named.area)}`
}

export function engineAddress(
  grid: Grid,
  { sheet, row, column }: CellAddress,
): SimpleCellAddress | undefined {
  const number = grid.numbers.get(sheet)
  return number === undefined ? undefined : { sheet: number, row, col: column }
}

export type { EngineValue }
