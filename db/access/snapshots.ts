import { z } from 'zod'
import { type Result, succeed } from '../../lib/failures'
import { type StoredValues, toJson } from '../../lib/workbook'
import { database, withFirm } from '../connection'
import {
  deleteSnapshots,
  selectSnapshotHeads,
  updateSnapshotValues,
  upsertSnapshot,
} from '../repositories/snapshots'
import { selectWorkbook, updateWorkbook } from '../repositories/workbooks'
import type { Json } from '../schema'
import type { Actor } from './actor'
import { attempt } from './attempt'
import { inTurn, keptModel, type LiveModel, modelKey } from './live-models'

/** A snapshot is written each time the log passes a multiple of this. */
const every = 50
/** Besides the first one and the newest with values. */
const kept = 2

/**
 * Writes a snapshot of the model when the log passed a multiple of 50 since `before`. Whatever goes wrong here is told
 * as a process warning only: the operations are committed, and the state can be rebuilt without it.
 */
export async function snapshotWhenDue(
  firmId: string,
  workbookId: string,
  model: LiveModel,
  before: number,
): Promise<void> {
  if (Math.floor(model.seq / every) === Math.floor(before / every)) return
  const { seq } = model
  try {
    const body = JSON.stringify(toJson(model.workbook))
    await withFirm(database(), firmId, async (trx) => {
      await upsertSnapshot(trx, { firmId, workbookId, seq, body })
      const heads = await selectSnapshotHeads(trx, firmId, workbookId)
      const withValues = heads.find((head) => head.hasValues)?.seq
      const spare = heads.slice(kept).filter((head) => head.seq !== 0 && head.seq !== withValues)
      await deleteSnapshots(
        trx,
        firmId,
        workbookId,
        spare.map((head) => head.seq),
      )
    })
  } catch (error) {
    process.emitWarning(`snapshot ${seq} of workbook ${workbookId} was not written: ${String(error)}`)
  }
}

export interface SnapshotValues {
  /** The sequence that the values were computed at. */
  readonly seq: number
  readonly values: StoredValues
  /** A few figures for the list of workbooks. */
  readonly tally?: Json
}

/**
 * Keeps computed values beside the state they belong to, so that the next opening paints at once. Without a snapshot at
 * that sequence one is made if the state is at hand; `saved: false` says that it was not. Values are the server's own,
 * computed from the log: they are never taken from a client, so every role that opens a workbook may cause this.
 */
export function saveSnapshot(
  actor: Actor,
  workbookId: string,
  { seq, values, tally }: SnapshotValues,
): Promise<Result<{ readonly saved: boolean }>> {
  return attempt(async () => {
    if (!z.uuid().safeParse(workbookId).success) return succeed({ saved: false })
    const { firmId } = actor
    const key = modelKey(firmId, workbookId)
    const text = JSON.stringify(values)
    return inTurn(key, () =>
      withFirm(database(), firmId, async (trx): Promise<Result<{ readonly saved: boolean }>> => {
        const workbook = await selectWorkbook(trx, firmId, workbookId)
        if (!workbook) return succeed({ saved: false })
        if (tally !== undefined && seq === workbook.seq)
          await updateWorkbook(trx, firmId, workbookId, { tally })
        if (await updateSnapshotValues(trx, firmId, workbookId, seq, text)) return succeed({ saved: true })
        const model = keptModel(key)
        if (model?.seq !== seq) return succeed({ saved: false })
        const body = JSON.stringify(toJson(model.workbook))
        await upsertSnapshot(trx, { firmId, workbookId, seq, body, values: text })
        return succeed({ saved: true })
      }),
    )
  })
}
