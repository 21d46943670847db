import { sql } from 'kysely'
import type { FirmTransaction } from '../connection'
import type { Json } from '../schema'

export interface NewWorkbook {
  readonly firmId: string
  readonly id: string
  readonly title: string
  readonly createdBy: string
  readonly at: string
}

/** False when the firm has a workbook with that id already. */
export async function insertWorkbook(trx: FirmTransaction, workbook: NewWorkbook): Promise<boolean> {
  const result = await trx
    .insertInto('workbook')
    .values({
      firm_id: workbook.firmId,
      id: workbook.id,
      title: workbook.title,
      created_by: workbook.createdBy,
      created_at: workbook.at,
      updated_at: workbook.at,
    })
    .onConflict((conflict) => conflict.columns(['firm_id', 'id']).doNothing())
    .executeTakeFirst()
  return result.numInsertedOrUpdatedRows === 1n
}

/** Most recently changed first; `search` is looked for anywhere in the title, without regard to case. */
export async function selectWorkbooks(
  trx: FirmTransaction,
  firmId: string,
  filter: { readonly search?: string | undefined; readonly limit: number },
) {
  let query = trx
    .selectFrom('workbook')
    .innerJoin('member', (join) =>
      join.onRef('member.firm_id', '=', 'workbook.firm_id').onRef('member.id', '=', 'workbook.created_by'),
    )
    .select([
      'workbook.id',
      'workbook.title',
      'workbook.state',
      'workbook.seq',
      'workbook.updated_at',
      'workbook.tally',
      'member.name as created_by_name',
    ])
    .where('workbook.firm_id', '=', firmId)
    .where('workbook.removed_at', 'is', null)
  if (filter.search) {
    const pattern = `%${filter.search.replace(/[\\%_]/g, '\\$&')}%`
    query = query.where('workbook.title', 'ilike', pattern)
  }
  return query.orderBy('workbook.updated_at', 'desc').orderBy('workbook.id').limit(filter.limit).execute()
}

export async function selectWorkbook(trx: FirmTransaction, firmId: string, workbookId: string) {
  return trx
    .selectFrom('workbook')
    .select(['id', 'title', 'state', 'seq', 'created_by'])
    .where('firm_id', '=', firmId)
    .where('id', '=', workbookId)
    .where('removed_at', 'is', null)
    .executeTakeFirst()
}

/** False when there is no such workbook. */
export async function updateWorkbook(
  trx: FirmTransaction,
  firmId: string,
  workbookId: string,
  change: { readonly title?: string; readonly tally?: Json; readonly removed?: true },
): Promise<boolean> {
  const result = await trx
    .updateTable('workbook')
    .set({
      ...(change.title === undefined ? {} : { title: change.title, updated_at: sql<Date>`now()` }),
      ...(change.tally === undefined ? {} : { tally: JSON.stringify(change.tally) }),
      ...(change.removed ? { removed_at: sql<Date>`now()` } : {}),
    })
    .where('firm_id', '=', firmId)
    .where('id', '=', workbookId)
    .where('removed_at', 'is', null)
    .executeTakeFirst()
  return result.numUpdatedRows === 1n
}
