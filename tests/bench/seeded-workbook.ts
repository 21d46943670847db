import { buildWorkbook } from '@/lib/estimate'
import type { Workbook } from '@/lib/workbook'
import { countCells, type Place, type Subject } from './subject'

/** The workbook that a new user gets, US units; its width reaches every surface, and so every line. */
export function seededSubject(): Subject {
  const built = buildWorkbook({ system: 'us' })
  if (!built.ok) throw new Error(`the seeded workbook cannot be built: ${built.failure.text}`)
  const workbook = built.value
  const total = placeOf(workbook, 'quotation_total')
  return {
    workbook,
    cells: countCells(workbook),
    edits: {
      fan: { place: placeOf(workbook, 'frame_width'), from: 24, result: total },
      price: { place: coveringPrice(workbook), from: 2, result: total },
      local: {
        place: placeOf(workbook, 'deposit_rate'),
        from: 0.4,
        result: placeOf(workbook, 'deposit_amount'),
      },
    },
  }
}

function placeOf(workbook: Workbook, name: string): Place {
  const area = workbook.names.get(name)?.area
  if (!area) throw new Error(`the seeded workbook has no value named ${name}`)
  return { sheet: area.sheet, row: area.row, column: area.column }
}

/** The price of the covering that stands on the roof. */
function coveringPrice(workbook: Workbook): Place {
  const inputAt = ({ sheet, row, column }: Place) =>
    workbook.sheets.find((one) => one.id === sheet)?.rows[row]?.[column]?.input
  const code = inputAt(placeOf(workbook, 'roof_covering'))
  const table = workbook.sheets.find((sheet) => sheet.id === workbook.names.get('coverings')?.area.sheet)
  const row = table?.rows.findIndex((cells) => cells?.[0]?.input === code) ?? -1
  const column = table?.rows[0]?.findIndex((cell) => cell?.input === 'price') ?? -1
  if (!table || row < 1 || column < 0)
    throw new Error('the Coverings table has no price of the roof covering')
  return { sheet: table.id, row, column }
}
