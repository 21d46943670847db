import { sql } from 'kysely'
import type { FirmTransaction } from '../connection'
import type { MemberRole } from '../schema'

export interface NewMember {
  readonly firmId: string
  readonly id: string
  readonly email: string
  readonly name: string
  readonly role: MemberRole
  readonly passwordHash: string
}

export async function insertFirm(trx: FirmTransaction, firm: { id: string; name: string }): Promise<boolean> {
  const result = await trx
    .insertInto('firm')
    .values(firm)
    .onConflict((conflict) => conflict.column('id').doNothing())
    .executeTakeFirst()
  return result.numInsertedOrUpdatedRows === 1n
}

/** False when a member of any firm has that e-mail address. */
export async function insertMember(trx: FirmTransaction, member: NewMember): Promise<boolean> {
  const result = await trx
    .insertInto('member')
    .values({
      firm_id: member.firmId,
      id: member.id,
      email: member.email,
      name: member.name,
      role: member.role,
      password_hash: member.passwordHash,
    })
    .onConflict((conflict) => conflict.column('email').doNothing())
    .executeTakeFirst()
  return result.numInsertedOrUpdatedRows === 1n
}

export async function selectMembers(trx: FirmTransaction, firmId: string) {
  return trx
    .selectFrom('member')
    .select(['id', 'email', 'name', 'role'])
    .where('firm_id', '=', firmId)
    .where('removed_at', 'is', null)
    .orderBy(sql`name collate "en-x-icu"`)
    .execute()
}

/** Locks the row: a removal and a change of role wait for one another. */
export async function lockMember(trx: FirmTransaction, firmId: string, memberId: string) {
  return trx
    .selectFrom('member')
    .select(['id', 'role'])
    .where('firm_id', '=', firmId)
    .where('id', '=', memberId)
    .where('removed_at', 'is', null)
    .forUpdate()
    .executeTakeFirst()
}

/** The owners still there, locked, so that two cannot remove each other at once. */
export async function lockOwners(trx: FirmTransaction, firmId: string): Promise<readonly string[]> {
  const rows = await trx
    .selectFrom('member')
    .select('id')
    .where('firm_id', '=', firmId)
    .where('role', '=', 'owner')
    .where('removed_at', 'is', null)
    .orderBy('id')
    .forUpdate()
    .execute()
  return rows.map((row) => row.id)
}

export async function markMemberRemoved(
  trx: FirmTransaction,
  firmId: string,
  memberId: string,
): Promise<void> {
  await trx
    .updateTable('member')
    .set({ removed_at: sql<Date>`now()` })
    .where('firm_id', '=', firmId)
    .where('id', '=', memberId)
    .execute()
}

export async function insertSession(
  trx: FirmTransaction,
  session: { firmId: string; id: Buffer; memberId: string; address: string },
): Promise<void> {
  await trx
    .insertInto('session')
    .values({
      firm_id: session.firmId,
      id: session.id,
      member_id: session.memberId,
      address: session.address,
    })
    .execute()
}

export async function endSessionsOf(trx: FirmTransaction, firmId: string, memberId: string): Promise<void> {
  await trx
    .updateTable('session')
    .set({ ended_at: sql<Date>`now()` })
    .where('firm_id', '=', firmId)
    .where('member_id', '=', memberId)
    .where('ended_at', 'is', null)
    .execute()
}
