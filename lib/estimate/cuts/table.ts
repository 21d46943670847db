import { type CellValue, type Engine, isCellError } from '../../workbook'

/** A table of the workbook by its columns' titles, as the engine has it. */
export interface Table {
  readonly rows: readonly TableRow[]
}

export interface TableRow {
  readonly text: (title: string) => string
  /** 0 where the cell is empty. */
  readonly number: (title: string) => number
}

/** The rows of a named table (`name` and `name_columns`). */
export function readTable(engine: Engine, name: string): Table {
  const titles = texts(engine.named(`${name}_columns`))
  const cells = engine.named(name)
  if (!cells || titles.length === 0) throw new Error(`no table ${name}`)
  const rows: TableRow[] = []
  for (let at = 0; at + titles.length <= cells.length; at += titles.length) {
    const cell = (title: string): CellValue => {
      const column = titles.indexOf(title)
      if (column < 0) throw new Error(`no column ${title} in ${name}`)
      return cells[at + column] ?? null
    }
    rows.push(rowOf(cell))
  }
  return { rows }
}

export function rowOf(cell: (title: string) => CellValue): TableRow {
  return {
    text: (title) => asText(cell(title)),
    number: (title) => asNumber(cell(title)) ?? 0,
  }
}

export function texts(values: readonly CellValue[] | undefined): string[] {
  return (values ?? []).map(asText)
}

export function asText(value: CellValue | undefined): string {
  return value === null || value === undefined || isCellError(value) ? '' : String(value)
}

export function asNumber(value: CellValue | undefined): number | undefined {
  return typeof value === 'number' && Number.isFinite(value) ? value : undefined
}
