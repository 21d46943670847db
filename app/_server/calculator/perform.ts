import { createWriteStream } from 'node:fs'
import { stat } from 'node:fs/promises'
import {
  applyOperation,
  type CellValue,
  type Engine,
  fromJson,
  isCellError,
  type Workbook,
} from '../../../lib/workbook'
import { createEngine } from '../../../lib/workbook/engine'
import type { AnswerOf, Job, StoredState, TallyFigures } from './jobs'
import { storedValues } from './unpack'

/** Does one job in the calculator's process. Throws what cannot be done; the parent words it. */
export async function perform<J extends Job>(job: J): Promise<AnswerOf<J>>
export async function perform(job: Job): Promise<AnswerOf<Job>> {
  const workbook = replay(job.state)
  const engine = createEngine(workbook)
  try {
    if (job.kind === 'values') {
      return { values: storedValues(workbook, engine.all()), tally: tallyOf(workbook, engine) }
    }
    // The file library is slow to load, and most jobs only compute.
    const { writeXlsx } = await import('../../../lib/workbook/xlsx')
    const stream = createWriteStream(job.path, { mode: 0o600 })
    await writeXlsx(workbook, (address) => engine.value(address), stream, {
      title: job.title,
      currency: textNamed(engine, 'currency') ?? 'USD',
      created: new Date(job.created),
    })
    return { bytes: (await stat(job.path)).size }
  } finally {
    engine.destroy()
  }
}

function replay({ workbook: json, operations }: StoredState): Workbook {
  const workbook = fromJson(json)
  for (const operation of operations) {
    const applied = applyOperation(workbook, operation)
    if (!applied.ok) throw new Error(`a logged operation does not apply: ${applied.failure.text}`)
  }
  return workbook
}

function tallyOf(workbook: Workbook, engine: Engine): TallyFigures {
  return {
    system: workbook.system,
    coveringArea: numberNamed(engine, 'covering_area'),
    designHeatLoss: numberNamed(engine, 'design_heat_loss'),
    quotationTotal: numberNamed(engine, 'quotation_total'),
    currency: textNamed(engine, 'currency') ?? null,
  }
}

function numberNamed(engine: Engine, name: string): number | null {
  const value = firstNamed(engine, name)
  return typeof value === 'number' ? value : null
}

function textNamed(engine: Engine, name: string): string | undefined {
  const value = firstNamed(engine, name)
  return typeof value === 'string' && value !== '' ? value : undefined
}

function firstNamed(engine: Engine, name: string): CellValue {
  const value = engine.named(name)?.[0] ?? null
  return isCellError(value) ? null : value
}
