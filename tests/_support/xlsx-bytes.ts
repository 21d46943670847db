import { PassThrough } from 'node:stream'
import { buffer } from 'node:stream/consumers'
import yauzl from 'yauzl'
import type { CellAddress, CellValue, Workbook } from '@/lib/workbook'
import { writeXlsx, type XlsxOptions } from '@/lib/workbook/xlsx'

const usual: XlsxOptions = { title: 'Test house', currency: 'USD', created: new Date('2030-04-15T12:00:00Z') }

/** The whole file in memory. */
export async function xlsxBytes(
  workbook: Workbook,
  values: (address: CellAddress) => CellValue,
  options: Partial<XlsxOptions> = {},
): Promise<Buffer> {
  const stream = new PassThrough()
  const [bytes] = await Promise.all([
    buffer(stream),
    writeXlsx(workbook, values, stream, { ...usual, ...options }),
  ])
  return bytes
}

/** The text of every part of the file, by its name in the archive. */
export async function partsOf(bytes: Buffer): Promise<Map<string, string>> {
  const archive = await yauzl.fromBufferPromise(bytes)
  const parts = new Map<string, string>()
  for await (const entry of archive.eachEntry()) {
    parts.set(entry.fileName, (await buffer(await archive.openReadStreamPromise(entry))).toString('utf8'))
  }
  return parts
}
