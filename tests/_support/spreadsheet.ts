import { execFile } from 'node:child_process'
import { mkdir, mkdtemp, readdir, rm, writeFile } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { pathToFileURL } from 'node:url'
import { promisify } from 'node:util'
import ExcelJS from 'exceljs'
import { type CellAddress, type CellValue, columnName, type Workbook } from '@/lib/workbook'

/** One exported file, and the values that it must come to. */
export interface Exported {
  readonly name: string
  readonly bytes: Buffer
  readonly workbook: Workbook
  readonly values: (address: CellAddress) => CellValue
}

export interface Difference {
  readonly file: string
  /** `Frame!B3` */
  readonly address: string
  readonly formula?: string
  readonly expected: CellValue
  readonly found: unknown
}

export interface Comparison {
  readonly differences: readonly Difference[]
  /** Cells with a formula that were compared, so that a test can see that there were any. */
  readonly formulas: number
}

/** Recalculates on loading, whatever values the file holds. Proved by the harness's own test. */
const settings = `<?xml version="1.0" encoding="UTF-8"?>
<oor:items xmlns:oor="http://openoffice.org/2001/registry">
<item oor:path="/org.openoffice.Office.Calc/Formula/Load"><prop oor:name="OOXMLRecalcMode" oor:op="fuse"><value>0</value></prop></item>
</oor:items>
`

const relative = 1e-9
const floor = 1e-9
const oneFile = 20_000
const start = 60_000

/**
 * Has every file recalculated by another spreadsheet program (one run for all of them) and compares each cell:
 * numbers to 1e-9 relative (or absolute, below one), texts and true / false exactly; an error cell is always a difference.
 */
export async function compareRecalculated(files: readonly Exported[]): Promise<Comparison> {
  const books = await recalculated(files.map((file) => file.bytes))
  const differences: Difference[] = []
  let formulas = 0
  files.forEach((file, i) => {
    const book = books[i]
    if (!book) throw new Error(`${file.name} was not recalculated`)
    const compared = compareBook(file, book)
    differences.push(...compared.differences)
    formulas += compared.formulas
  })
  return { differences, formulas }
}

/** The files as the other program saves them after recalculating. */
export async function recalculated(files: readonly Buffer[]): Promise<ExcelJS.Workbook[]> {
  const folder = await mkdtemp(join(tmpdir(), 'recalculated-'))
  try {
    const [profile, input, output] = ['profile', 'in', 'out'].map((part) => join(folder, part)) as [
      string,
      string,
      string,
    ]
    await Promise.all([mkdir(join(profile, 'user'), { recursive: true }), mkdir(input), mkdir(output)])
    await writeFile(join(profile, 'user', 'registrymodifications.xcu'), settings)
    const paths = files.map((_, i) => join(input, `file-${i}.xlsx`))
    await Promise.all(files.map((bytes, i) => writeFile(paths[i] as string, bytes)))
    await promisify(execFile)(
      'soffice',
      [
        `-env:UserInstallation=${pathToFileURL(profile).href}`,
        '--headless',
        '--norestore',
        '--convert-to',
        'xlsx:Calc MS Excel 2007 XML',
        '--outdir',
        output,
        ...paths,
      ],
      { timeout: start + oneFile * files.length },
    )
    const made = new Set(await readdir(output))
    return await Promise.all(
      files.map(async (_, i) => {
        if (!made.has(`file-${i}.xlsx`)) throw new Error(`file ${i} could not be opened`)
        return await new ExcelJS.Workbook().xlsx.readFile(join(output, `file-${i}.xlsx`))
      }),
    )
  } finally {
    await rm(folder, { recursive: true, force: true })
  }
}

function compareBook(file: Exported, book: ExcelJS.Workbook): Comparison {
  const differences: Difference[] = []
  let formulas = 0
  for (const sheet of file.workbook.sheets) {
    const found = book.getWorksheet(sheet.name)
    const compared = new Set<string>()
    sheet.rows.forEach((row, r) => {
      row?.forEach((cell, c) => {
        if (cell?.input === undefined) return
        const label = `${columnName(c)}${r + 1}`
        compared.add(label)
        const expected = file.values({ sheet: sheet.id, row: r, column: c })
        const read = found ? readCell(found.getCell(label)) : undefined
        const formula = typeof cell.input === 'string' && cell.input.startsWith('=') ? cell.input : undefined
        if (formula) formulas++
        if (!agrees(expected, read)) {
          differences.push({
            file: file.name,
            address: `${sheet.name}!${label}`,
            ...(formula ? { formula } : {}),
            expected,
            found: read,
          })
        }
      })
    })
    found?.eachRow((row) =>
      row.eachCell((cell) => {
        const read = readCell(cell)
        if (compared.has(cell.address) || !isErrorValue(read)) return
        differences.push({
          file: file.name,
          address: `${sheet.name}!${cell.address}`,
          expected: null,
          found: read,
        })
      }),
    )
  }
  return { differences, formulas }
}

const dayZero = Date.UTC(1899, 11, 30)

function readCell(cell: ExcelJS.Cell): unknown {
  // A formula's `value` leaves out results that are false or zero; `result` does not.
  const value: unknown = cell.type === ExcelJS.ValueType.Formula ? cell.result : cell.value
  if (value instanceof Date) return (value.getTime() - dayZero) / 86_400_000
  if (typeof value === 'object' && value !== null && 'richText' in value) return cell.text
  return value ?? null
}

function isErrorValue(read: unknown): boolean {
  return (
    (typeof read === 'object' && read !== null && 'error' in read) ||
    (typeof read === 'string' && /^(?:#(?:N\/A|[A-Z0-9/]+[!?])|Err:\d+)$/.test(read))
  )
}

function agrees(expected: CellValue, read: unknown): boolean {
  if (isErrorValue(read)) return false
  if (typeof expected === 'number') {
    if (typeof read !== 'number') return false
    return Math.abs(read - expected) <= Math.max(floor, relative * Math.abs(expected))
  }
  // Where a cell has a number format, true and false come back as 1 and 0.
  if (typeof expected === 'boolean') return read === expected || read === Number(expected)
  // A reference to a blank cell is blank here and 0 there.
  if (expected === null || expected === '')
    return read === null || read === '' || (expected === null && read === 0)
  return typeof expected === 'string' && expected.replace(/\r\n?/g, '\n') === read
}
