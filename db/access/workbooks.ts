import { z } from 'zod'
import { buildWorkbook } from '../../lib/estimate'
import { fail, type Result, succeed } from '../../lib/failures'
import { unitSystems } from '../../lib/units'
import {
  type LoggedOperation,
  toJson,
  type Workbook,
  type WorkbookJson,
  type WorkbookOpened,
} from '../../lib/workbook'
import { database, type FirmTransaction, withFirm } from '../connection'
import { selectOperationsAfter } from '../repositories/operations'
import { selectSnapshot, selectSnapshotHeads, upsertSnapshot } from '../repositories/snapshots'
import { insertWorkbook, selectWorkbook, selectWorkbooks, updateWorkbook } from '../repositories/workbooks'
import type { Json, WorkbookState } from '../schema'
import { type Actor, keepsPeople, rightsOf } from './actor'
import { logged, noSuchWorkbook } from './append'
import { attempt } from './attempt'
import { loadModel } from './live-models'

export { appendOperations } from './append'
export { type SnapshotValues, saveSnapshot } from './snapshots'

export interface WorkbookListed {
  readonly id: string
  readonly title: string
  readonly state: WorkbookState
  readonly seq: number
  readonly createdBy: string
  /** ISO 8601, UTC. */
  readonly changed: string
  readonly tally: Json | null
}

const listLimit = 200

/** The firm's workbooks, most recently changed first, at most 200. `search` looks in the title, without regard to case. */
export function listWorkbooks(
  actor: Actor,
  { search }: { readonly search?: string | undefined } = {},
): Promise<Result<readonly WorkbookListed[]>> {
  return attempt(async () => {
    const filter = { search: search?.trim().slice(0, 120), limit: listLimit }
    const rows = await withFirm(database(), actor.firmId, (trx) => selectWorkbooks(trx, actor.firmId, filter))
    return succeed(
      rows.map((row) => ({
        id: row.id,
        title: row.title,
        state: row.state,
        seq: row.seq,
        createdBy: row.created_by_name,
        changed: row.updated_at.toISOString(),
        tally: row.tally,
      })),
    )
  })
}

const titleSchema = z
  .string()
  .trim()
  .min(1, 'a title is expected')
  .max(120, 'a title of at most 120 characters is expected')

export const newWorkbookSchema = z.strictObject({
  title: titleSchema,
  /** A frame type of the Frame sheet, such as `gable`. */
  frame: z.string().min(1).max(40),
  system: z.enum(unitSystems),
  /** Named inputs that differ from the blank template's. */
  inputs: z
    .record(z.string(), z.union([z.number(), z.string(), z.boolean(), z.array(z.number())]))
    .optional(),
})
export type NewWorkbook = z.infer<typeof newWorkbookSchema>

/** Makes a workbook from the blank template. Failures: `forbidden`, `invalid` (also from the template), `unavailable`. */
export function createWorkbook(
  actor: Actor,
  request: NewWorkbook,
  { now, newId }: { readonly now: () => Date; readonly newId: () => string },
): Promise<Result<{ readonly id: string }>> {
  return attempt(async () => {
    if (!rightsOf(actor.role).change) return fail('forbidden', 'You may read workbooks, but not make one.')
    const parsed = newWorkbookSchema.safeParse(request)
    if (!parsed.success) return fail('invalid', z.prettifyError(parsed.error))
    const { title, frame, system, inputs } = parsed.data
    const built = buildWorkbook({ system, inputs: { ...inputs, frame_type: frame } })
    if (!built.ok) return built
    const id = newId()
    const { firmId } = actor
    const body = JSON.stringify(toJson(built.value))
    return withFirm(database(), firmId, async (trx) => {
      const at = now().toISOString()
      const made = await insertWorkbook(trx, { firmId, id, title, createdBy: actor.memberId, at })
      if (!made) return fail('invalid', 'There is a workbook with that id already.', { name: 'id' })
      await upsertSnapshot(trx, { firmId, workbookId: id, seq: 0, body })
      return succeed({ id })
    })
  })
}

/** Gives a workbook another title. */
export function renameWorkbook(actor: Actor, workbookId: string, title: string): Promise<Result<void>> {
  return onWorkbook(actor, workbookId, async (trx) => {
    if (!rightsOf(actor.role).change)
      return fail('forbidden', 'You may read this workbook, but not rename it.')
    const parsed = titleSchema.safeParse(title)
    if (!parsed.success) return fail('invalid', z.prettifyError(parsed.error), { name: 'title' })
    await updateWorkbook(trx, actor.firmId, workbookId, { title: parsed.data })
    return succeed(undefined)
  })
}

/** Hides a workbook; its log is kept. Estimators may remove what they made, owners and managers any. */
export function removeWorkbook(actor: Actor, workbookId: string): Promise<Result<void>> {
  return onWorkbook(actor, workbookId, async (trx, workbook) => {
    const own = rightsOf(actor.role).change && workbook.created_by === actor.memberId
    if (!own && !keepsPeople(actor.role)) {
      return fail('forbidden', 'Only its maker, a manager or an owner may remove a workbook.')
    }
    await updateWorkbook(trx, actor.firmId, workbookId, { removed: true })
    return succeed(undefined)
  })
}

/** How many operations a snapshot that has values may lie behind the newest one and still be preferred to it. */
const valuesMayLag = 500

/** All that is needed to show and edit a workbook: a snapshot, and the operations after it. */
export function openWorkbook(actor: Actor, workbookId: string): Promise<Result<WorkbookOpened>> {
  return onWorkbook(actor, workbookId, async (trx, workbook) => {
    const { firmId } = actor
    const heads = await selectSnapshotHeads(trx, firmId, workbookId)
    const painted = heads.find((head) => head.hasValues && head.seq >= workbook.seq - valuesMayLag)
    const seq = (painted ?? heads[0])?.seq ?? 0
    const snapshot = await selectSnapshot(trx, firmId, workbookId, seq)
    if (!snapshot) throw new Error(`workbook ${workbookId} has no snapshot`)
    // The head may move between two statements; the tail decides what state this is.
    const tail = (await selectOperationsAfter(trx, firmId, workbookId, seq)).map(logged)
    return succeed({
      id: workbook.id,
      title: workbook.title,
      state: workbook.state,
      seq: tail.at(-1)?.seq ?? seq,
      may: rightsOf(actor.role),
      actor: { id: actor.memberId, name: actor.name, role: actor.role },
      snapshot: {
        seq,
        workbook: JSON.parse(snapshot.body) as WorkbookJson,
        ...(snapshot.values === null ? {} : { values: JSON.parse(snapshot.values) }),
      },
      tail,
    })
  })
}

/** In order, all operations after `seq`. */
export function operationsAfter(
  actor: Actor,
  workbookId: string,
  seq: number,
): Promise<Result<readonly LoggedOperation[]>> {
  return onWorkbook(actor, workbookId, async (trx) => {
    if (!Number.isInteger(seq) || seq < 0) return fail('invalid', 'A sequence from 0 on is expected.')
    return succeed(
      (await selectOperationsAfter(trx, actor.firmId, workbookId, Math.min(seq, 2 ** 31 - 1))).map(logged),
    )
  })
}

export interface WorkbookForExport {
  readonly id: string
  readonly title: string
  readonly seq: number
  /** A copy: the caller may do with it what it likes. */
  readonly workbook: Workbook
}

/** The newest state, for computing and writing out. */
export function workbookForExport(actor: Actor, workbookId: string): Promise<Result<WorkbookForExport>> {
  return onWorkbook(actor, workbookId, async (trx, { id, title }) => {
    const model = await loadModel(trx, actor.firmId, workbookId)
    return model ? succeed({ id, title, seq: model.seq, workbook: model.workbook }) : noSuchWorkbook()
  })
}

type WorkbookRow = NonNullable<Awaited<ReturnType<typeof selectWorkbook>>>

/** Another firm's workbook, a removed one and one that never was are answered alike. */
function onWorkbook<T>(
  actor: Actor,
  workbookId: string,
  work: (trx: FirmTransaction, workbook: WorkbookRow) => Promise<Result<T>>,
): Promise<Result<T>> {
  return attempt(async () => {
    if (!z.uuid().safeParse(workbookId).success) return noSuchWorkbook()
    return withFirm(database(), actor.firmId, async (trx) => {
      const workbook = await selectWorkbook(trx, actor.firmId, workbookId)
      return workbook ? work(trx, workbook) : noSuchWorkbook()
    })
  })
}
