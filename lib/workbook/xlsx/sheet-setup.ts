import type { AddWorksheetOptions, PaperSize } from 'exceljs'
import type { UnitSystem } from '../../units'
import type { Sheet } from '../model'
import { fileText } from './cell-text'

/** Numbers of paper sizes in the file format (ECMA-376 part 1, 18.3.1.63). */
const paper = { us: 1, si: 9 } as const satisfies Record<UnitSystem, number>

/** Frozen header row; printed landscape on Letter or A4, as wide as one page, the header on each, title and page below. */
export function sheetSetup(sheet: Sheet, system: UnitSystem, title: string): Partial<AddWorksheetOptions> {
  const footer = fileText(`${title} · ${sheet.name}`).slice(0, 100).replaceAll('&', '&&')
  return {
    views: [{ state: 'frozen', xSplit: 0, ySplit: 1, topLeftCell: 'A2', activeCell: 'A2' }],
    pageSetup: {
      paperSize: paper[system] as PaperSize,
      orientation: 'landscape',
      fitToPage: true,
      fitToWidth: 1,
      fitToHeight: 0,
      printTitlesRow: '1:1',
    },
    headerFooter: { oddFooter: `&L${footer}&R&P / &N` },
  }
}
