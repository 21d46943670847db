import { cellAt, type Sheet, type Workbook } from '@/lib/workbook'

/** Stands wherever loads or spans are, on the screen as on the papers. */
export const caution =
  'A preliminary screen: the local code and a licensed engineer decide. Never step on a sheet; glass overhead must be a safety glass.'

const aboutLoads = /(^|_)(snow|wind|load|span|purlin|pressure)(_|$)/
const titlesOfLoads = /\b(span|load|spacing|snow|wind)\b/i

/** Whether figures on this sheet are loads or spans, or are worked out from them. */
export function showsLoads(workbook: Workbook, sheet: Sheet): boolean {
  for (const { name, quantity, area } of workbook.names.values()) {
    if (area.sheet === sheet.id && (quantity === 'pressure' || aboutLoads.test(name))) return true
  }
  return sheet.columns.some((_, column) => {
    const title = cellAt(workbook, { sheet: sheet.id, row: 0, column })?.input
    return typeof title === 'string' && titlesOfLoads.test(title)
  })
}

/** A sheet's sentence without the caution, where that stands beside it in full. */
export function withoutCaution(about: string | undefined): string | undefined {
  return about?.replace(/\s*A preliminary screen:[^.]*\./, '')
}
