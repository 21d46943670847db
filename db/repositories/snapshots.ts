import type { FirmTransaction } from '../connection'

export interface NewSnapshot {
  readonly firmId: string
  readonly workbookId: string
  readonly seq: number
  readonly body: string
  readonly values?: string | undefined
}

/** Writes a snapshot, or adds values to one that is there: at one sequence the body is always the same. */
export async function upsertSnapshot(trx: FirmTransaction, snapshot: NewSnapshot): Promise<void> {
  const values = snapshot.values ?? null
  await trx
    .insertInto('snapshot')
    .values({
      firm_id: snapshot.firmId,
      workbook_id: snapshot.workbookId,
      seq: snapshot.seq,
      body: snapshot.body,
      values,
    })
    .onConflict((conflict) => {
      const at = conflict.columns(['firm_id', 'workbook_id', 'seq'])
      return values === null ? at.doNothing() : at.doUpdateSet({ values })
    })
    .execute()
}

/** False when there is no snapshot at that sequence. */
export async function updateSnapshotValues(
  trx: FirmTransaction,
  firmId: string,
  workbookId: string,
  seq: number,
  values: string,
): Promise<boolean> {
  const result = await trx
    .updateTable('snapshot')
    .set({ values })
    .where('firm_id', '=', firmId)
    .where('workbook_id', '=', workbookId)
    .where('seq', '=', seq)
    .executeTakeFirst()
  return result.numUpdatedRows === 1n
}

/** Newest first, without the bodies. */
export async function selectSnapshotHeads(trx: FirmTransaction, firmId: string, workbookId: string) {
  return trx
    .selectFrom('snapshot')
    .select(['seq'])
    .select((eb) => eb('values', 'is not', null).as('hasValues'))
    .where('firm_id', '=', firmId)
    .where('workbook_id', '=', workbookId)
    .orderBy('seq', 'desc')
    .execute()
}

export async function selectSnapshot(trx: FirmTransaction, firmId: string, workbookId: string, seq: number) {
  return trx
    .selectFrom('snapshot')
    .select(['seq', 'body', 'values'])
    .where('firm_id', '=', firmId)
    .where('workbook_id', '=', workbookId)
    .where('seq', '=', seq)
    .executeTakeFirst()
}

/** Removes snapshots by sequence; the first one (0) stays whatever is asked. */
export async function deleteSnapshots(
  trx: FirmTransaction,
  firmId: string,
  workbookId: string,
  seqs: readonly number[],
): Promise<void> {
  if (seqs.length === 0) return
  await trx
    .deleteFrom('snapshot')
    .where('firm_id', '=', firmId)
    .where('workbook_id', '=', workbookId)
    .where('seq', '>', 0)
    .where('seq', 'in', [...seqs])
    .execute()
}
