import type { CellPatch, Operation, Workbook } from '@/lib/workbook'
import { type Api, newWorkbook, send, untilValuesKept } from './api'

const cellsInOperation = 5_000

/** Puts a generated workbook in front of the sheets of a new seeded one, by operations as a client sends them. */
export async function upload(api: Api, workbook: Workbook, title: string): Promise<string> {
  const { id } = await newWorkbook(api, title)
  let seq = await send(api, id, 0, structureOf(workbook))
  for (const operation of cellsOf(workbook)) seq = await send(api, id, seq, [operation])
  await untilValuesKept(api, id)
  return id
}

function structureOf(workbook: Workbook): Operation[] {
  const sheets = workbook.sheets.map(
    (sheet, at): Operation => ({
      kind: 'add-sheet',
      sheet: sheet.id,
      name: sheet.name,
      at,
      sheetKind: sheet.kind,
      rowCount: sheet.rowCount,
      columns: sheet.columns.map(({ width }) => (width === undefined ? {} : { width })),
    }),
  )
  const names = [...workbook.names.values()].map(
    ({ name, ...target }): Operation => ({ kind: 'name-value', name, target }),
  )
  return [...sheets, ...names]
}

function* cellsOf(workbook: Workbook): Generator<Operation> {
  for (const sheet of workbook.sheets) {
    const cells: CellPatch[] = sheet.rows.flatMap((row, r) =>
      (row ?? []).flatMap((cell, c) => {
        if (!cell) return []
        const { format, ...rest } = cell
        return [
          { row: r, column: c, ...rest, ...(format && { format: { ...format } as CellPatch['format'] }) },
        ]
      }),
    )
    for (let at = 0; at < cells.length; at += cellsInOperation) {
      yield { kind: 'set-cells', sheet: sheet.id, cells: cells.slice(at, at + cellsInOperation) }
    }
  }
}
