import { type Kysely, sql } from 'kysely'
import type { DB, MemberRole } from '../schema'

/** The look-ups made before the firm is known; each calls one narrow function of the database. */

export interface DoorMember {
  readonly firm_id: string
  readonly member_id: string
  readonly name: string
  readonly role: MemberRole
  readonly password_hash: string
}

export async function memberByEmail(db: Kysely<DB>, email: string): Promise<DoorMember | undefined> {
  const { rows } = await sql<DoorMember>`select * from door_member(${email})`.execute(db)
  return rows[0]
}

export interface DoorSession {
  readonly firm_id: string
  readonly firm_name: string
  readonly member_id: string
  readonly name: string
  readonly email: string
  readonly role: MemberRole
}

/** The person behind a live session; notes the use. */
export async function sessionById(db: Kysely<DB>, id: Buffer): Promise<DoorSession | undefined> {
  const { rows } = await sql<DoorSession>`select * from door_session(${id})`.execute(db)
  return rows[0]
}

export async function endSession(db: Kysely<DB>, id: Buffer): Promise<void> {
  await sql`select door_end_session(${id})`.execute(db)
}

/** `try_id` is null when the limit is reached; then `wait_seconds` says how long. */
export async function admitTry(
  db: Kysely<DB>,
  email: string,
  address: string,
): Promise<{ readonly try_id: string | null; readonly wait_seconds: number }> {
  const { rows } = await sql<{ try_id: string | null; wait_seconds: number }>`
    select * from door_admit_try(${email}, ${address})`.execute(db)
  const [row] = rows
  if (!row) throw new Error('door_admit_try gave no row')
  return row
}

export async function forgetTry(db: Kysely<DB>, tryId: string): Promise<void> {
  await sql`select door_forget_try(${tryId})`.execute(db)
}
