import { buildWorkbook, type InputValue, type WorkbookRequest } from '@/lib/estimate'
import { type CellValue, isCellError, type Operation, type Workbook } from '@/lib/workbook'
import { createEngine } from '@/lib/workbook/engine'

export interface Computed {
  readonly workbook: Workbook
  /** A named number; an error or a text fails the test with its words. */
  readonly number: (name: string) => number
  readonly numbers: (name: string) => readonly number[]
  /** The numbers among the values of a name; of cells that hold none, nothing. */
  readonly numbersOf: (name: string) => readonly number[]
  readonly text: (name: string) => string
  /** What a table holds in the row of a code, in the workbook's units. */
  readonly inTable: (table: string, code: string, column: string) => CellValue
  readonly value: (name: string) => CellValue
  readonly all: () => ReadonlyMap<string, readonly CellValue[]>
}

/** Builds the workbook, lets the engine compute it, and hands its values to `read` before the engine goes. */
export function compute<T>(request: WorkbookRequest, read: (computed: Computed) => T): T {
  const live = openLive(request)
  try {
    return read(live)
  } finally {
    live.close()
  }
}

export interface Live extends Computed {
  /** Types values into their named cells, as a person would. */
  readonly set: (inputs: Readonly<Record<string, InputValue>>) => void
  /** Types a number into a table's cell. */
  readonly setRow: (table: string, code: string, column: string, value: number) => void
  /** Types into one cell of a named area, by its order. */
  readonly setCell: (name: string, order: number, input: number | string) => void
  readonly close: () => void
}

/** One engine that many houses are typed into: quicker than a workbook each. */
export function openLive(request: WorkbookRequest): Live {
  const built = buildWorkbook(request)
  if (!built.ok) throw new Error(built.failure.text)
  const workbook = built.value
  const engine = createEngine(workbook)
  const values = (name: string): readonly CellValue[] => {
    const found = engine.named(name)
    if (!found) throw new Error(`no named value ${name}`)
    return found
  }
  const asNumber = (value: CellValue | undefined, name: string): number => {
    if (typeof value === 'number') return value
    const shown = value !== undefined && isCellError(value) ? value.text : JSON.stringify(value)
    throw new Error(`${name} is no number but ${shown}`)
  }
  return {
    workbook,
    number: (name) => asNumber(values(name)[0], name),
    numbers: (name) => values(name).map((value) => asNumber(value, name)),
    numbersOf: (name) => values(name).filter((value) => typeof value === 'number'),
    text: (name) => String(values(name)[0]),
    inTable: (table, code, column) => {
      const titles = values(`${table}_columns`)
      const [cells, at] = [values(table), titles.indexOf(column)]
      const row = cells.findIndex((value, index) => index % titles.length === 0 && value === code)
      if (row < 0 || at < 0) throw new Error(`no ${column} of ${code}`)
      return cells[row + at] ?? null
    },
    value: (name) => values(name)[0] ?? null,
    all: () => new Map([...workbook.names.keys()].map((name) => [name, values(name)])),
    set: (inputs) => {
      engine.apply(Object.entries(inputs).map(([name, value]) => typed(workbook, name, [value].flat())))
    },
    setRow: (table, code, column, value) => {
      const area = workbook.names.get(table)?.area
      if (!area) throw new Error(`no table ${table}`)
      const codes = values(table).filter((_, index) => index % area.columnCount === 0)
      const at = values(`${table}_columns`).indexOf(column)
      const row = codes.indexOf(code)
      if (row < 0 || at < 0) throw new Error(`no ${column} of ${code}`)
      const cell = { row: area.row + row, column: at, input: value }
      engine.apply([{ kind: 'set-cells', sheet: area.sheet, cells: [cell] }])
    },
    setCell: (name, order, input) => {
      const area = workbook.names.get(name)?.area
      if (area?.columnCount !== 1) throw new Error(`no column ${name}`)
      const cell = { row: area.row + order, column: area.column, input }
      engine.apply([{ kind: 'set-cells', sheet: area.sheet, cells: [cell] }])
    },
    close: () => engine.destroy(),
  }
}

function typed(workbook: Workbook, name: string, values: readonly (number | string | boolean)[]): Operation {
  const area = workbook.names.get(name)?.area
  if (!area || area.rowCount !== values.length)
    throw new Error(`${name} does not take ${values.length} values`)
  return {
    kind: 'set-cells',
    sheet: area.sheet,
    cells: values.map((input, index) => ({ row: area.row + index, column: area.column, input })),
  }
}
