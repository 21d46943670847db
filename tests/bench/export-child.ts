import { readFileSync, writeFileSync } from 'node:fs'
import { Writable } from 'node:stream'
import ExcelJS from 'exceljs'
import { type CellAddress, type CellValue, isCellError, isFormula, type Workbook } from '@/lib/workbook'
import { writeXlsx } from '@/lib/workbook/xlsx'
import { answer, childArgument } from './child'
import { cpuClock } from './cpu-clock'
import { generateWorkbook } from './generated-workbook'
import { createRandom } from './random'

/** One process, one file: how long writing it took, how much the process grew, and how large the file came out. */
export interface ExportTimes {
  readonly milliseconds: number
  readonly megabytes: number
  readonly bytes: number
}

type Values = (address: CellAddress) => CellValue

/** Takes everything and keeps nothing, so that neither side waits for a disk. */
class Counting extends Writable {
  bytes = 0
  override _write(chunk: Buffer, _encoding: BufferEncoding, done: () => void): void {
    this.bytes += chunk.length
    done()
  }
}

/** The same cells and cached values through exceljs's streaming writer, without any style. */
async function writeRaw(workbook: Workbook, values: Values, stream: Writable): Promise<void> {
  const writer = new ExcelJS.stream.xlsx.WorkbookWriter({ stream, useStyles: false, useSharedStrings: true })
  for (const sheet of workbook.sheets) {
    const file = writer.addWorksheet(sheet.name)
    sheet.rows.forEach((row, r) => {
      const fileRow = file.getRow(r + 1)
      row?.forEach((cell, c) => {
        const input = cell?.input
        if (input === undefined) return
        const value = isFormula(input) ? values({ sheet: sheet.id, row: r, column: c }) : undefined
        fileRow.getCell(c + 1).value =
          isFormula(input) && value !== undefined && value !== null && !isCellError(value)
            ? { formula: input.slice(1), result: value }
            : input
      })
      fileRow.commit()
    })
    file.commit()
  }
  await writer.commit()
}

/** A number for every cell, of the length that computed ones have: what it is does not matter to a writer. */
const values: Values = ({ row, column }) => createRandom(row * 31 + column).next() * 10_000

/** The most memory that this process has held since `forgetPeak`, in MB (Linux). */
function peak(): number {
  const line = /VmHWM:\s+(\d+) kB/.exec(readFileSync('/proc/self/status', 'utf8'))
  return Number(line?.[1]) / 1000
}

function forgetPeak(): void {
  writeFileSync('/proc/self/clear_refs', '5')
}

async function main(): Promise<void> {
  const { who, size } = childArgument<{ who: 'raw' | 'app'; size: number }>()
  const { workbook } = generateWorkbook(size)
  const warm = generateWorkbook(500).workbook
  const write = (what: Workbook, stream: Writable) =>
    who === 'raw'
      ? writeRaw(what, values, stream)
      : writeXlsx(what, values, stream, { title: 'Bench', currency: 'USD', created: new Date(0) })
  await write(warm, new Counting())
  globalThis.gc?.()
  forgetPeak()
  const before = peak()
  const sink = new Counting()
  const started = cpuClock()
  await write(workbook, sink)
  const milliseconds = cpuClock() - started
  answer({ milliseconds, megabytes: peak() - before, bytes: sink.bytes } satisfies ExportTimes)
}

void main()
