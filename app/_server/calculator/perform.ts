import { createWriteStream } from 'node:fs'
import { stat } from 'node:fs/promises'
import { computed, textNamed } from '../../../lib/estimate/computed'
import { applyOperation, fromJson, type Workbook } from '../../../lib/workbook'
import { createEngine } from '../../../lib/workbook/engine'
import type { AnswerOf, Job, StoredState } from './jobs'

/** Does one job in the calculator's process. Throws what cannot be done; the parent words it. */
export async function perform<J extends Job>(job: J): Promise<AnswerOf<J>>
export async function perform(job: Job): Promise<AnswerOf<Job>> {
  const workbook = replay(job.state)
  const engine = createEngine(workbook)
  try {
    if (job.kind === 'values') return computed(workbook, engine)
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
