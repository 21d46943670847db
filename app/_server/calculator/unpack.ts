import type { CellValue, PackedChanges, StoredValues, Workbook } from '@/lib/workbook'

/** Values by sheet id, rows then columns, from the engine's packed list; a cell that it does not name is blank. */
export function storedValues(workbook: Workbook, packed: PackedChanges): StoredValues {
  const values = new Map<string, CellValue[][]>()
  for (const sheet of workbook.sheets) values.set(sheet.id, [])
  packed.type.forEach((_, entry) => {
    const rows = values.get(packed.sheets[packed.address[3 * entry] ?? 0] ?? '')
    if (!rows) return
    const row = packed.address[3 * entry + 1] ?? 0
    const column = packed.address[3 * entry + 2] ?? 0
    while (rows.length <= row) rows.push([])
    const line = rows[row] ?? []
    while (line.length <= column) line.push(null)
    line[column] = valueAt(packed, entry)
  })
  return Object.fromEntries(values)
}

function valueAt(packed: PackedChanges, entry: number): CellValue {
  const number = packed.numbers[entry] ?? 0
  switch (packed.type[entry]) {
    case 1:
      return number
    case 2:
      return packed.texts[number] ?? ''
    case 3:
      return number === 1
    case 4:
      return packed.errors[number] ?? null
    default:
      return null
  }
}
