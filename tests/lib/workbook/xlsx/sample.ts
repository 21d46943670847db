import type { CellAddress, CellValue, Row, Sheet, Workbook } from '@/lib/workbook'

/** A small workbook made by hand, with the values that its formulas come to worked out by hand as well. */
export function sampleWorkbook(): { workbook: Workbook; values: (address: CellAddress) => CellValue } {
  const frame: Row[] = [
    [{ input: 'What' }, { input: 'Value' }, { input: 'Checked' }],
    [
      { input: 'Width' },
      {
        input: 12.5,
        ground: 'input',
        format: { quantity: 'length' },
        note: 'Outside to outside.\nMeasured twice.',
      },
      { input: '=B2>10' },
    ],
    [
      { input: 'Length' },
      { input: 40, ground: 'input', format: { quantity: 'length' } },
      { input: '=IF(C2,"wide","narrow")&" & <long>"' },
    ],
    [
      { input: 'Floor', format: { style: 'total' } },
      { input: '=frame_width*frame_length', format: { quantity: 'area', style: 'total' } },
      { input: '=STDEV.S(B2:B3)*0' },
    ],
    [{ input: "'=1+2" }, { input: '=\'Price & "list"\'!B2*floor_area', format: { quantity: 'money' } }],
    [{ input: '@SUM(A1)' }, { input: 0, ground: 'override', format: { quantity: 'ratio' } }],
    [{ input: '-12.5 is text' }, { input: false }, { input: '=NOT(TRUE())' }],
  ]
  const price: Row[] = [
    [{ input: 'Code' }, { input: 'Price', format: { quantity: 'text' } }],
    [
      { input: 'TW8', ground: 'table' },
      { input: 2.95, ground: 'table', format: { quantity: 'money-per-area' } },
    ],
  ]
  const workbook: Workbook = {
    version: 1,
    system: 'us',
    sheets: [
      sheet('frame', 'Frame', 'step', frame, [180, 90, 120]),
      { ...sheet('price', 'Price & "list"', 'table', price, [90, 90]), lock: 'Kept by the manager.' },
    ],
    names: new Map(),
  }
  const name = (text: string, row: number, rowCount = 1) =>
    workbook.names.set(text, {
      name: text,
      area: { sheet: 'frame', row, column: 1, rowCount, columnCount: 1 },
      quantity: 'length',
      role: 'input',
    })
  name('frame_width', 1)
  name('frame_length', 2)
  name('floor_area', 3)
  name('sizes', 1, 2)
  name('fan10', 1)
  return { workbook, values: sampleValues(workbook) }
}

export const results: Readonly<Record<string, CellValue>> = {
  'frame C2': true,
  'frame C3': 'wide & <long>',
  'frame B4': 500,
  'frame C4': 0,
  'frame B5': 1475,
  'frame C7': false,
}

/** Inputs as themselves, formulas from `results` with what is `changed`. */
export function sampleValues(workbook: Workbook, changed: Readonly<Record<string, CellValue>> = {}) {
  const all = { ...results, ...changed }
  return ({ sheet, row, column }: CellAddress): CellValue => {
    const input = workbook.sheets.find((one) => one.id === sheet)?.rows[row]?.[column]?.input
    if (typeof input !== 'string') return input ?? null
    if (!input.startsWith('=')) return input.replace(/^'/, '')
    return all[`${sheet} ${'ABC'[column]}${row + 1}`] ?? null
  }
}

function sheet(id: string, name: string, kind: Sheet['kind'], rows: Row[], widths: number[]): Sheet {
  return { id, name, kind, rowCount: rows.length, columns: widths.map((width) => ({ width })), rows }
}
