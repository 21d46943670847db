import { type Kysely, sql } from 'kysely'
import type { FirmTransaction } from '../connection'
import type { DB } from '../schema'

export interface AppendRow {
  readonly outcome: 'appended' | 'known' | 'mixed' | 'behind' | 'ahead' | 'absent'
  readonly head: number
  readonly ids: readonly string[]
  readonly seqs: readonly number[]
  readonly at: Date | null
}

export interface AppendBatch {
  readonly firmId: string
  readonly workbookId: string
  readonly authorId: string
  readonly base: number
  readonly ids: readonly string[]
  readonly batches: readonly string[]
  readonly bodies: readonly string[]
}

/**
 * One statement, which is its own transaction and sets the firm itself (two round trips fewer than `withFirm`).
 * `db` must not be a transaction of another firm.
 */
export async function appendOperations(db: Kysely<DB>, batch: AppendBatch): Promise<AppendRow> {
  const { rows } = await sql<AppendRow>`
    select * from append_operations(${batch.firmId}::uuid, ${batch.workbookId}::uuid, ${batch.authorId}::uuid,
      ${batch.base}::integer, ${batch.ids}::uuid[], ${batch.batches}::uuid[], ${batch.bodies}::text[])`.execute(
    db,
  )
  const [row] = rows
  if (!row) throw new Error('append_operations gave no row')
  return row
}

/** In order, all operations after `seq`. */
export async function selectOperationsAfter(
  trx: FirmTransaction,
  firmId: string,
  workbookId: string,
  seq: number,
) {
  return trx
    .selectFrom('operation')
    .select(['seq', 'id', 'batch', 'author_id', 'at', 'body'])
    .where('firm_id', '=', firmId)
    .where('workbook_id', '=', workbookId)
    .where('seq', '>', seq)
    .orderBy('seq')
    .execute()
}

/** Those of `ids` that are in the log, with their sequences. */
export async function selectKnown(
  trx: FirmTransaction,
  firmId: string,
  workbookId: string,
  ids: readonly string[],
) {
  return trx
    .selectFrom('operation')
    .select(['id', 'seq'])
    .where('firm_id', '=', firmId)
    .where('workbook_id', '=', workbookId)
    .where('id', 'in', [...ids])
    .execute()
}
