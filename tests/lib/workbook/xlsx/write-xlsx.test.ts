import { Writable } from 'node:stream'
import ExcelJS from 'exceljs'
import { beforeAll, describe, expect, test } from 'vitest'
import type { CellValue, Workbook } from '@/lib/workbook'
import { writeXlsx } from '@/lib/workbook/xlsx'
import { partsOf, xlsxBytes } from '../../../_support/xlsx-bytes'
import { sampleWorkbook } from './sample'

let bytes: Buffer
let parts: Map<string, string>
let book: ExcelJS.Workbook

const part = (name: string) => parts.get(name) ?? ''
const cell = (sheet: string, address: string) => {
  const found = book.getWorksheet(sheet)
  if (!found) throw new Error(`no sheet ${sheet}`)
  return found.getCell(address)
}

async function readBack(file: Buffer): Promise<ExcelJS.Workbook> {
  const copy = new Uint8Array(file).buffer
  return await new ExcelJS.Workbook().xlsx.load(copy)
}

beforeAll(async () => {
  const { workbook, values } = sampleWorkbook()
  bytes = await xlsxBytes(workbook, values)
  parts = await partsOf(bytes)
  book = await readBack(bytes)
})

describe('[X1] sheets, formulas and values', () => {
  test('[X1] sheets stand in order', () => {
    expect(book.worksheets.map((sheet) => sheet.name)).toEqual(['Frame', 'Price & "list"'])
  })

  test.each([
    ['B4', 'frame_width*frame_length', 500],
    ['C2', 'B2>10', true],
    ['C7', 'NOT(TRUE())', false],
    ['C4', '_xlfn.STDEV.S(B2:B3)*0', 0],
    ['C3', 'IF(C2,"wide","narrow")&" & <long>"', 'wide & <long>'],
    ['B5', `'Price & "list"'!B2*floor_area`, 1475],
  ])('[X1] %s is a live formula with its value', (address, formula, result) => {
    expect(cell('Frame', address).formula).toBe(formula)
    expect(cell('Frame', address).result).toEqual(result)
  })

  test('[X1] programs are told to recalculate on opening', () => {
    expect(part('xl/workbook.xml')).toContain('<calcPr fullCalcOnLoad="1"')
  })

  test('[X1] inputs, notes and blank cells', () => {
    expect(cell('Frame', 'B2').value).toBe(12.5)
    expect(cell('Frame', 'B7').value).toBe(false)
    expect(JSON.stringify(cell('Frame', 'B2').note)).toContain('Outside to outside.\\nMeasured twice.')
    expect(cell('Frame', 'D9').value).toBeNull()
  })
})

describe('[X2] nothing turns into something else', () => {
  test.each([
    ['A5', '=1+2'],
    ['A6', '@SUM(A1)'],
    ['A7', '-12.5 is text'],
  ])('[X2] the text in %s stays text', (address, text) => {
    expect(cell('Frame', address).type).toBe(ExcelJS.ValueType.String)
    expect(cell('Frame', address).value).toBe(text)
    expect(cell('Frame', address).numFmt).toBe('@')
  })

  const hostile = [
    "'=cmd|' /C calc'!A0",
    '\u0000\u0008tab\tkept\u001f',
    'line\r\nend',
    '_x0041_ stays',
    'half \ud800 surrogate',
    '</v><v>&amp;',
    ' spaces ',
    "''quoted",
    '12,5',
    'ünïcode 🌿',
    '\uffff',
  ]
  const kept = [
    "=cmd|' /C calc'!A0",
    'tab\tkept',
    'line\nend',
    '_x0041_ stays',
    'half \ufffd surrogate',
    '</v><v>&amp;',
    ' spaces ',
    "'quoted",
    '12,5',
    'ünïcode 🌿',
    '',
  ]

  test('[X2] hostile texts arrive as texts, in cells, formulas, notes, titles', async () => {
    const workbook = oneColumn([...hostile, '="\u0001"&A1'])
    const note = workbook.sheets[0]?.rows[0]
    if (note) note[1] = { input: 1, note: 'a\u0002<b>&\ud800' }
    const file = await xlsxBytes(workbook, () => 'v\u0003\ud800', { title: '&<\u0001>"' })
    const sheet = (await readBack(file)).getWorksheet('Only')
    kept.forEach((text, i) => {
      expect(sheet?.getCell(i + 1, 1).value ?? '').toBe(text)
    })
    expect(sheet?.getCell(kept.length + 1, 1).formula).toBe('""&A1')
    expect(sheet?.getCell(kept.length + 1, 1).result).toBe('v\ufffd')
  })

  test.each<readonly [CellValue, unknown]>([
    [Number.NaN, { error: '#NUM!' }],
    [Number.POSITIVE_INFINITY, { error: '#NUM!' }],
    [{ error: '#DIV/0!', text: '' }, { error: '#DIV/0!' }],
    [{ error: '#CYCLE!', text: '' }, { error: '#VALUE!' }],
    [-0, 0],
    [null, undefined],
  ])('[X2] the result %s is one that a file can hold', async (value, result) => {
    const file = await xlsxBytes(oneColumn(['=1/A2']), () => value)
    const xml = (await partsOf(file)).get('xl/worksheets/sheet1.xml')
    expect(xml).not.toMatch(/<v>(?:NaN|-?Infinity|-0)<\/v>/)
    const found = (await readBack(file)).getWorksheet('Only')?.getCell('A1')
    expect(found?.result).toEqual(result)
  })

  test('[X2] an empty text is a text, not nothing', async () => {
    const file = await xlsxBytes(oneColumn(['=IF(A2,1,"")']), () => '')
    expect((await partsOf(file)).get('xl/worksheets/sheet1.xml')).toMatch(
      / t="str"><f>[^<]*<\/f><v><\/v>|<v\/>/,
    )
  })

  test('[X2] a number that is none is left out', async () => {
    const file = await xlsxBytes(oneColumn([Number.NaN, Number.NEGATIVE_INFINITY, 5]), () => null)
    expect((await readBack(file)).getWorksheet('Only')?.getColumn(1).values).toEqual([
      undefined,
      undefined,
      undefined,
      5,
    ])
  })
})

describe('[X3] how it looks', () => {
  test.each([
    ['Frame', 'B2', '#,##0.000" ft"', 'FFFFF3CF'],
    ['Frame', 'B4', '#,##0.0" ft²"', undefined],
    ['Frame', 'B5', '[$$-409]#,##0.00', undefined],
    ['Frame', 'B6', '0.0%', 'FFF6D9C8'],
    ['Price & "list"', 'B2', '[$$-409]#,##0.00"/ft²"', 'FFDDEAF0'],
  ])('[X3] %s %s', (sheet, address, numFmt, ground) => {
    const found = cell(sheet, address)
    expect(found.numFmt).toBe(numFmt)
    expect(found.fill?.type === 'pattern' ? found.fill.fgColor?.argb : undefined).toBe(ground)
  })

  test('[X3] header, total and widths', () => {
    expect(cell('Frame', 'A1').font?.bold).toBe(true)
    expect(cell('Frame', 'A4').font?.bold).toBe(true)
    expect(cell('Frame', 'A2').font?.bold).toBeFalsy()
    const sheet = book.getWorksheet('Frame')
    expect(sheet?.getColumn(1).width).toBeCloseTo(25, 1)
    expect(sheet?.views[0]).toMatchObject({ state: 'frozen', ySplit: 1 })
  })

  test('[X3] a long number widens its column', async () => {
    const workbook = oneColumn(['Head', 123456789.25])
    const column = workbook.sheets[0]?.columns
    if (column) column[0] = { width: 40, quantity: 'area' }
    const file = await xlsxBytes(workbook, () => null)
    expect((await readBack(file)).getWorksheet('Only')?.getColumn(1).width).toBeGreaterThanOrEqual(
      '123,456,789.2 ft²'.length,
    )
  })

  test('[X3] printed landscape, a page wide, the header on each page', () => {
    const setup = book.getWorksheet('Frame')?.pageSetup
    expect(setup).toMatchObject({ orientation: 'landscape', paperSize: 1, fitToPage: true, fitToWidth: 1 })
    expect(part('xl/workbook.xml')).toMatch(/_xlnm\.Print_Titles" localSheetId="0">[^<]*\$1:\$1</)
    expect(part('xl/worksheets/sheet1.xml')).toContain('fitToHeight="0"')
  })
})

describe('[X4] names', () => {
  test('[X4] every name is there, but for what reads as an address', () => {
    const names = [...part('xl/workbook.xml').matchAll(/<definedName name="([a-z0-9_]+)">([^<]*)</g)]
    expect(names.map(([, name, range]) => [name, range])).toEqual([
      ['floor_area', '&apos;Frame&apos;!$B$4'],
      ['frame_length', '&apos;Frame&apos;!$B$3'],
      ['frame_width', '&apos;Frame&apos;!$B$2'],
      ['sizes', '&apos;Frame&apos;!$B$2:$B$3'],
    ])
  })
})

describe('[X5] protection', () => {
  test('[X5] a locked sheet is protected, the others are not', () => {
    expect(part('xl/worksheets/sheet2.xml')).toContain('<sheetProtection sheet="1"')
    expect(part('xl/worksheets/sheet1.xml')).not.toContain('<sheetProtection')
    expect(cell('Price & "list"', 'B2').protection?.locked).not.toBe(false)
    expect(cell('Frame', 'B2').protection?.locked).toBe(false)
    expect(cell('Frame', 'B4').protection?.locked).not.toBe(false)
  })
})

describe('[X6] bytes', () => {
  test('[X6] the same workbook gives the same bytes', async () => {
    const again = sampleWorkbook()
    expect(Buffer.compare(bytes, await xlsxBytes(again.workbook, again.values))).toBe(0)
  })

  test('[X6] the file says what made it and when', () => {
    expect(part('docProps/core.xml')).toContain('2030-04-15T12:00:00')
    expect(part('docProps/core.xml')).toContain('<dc:title>Test house<')
    expect(part('docProps/app.xml')).toContain('<Application>Panewright<')
  })

  test('[X6] a stream that fails or closes early rejects', async () => {
    const { workbook, values } = sampleWorkbook()
    const options = { title: '', currency: 'USD', created: new Date(0) }
    const failing = new Writable({ write: (_, __, done) => done(new Error('disk full')) })
    await expect(writeXlsx(workbook, values, failing, options)).rejects.toThrow('disk full')
    const closing = new Writable({ write: () => closing.destroy() })
    await expect(writeXlsx(workbook, values, closing, options)).rejects.toThrow('closed before')
  })
})

function oneColumn(inputs: readonly (string | number | boolean)[]): Workbook {
  return {
    version: 1,
    system: 'us',
    sheets: [
      {
        id: 'only',
        name: 'Only',
        kind: 'step',
        rowCount: inputs.length,
        columns: [{}, {}],
        rows: inputs.map((input) => [{ input }]),
      },
    ],
    names: new Map(),
  }
}
