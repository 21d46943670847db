import { z } from 'zod'
import { type Failure, fail, type Result, succeed } from '../../lib/failures'
import {
  type AppendAccepted,
  type AppendBehind,
  type AppendRequest,
  appendRequestSchema,
  applyOperation,
  type LoggedOperation,
  refusal,
  type SentOperation,
} from '../../lib/workbook'
import { database, withFirm } from '../connection'
import {
  appendOperations as appendRows,
  selectKnown,
  selectOperationsAfter,
} from '../repositories/operations'
import { selectWorkbook } from '../repositories/workbooks'
import { type Actor, type Role, rightsOf } from './actor'
import { attempt } from './attempt'
import {
  catchUp,
  dropModel,
  inTurn,
  keepModel,
  keptModel,
  type LiveModel,
  loadModel,
  modelKey,
} from './live-models'
import { snapshotWhenDue } from './snapshots'

/**
 * Adds operations to a workbook's log; acknowledged means committed.
 * - An operation whose id is in the log already is accepted again with its sequence, whatever the base.
 * - New ids on an old base: `AppendBehind` with all that came in between, and nothing is added.
 * - Otherwise each operation is checked against the state it meets (locks, then whether it applies), all or none.
 * Failures: `forbidden`, `not-found`, `invalid`, `limit`, `unavailable`.
 */
export function appendOperations(
  actor: Actor,
  workbookId: string,
  request: AppendRequest,
): Promise<Result<AppendAccepted | AppendBehind>> {
  return attempt(async () => {
    if (!rightsOf(actor.role).change)
      return fail('forbidden', 'You may read this workbook, but not change it.')
    const parsed = appendRequestSchema.safeParse(request)
    if (!parsed.success)
      return fail('invalid', 'These changes are not what was expected.', {
        message: z.prettifyError(parsed.error),
      })
    const { base, operations } = parsed.data
    if (new Set(operations.map((sent) => sent.id)).size < operations.length) {
      return fail('invalid', 'Two of these changes have the same id.')
    }
    if (!z.uuid().safeParse(workbookId).success) return noSuchWorkbook()
    const key = modelKey(actor.firmId, workbookId)
    return inTurn(key, () => append({ actor, workbookId, key, base }, operations))
  })
}

interface Turn {
  readonly actor: Actor
  readonly workbookId: string
  readonly key: string
  readonly base: number
}

type Answer = Result<AppendAccepted | AppendBehind>

async function append(turn: Turn, operations: readonly SentOperation[]): Promise<Answer> {
  const model = await modelAt(turn)
  if (!model) return noSuchWorkbook()
  if (model.seq !== turn.base) return answerFromLog(turn, operations)
  const refused = applyAll(turn, model, operations)
  if (refused) {
    // Sent again after it was done, an operation may no longer apply: that is no reason to refuse it.
    const known = await knownOf(turn, operations)
    return known.size === 0 ? { ok: false, failure: refused } : withoutKnown(turn, operations, known)
  }
  return write(turn, model, operations)
}

async function write(turn: Turn, model: LiveModel, operations: readonly SentOperation[]): Promise<Answer> {
  const row = await appendRows(database(), {
    firmId: turn.actor.firmId,
    workbookId: turn.workbookId,
    authorId: turn.actor.memberId,
    base: turn.base,
    ids: operations.map((sent) => sent.id),
    batches: operations.map((sent) => sent.batch),
    bodies: operations.map((sent) => JSON.stringify(sent.op)),
  }).catch((error: unknown) => {
    dropModel(turn.key)
    throw error
  })
  if (row.outcome === 'appended') {
    model.seq = row.head
    await snapshotWhenDue(turn.actor.firmId, turn.workbookId, model, turn.base)
    return accepted(row.head, pairs(row.ids, row.seqs))
  }
  dropModel(turn.key)
  switch (row.outcome) {
    case 'absent':
      return noSuchWorkbook()
    case 'known':
      return accepted(row.head, pairs(row.ids, row.seqs))
    case 'mixed':
      return withoutKnown(turn, operations, pairs(row.ids, row.seqs))
    case 'behind':
    case 'ahead':
      return answerFromLog(turn, operations)
  }
}

/** The kept model, caught up when the base is beyond it; else one from the log. */
async function modelAt({ actor, workbookId, key, base }: Turn): Promise<LiveModel | undefined> {
  const kept = keptModel(key)
  if (kept && kept.seq >= base) return kept
  dropModel(key)
  const model = await withFirm(database(), actor.firmId, async (trx) => {
    if (!kept) return loadModel(trx, actor.firmId, workbookId)
    await catchUp(trx, actor.firmId, workbookId, kept)
    return kept
  })
  if (model) keepModel(key, model)
  return model
}

/** Applies all to the model, or drops it and tells why not. */
function applyAll(turn: Turn, model: LiveModel, operations: readonly SentOperation[]): Failure | undefined {
  const role: Role = turn.actor.role
  let done = false
  try {
    for (const { op } of operations) {
      const locked = refusal(model.workbook, op, role)
      if (locked) return locked
      const applied = applyOperation(model.workbook, op)
      if (!applied.ok) return applied.failure
    }
    done = true
    return undefined
  } finally {
    if (!done) dropModel(turn.key)
  }
}

async function knownOf(turn: Turn, operations: readonly SentOperation[]): Promise<Map<string, number>> {
  const { firmId } = turn.actor
  const ids = operations.map((sent) => sent.id)
  const rows = await withFirm(database(), firmId, (trx) => selectKnown(trx, firmId, turn.workbookId, ids))
  return new Map(rows.map((row) => [row.id, row.seq]))
}

/** Goes on with those that are new; the others are answered as they stand. */
async function withoutKnown(
  turn: Turn,
  operations: readonly SentOperation[],
  known: ReadonlyMap<string, number>,
): Promise<Answer> {
  const rest = operations.filter((sent) => !known.has(sent.id))
  if (rest.length === 0) return answerFromLog(turn, operations)
  const answer = await append(turn, rest)
  if (!answer.ok || !('accepted' in answer.value)) return answer
  return accepted(
    answer.value.seq,
    new Map([...known, ...answer.value.accepted.map((a) => [a.id, a.seq] as const)]),
  )
}

/** What the log says to operations that cannot be added on this base. */
async function answerFromLog(turn: Turn, operations: readonly SentOperation[]): Promise<Answer> {
  const { firmId } = turn.actor
  const ids = operations.map((sent) => sent.id)
  return withFirm(database(), firmId, async (trx): Promise<Answer> => {
    const workbook = await selectWorkbook(trx, firmId, turn.workbookId)
    if (!workbook) return noSuchWorkbook()
    const known = await selectKnown(trx, firmId, turn.workbookId, ids)
    if (known.length === ids.length) {
      return accepted(workbook.seq, new Map(known.map((row) => [row.id, row.seq])))
    }
    if (turn.base > workbook.seq) {
      return fail(
        'invalid',
        'These changes build on a state that the server does not have. Reload the workbook.',
        {
          message: `base ${turn.base} is beyond ${workbook.seq}`,
        },
      )
    }
    const missing = (await selectOperationsAfter(trx, firmId, turn.workbookId, turn.base)).map(logged)
    const seq = missing.at(-1)?.seq ?? workbook.seq
    return succeed({ code: 'behind', text: 'Others changed the workbook meanwhile.', seq, missing })
  })
}

type OperationRow = Awaited<ReturnType<typeof selectOperationsAfter>>[number]

/** A row of the log as it crosses to clients; the author is a member's id. */
export function logged(row: OperationRow): LoggedOperation {
  return {
    seq: row.seq,
    id: row.id,
    batch: row.batch,
    op: JSON.parse(row.body) as LoggedOperation['op'],
    author: row.author_id,
    at: row.at.toISOString(),
  }
}

function accepted(seq: number, known: ReadonlyMap<string, number>): Answer {
  return succeed({ seq, accepted: [...known].map(([id, at]) => ({ id, seq: at })) })
}

function pairs(ids: readonly string[], seqs: readonly number[]): Map<string, number> {
  return new Map(ids.map((id, i) => [id, seqs[i] ?? 0]))
}

export function noSuchWorkbook() {
  return fail('not-found', 'There is no such workbook.')
}
