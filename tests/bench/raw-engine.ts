import { type ConfigParams, HyperFormula, type RawCellContent } from 'hyperformula'
import type { NamedValue, Workbook } from '@/lib/workbook'
import type { Place } from './subject'

/** What HyperFormula is given to build a workbook from; plain data, so that a page of the browser can build it too. */
export interface RawSource {
  readonly sheets: Record<string, RawCellContent[][]>
  readonly names: { name: string; expression: string }[]
  readonly config: Partial<ConfigParams>
}

export function rawSource(workbook: Workbook, config: Partial<ConfigParams>): RawSource {
  const titles = new Map(workbook.sheets.map((sheet) => [sheet.id, sheet.name]))
  return {
    sheets: Object.fromEntries(
      workbook.sheets.map((sheet) => [
        sheet.name,
        Array.from({ length: sheet.rowCount }, (_, row) =>
          Array.from(sheet.rows[row] ?? [], (cell): RawCellContent => cell?.input ?? null),
        ),
      ]),
    ),
    names: [...workbook.names.values()].map((named) => ({
      name: named.name,
      expression: `=${absolute(named, titles.get(named.area.sheet) ?? '')}`,
    })),
    config,
  }
}

function absolute({ area }: NamedValue, title: string): string {
  const corner = (row: number, column: number) => `$${letters(column)}$${row + 1}`
  const start = `'${title}'!${corner(area.row, area.column)}`
  if (area.rowCount === 1 && area.columnCount === 1) return start
  return `${start}:${corner(area.row + area.rowCount - 1, area.column + area.columnCount - 1)}`
}

function letters(column: number): string {
  const rest = Math.floor(column / 26)
  return (rest > 0 ? letters(rest - 1) : '') + String.fromCharCode(65 + (column % 26))
}

export function buildRaw(source: RawSource): HyperFormula {
  return HyperFormula.buildFromSheets(source.sheets, source.config, source.names)
}

/** HyperFormula's own number for a place of the workbook. */
export function rawAddress(raw: HyperFormula, workbook: Workbook, place: Place) {
  const title = workbook.sheets.find((sheet) => sheet.id === place.sheet)?.name ?? ''
  const sheet = raw.getSheetId(title)
  if (sheet === undefined) throw new Error(`the raw engine has no sheet ${title}`)
  return { sheet, row: place.row, col: place.column }
}
