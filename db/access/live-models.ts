import {
  applyOperation,
  fromJson,
  type Operation,
  type Workbook,
  type WorkbookJson,
} from '../../lib/workbook'
import type { FirmTransaction } from '../connection'
import { selectOperationsAfter } from '../repositories/operations'
import { selectSnapshot, selectSnapshotHeads } from '../repositories/snapshots'
import { selectWorkbook } from '../repositories/workbooks'

/** A workbook's state at a sequence of its log. Mutable: whoever changes it holds its turn. */
export interface LiveModel {
  readonly workbook: Workbook
  seq: number
}

interface LiveModels {
  /** Least recently used first. */
  readonly models: Map<string, LiveModel>
  readonly turns: Map<string, Promise<unknown>>
}

/** Models kept in memory, so that an append need not rebuild one; a copy from the log is always as good. */
const capacity = 8

const shared = globalThis as { panewrightLiveModels?: LiveModels }
shared.panewrightLiveModels ??= { models: new Map(), turns: new Map() }
const live: LiveModels = shared.panewrightLiveModels

export function modelKey(firmId: string, workbookId: string): string {
  return `${firmId}/${workbookId}`
}

/** One after another for one workbook in this process; between processes the row lock does the same. */
export function inTurn<T>(key: string, work: () => Promise<T>): Promise<T> {
  const before = live.turns.get(key) ?? Promise.resolve()
  const turn = before.then(work, work)
  const settled = turn.then(
    () => {},
    () => {},
  )
  live.turns.set(key, settled)
  void settled.then(() => {
    if (live.turns.get(key) === settled) live.turns.delete(key)
  })
  return turn
}

export function keptModel(key: string): LiveModel | undefined {
  const model = live.models.get(key)
  if (model) {
    live.models.delete(key)
    live.models.set(key, model)
  }
  return model
}

export function keepModel(key: string, model: LiveModel): void {
  live.models.delete(key)
  live.models.set(key, model)
  for (const oldest of live.models.keys()) {
    if (live.models.size <= capacity) break
    live.models.delete(oldest)
  }
}

/** After any failure: what was half done to the model must not be built upon. */
export function dropModel(key: string): void {
  live.models.delete(key)
}

/** Rebuilds the newest state from the latest snapshot and the log; undefined when there is no such workbook. */
export async function loadModel(
  trx: FirmTransaction,
  firmId: string,
  workbookId: string,
): Promise<LiveModel | undefined> {
  if (!(await selectWorkbook(trx, firmId, workbookId))) return undefined
  const [head] = await selectSnapshotHeads(trx, firmId, workbookId)
  const snapshot = head && (await selectSnapshot(trx, firmId, workbookId, head.seq))
  if (!snapshot) throw new Error(`workbook ${workbookId} has no snapshot`)
  const model = { workbook: fromJson(JSON.parse(snapshot.body) as WorkbookJson), seq: snapshot.seq }
  await catchUp(trx, firmId, workbookId, model)
  return model
}

/** Applies what the log has beyond the model. Throws when a logged operation does not apply: the log is the truth. */
export async function catchUp(
  trx: FirmTransaction,
  firmId: string,
  workbookId: string,
  model: LiveModel,
): Promise<void> {
  for (const row of await selectOperationsAfter(trx, firmId, workbookId, model.seq)) {
    const applied = applyOperation(model.workbook, JSON.parse(row.body) as Operation)
    if (!applied.ok) {
      throw new Error(
        `operation ${row.seq} of workbook ${workbookId} does not apply: ${applied.failure.text}`,
      )
    }
    model.seq = row.seq
  }
}
