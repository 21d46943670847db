import {
  type CellInput,
  fromJson,
  type NamedValue,
  type SheetJson,
  type Workbook,
  type WorkbookJson,
} from '@/lib/workbook'

/** Small workbooks for tests: inputs by address, sheets with ids made of their names. */
export type Inputs = Readonly<Record<string, CellInput>>

export function bookJson(
  sheets: Readonly<Record<string, Inputs>>,
  names: Readonly<
    Record<string, readonly [sheet: string, row: number, column: number, rows?: number, columns?: number]>
  > = {},
  locks: Readonly<Record<string, string>> = {},
): WorkbookJson {
  return {
    version: 1,
    system: 'si',
    sheets: Object.entries(sheets).map(([name, inputs]) => sheetJson(name, inputs, locks[name])),
    names: Object.entries(names).map(
      ([name, [sheet, row, column, rowCount = 1, columnCount = 1]]): NamedValue => ({
        name,
        area: { sheet: idOf(sheet), row, column, rowCount, columnCount },
        quantity: 'number',
        role: 'input',
      }),
    ),
  }
}

export function book(...parts: Parameters<typeof bookJson>): Workbook {
  return fromJson(bookJson(...parts))
}

export function idOf(name: string): string {
  return name.toLowerCase().replaceAll(' ', '-')
}

function sheetJson(name: string, inputs: Inputs, lock: string | undefined): SheetJson {
  const cells = Object.entries(inputs)
    .map(([address, input]): [number, number, { input: CellInput }] => {
      const { row, column } = place(address)
      return [row, column, { input }]
    })
    .sort((a, b) => a[0] - b[0] || a[1] - b[1])
  return {
    id: idOf(name),
    name,
    kind: 'step',
    ...(lock === undefined ? {} : { lock }),
    rowCount: 20,
    columns: Array.from({ length: 8 }, () => ({})),
    cells,
  }
}

/** Written apart from the code under test: `C7` is row 6, column 2. */
export function place(address: string): { row: number; column: number } {
  return { row: Number(address.slice(1)) - 1, column: address.charCodeAt(0) - 65 }
}
