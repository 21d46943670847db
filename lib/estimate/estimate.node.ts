import { randomBytes } from 'node:crypto'
import { createWriteStream } from 'node:fs'
import { readFile, rename, rm, stat } from 'node:fs/promises'
import { basename, dirname, join, resolve } from 'node:path'
import { fail, type Result, succeed } from '../failures'
import { readCommandLine } from './command-line'
import { type Estimate, estimate } from './estimate'
import { quoted } from './nearest'
import { parseStrictJson } from './strict-json'

/** The headless command. Exit 0 with the answer, 2 with one line on stderr and nothing written, 1 for a fault of ours. */
const largestFile = 5_000_000

/** Under `npm run` the working folder is the project's; file names are meant from where the command was given. */
const from = process.env.npm_lifecycle_event === 'estimate' ? (process.env.INIT_CWD ?? '') : ''

async function main(): Promise<Result<string>> {
  const line = readCommandLine(process.argv.slice(2))
  if (!line.ok) return line
  const text = await readInput(resolve(from, line.value.input))
  if (!text.ok) return text
  const json = parseStrictJson(text.value)
  if (!json.ok) return json
  const made = estimate(json.value)
  if (!made.ok) return made
  const { xlsx, cuts } = line.value
  const answers = await answerFiles(made.value, xlsx, cuts)
  if (!answers.ok) return answers
  const { report } = made.value
  return succeed(line.value.json ? JSON.stringify(report) : summary(made.value))
}

/** The layout is made before anything is written: a house that cannot be laid out leaves no file behind. */
async function answerFiles(
  made: Estimate,
  xlsx: string | undefined,
  cuts: string | undefined,
): Promise<Result<void>> {
  // Layout and cutting are read in only where they are asked for.
  const cutting = cuts === undefined ? undefined : await import('./cuts/write-cuts.node.js')
  const layout = await cutting?.cutsOf(made)
  if (layout && !layout.ok) return layout
  if (xlsx !== undefined) {
    const written = await writeWorkbook(made, resolve(from, xlsx))
    if (!written.ok) return written
  }
  if (cutting && layout && cuts !== undefined) return cutting.writeCuts(layout.value, resolve(from, cuts))
  return succeed(undefined)
}

async function readInput(path: string): Promise<Result<string>> {
  try {
    const { size } = await stat(path)
    if (size > largestFile) return fail('limit', `Expected a file of at most ${largestFile / 1e6} MB.`)
    const text = new TextDecoder('utf-8', { fatal: true }).decode(await readFile(path))
    return succeed(text)
  } catch {
    return fail('invalid', `Expected a JSON file in UTF-8 that can be read: ${quoted(path)}.`)
  }
}

/** Under another name first: a file of that name is either the whole workbook or what it was before. */
async function writeWorkbook({ workbook, engine, report }: Estimate, path: string): Promise<Result<void>> {
  const partial = join(dirname(path), `.${basename(path)}.${randomBytes(6).toString('hex')}.part`)
  try {
    const { writeXlsx } = await import('../workbook/xlsx')
    const stream = createWriteStream(partial, { flags: 'wx' })
    const opened = new Promise<void>((done, refused) => {
      stream.once('open', () => done())
      stream.once('error', refused)
    })
    await opened
    const title = String(report.values.job_title?.value ?? '') || 'Estimate'
    const currency = String(report.values.currency?.value ?? '')
    await writeXlsx(workbook, (address) => engine.value(address), stream, {
      title,
      currency,
      created: new Date(),
    })
    await rename(partial, path)
    return succeed(undefined)
  } catch (error) {
    await rm(partial, { force: true })
    if (error instanceof Error && 'code' in error && 'syscall' in error) {
      return fail(
        'invalid',
        `Expected a place where the workbook can be written: ${quoted(path)} (${error.code}).`,
      )
    }
    throw error
  }
}

const told = [
  'covering_area',
  'floor_area',
  'design_heat_loss',
  'heater_output',
  'sheet_count',
  'materials_cost',
  'quotation_total',
]

function summary({ report }: Estimate): string {
  const lines = told.map((name) => {
    const { value, unit } = report.values[name] ?? { value: null, unit: '' }
    const shown = typeof value === 'number' ? value.toLocaleString('en', { maximumFractionDigits: 2 }) : value
    return `${name.padEnd(20)} ${shown} ${unit}`.trimEnd()
  })
  return [
    ...lines,
    ...report.warnings.map(({ severity, name, message }) => `${severity}: ${name}: ${message}`),
  ].join('\n')
}

main().then(
  (answer) => {
    if (answer.ok) process.stdout.write(`${answer.value}\n`)
    else {
      process.stderr.write(`${answer.failure.text.replace(/\s+/g, ' ')}\n`)
      process.exitCode = 2
    }
  },
  (fault: unknown) => {
    process.stderr.write(`This is a fault of the program: ${String(fault).replace(/\s+/g, ' ')}\n`)
    process.exitCode = 1
  },
)
