import type { Cell as FileCell, Row as FileRow, Worksheet } from 'exceljs'
import type { CellAddress } from '../contracts'
import { type Cell, type CellValue, isFormula, type Sheet, type Workbook } from '../model'
import { definedNames } from './addresses'
import { asTextStyle, type CellLook, lookBook } from './cell-style'
import { fileText, looksLikeFormula, textOfInput } from './cell-text'
import { columnWidths, widenFor } from './column-widths'
import { fileResult } from './file-value'
import { fileFormula } from './formula-text'
import { sheetSetup } from './sheet-setup'
import { type XlsxStream, XlsxWriter } from './writer'

/**
 * X1 Every sheet, in order, with live formulas and their values beside them.
 * X2 Text stays text, whatever it begins with; a number that is none never reaches the file.
 * X3 Numbers show their unit; grounds show their colour.
 * X4 Every named value is a name of the file.
 * X5 Sheets with a lock are protected; on the others whoever protects them finds the inputs left open.
 * X6 The same workbook, title, currency and date give the same bytes.
 */
export interface XlsxOptions {
  readonly title: string
  /** ISO 4217. */
  readonly currency: string
  /** The date that the file bears; the writer looks at no clock. */
  readonly created: Date
}

/**
 * Writes the workbook as an XLSX file and ends the stream. `values` gives the computed value of any cell.
 * Rejects when the stream fails or closes early. It does not pause: call it off the server's event loop.
 */
export async function writeXlsx(
  workbook: Workbook,
  values: (address: CellAddress) => CellValue,
  stream: XlsxStream,
  options: XlsxOptions,
): Promise<void> {
  const failed = whenStreamFails(stream)
  await Promise.race([writeAll(workbook, values, stream, options), failed])
}

async function writeAll(
  workbook: Workbook,
  values: (address: CellAddress) => CellValue,
  stream: XlsxStream,
  options: XlsxOptions,
): Promise<void> {
  const writer = new XlsxWriter({ stream, title: fileText(options.title), created: options.created })
  const sheetNames = new Map(workbook.sheets.map((sheet) => [sheet.id, sheet.name]))
  writer.setDefinedNames(definedNames(workbook.names.values(), sheetNames))
  for (const sheet of workbook.sheets) {
    const file = writer.addWorksheet(sheet.name, sheetSetup(sheet, workbook.system, options.title))
    await writeSheet(file, sheet, workbook, values, options.currency)
  }
  await writer.commit()
}

async function writeSheet(
  file: Worksheet,
  sheet: Sheet,
  workbook: Workbook,
  values: (address: CellAddress) => CellValue,
  currency: string,
): Promise<void> {
  const look = lookBook(workbook.system, currency, sheet.lock !== undefined)
  const lookOf = (cell: Cell, row: number, column: number) =>
    look(
      cell,
      sheet.columns[column]?.quantity,
      row === 0,
      typeof cell.input === 'string' && !isFormula(cell.input),
    )
  file.columns = fittingWidths(sheet, values, lookOf).map((width) => ({ width }))
  if (sheet.lock !== undefined) await file.protect('', { formatColumns: true, formatRows: true })
  for (let r = 0; r < sheet.rows.length; r++) {
    const row = sheet.rows[r]
    if (row) {
      const fileRow = file.getRow(r + 1)
      writeRow(
        fileRow,
        row,
        (cell, c) => lookOf(cell, r, c),
        (column) => values({ sheet: sheet.id, row: r, column }),
      )
      fileRow.commit()
    }
  }
  file.commit()
}

function writeRow(
  fileRow: FileRow,
  row: readonly (Cell | undefined)[],
  lookOf: (cell: Cell, column: number) => CellLook,
  valueAt: (column: number) => CellValue,
): void {
  for (let c = 0; c < row.length; c++) {
    const cell = row[c]
    if (!cell) continue
    const fileCell = fileRow.getCell(c + 1)
    fileCell.style = lookOf(cell, c).style
    writeInput(fileCell, cell, () => valueAt(c))
    if (cell.note) fileCell.note = fileText(cell.note)
  }
}

function writeInput(fileCell: FileCell, { input }: Cell, value: () => CellValue): void {
  if (input === undefined) return
  if (isFormula(input)) {
    const result = fileResult(value())
    fileCell.value = { formula: fileFormula(input), ...(result === undefined ? {} : { result }) }
  } else if (typeof input === 'string') {
    const text = fileText(textOfInput(input))
    if (looksLikeFormula(text)) fileCell.style = asTextStyle(fileCell.style)
    fileCell.value = text
  } else if (typeof input === 'boolean' || Number.isFinite(input)) {
    fileCell.value = input
  }
}

/** Column widths have to be written before the first row, so numbers are measured first. */
function fittingWidths(
  sheet: Sheet,
  values: (address: CellAddress) => CellValue,
  lookOf: (cell: Cell, row: number, column: number) => CellLook,
): number[] {
  const widths = columnWidths(sheet)
  for (let r = 1; r < sheet.rows.length; r++) {
    sheet.rows[r]?.forEach((cell, column) => {
      if (cell?.input === undefined) return
      const value = isFormula(cell.input) ? values({ sheet: sheet.id, row: r, column }) : cell.input
      if (typeof value === 'number') widenFor(widths, column, value, lookOf(cell, r, column).extraWidth)
    })
  }
  return widths
}

function whenStreamFails(stream: XlsxStream): Promise<never> {
  const failed = new Promise<never>((_, reject) => {
    stream.once('error', reject)
    stream.once('close', () => {
      if (!stream.writableFinished) reject(new Error('the stream closed before the file was written'))
    })
  })
  failed.catch(() => {}) // it is raced; when the writing wins, a later failure is nobody's
  return failed
}
