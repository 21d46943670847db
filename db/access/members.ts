import { createHash, randomBytes, randomUUID } from 'node:crypto'
import { z } from 'zod'
import { fail, type Result, succeed } from '../../lib/failures'
import { database, withFirm } from '../connection'
import { admitTry, endSession, forgetTry, memberByEmail, sessionById } from '../repositories/doors'
import {
  endSessionsOf,
  insertMember,
  insertSession,
  lockMember,
  lockOwners,
  markMemberRemoved,
  selectMembers,
} from '../repositories/members'
import { type Actor, keepsPeople, type Role } from './actor'
import { attempt } from './attempt'
import { hashPassword, passwordMatches } from './passwords'

export type { Actor, Role } from './actor'

export interface SignInRequest {
  readonly email: string
  readonly password: string
  /** Where the request came from; tries are counted by it too. */
  readonly address: string
}

export interface SignedIn {
  /** 256 random bits, base64url. Only its hash is stored: this is the one time it is seen. */
  readonly sessionToken: string
  readonly member: { readonly id: string; readonly name: string; readonly role: Role }
}

/**
 * Opens a session. Failures: `unauthenticated` (the same for a wrong password, an unknown address and a removed
 * member, and after the same time), `too-many` (see `door_admit_try` for the limits), `unavailable`.
 */
export function signIn(request: SignInRequest): Promise<Result<SignedIn>> {
  return attempt(async () => {
    const db = database()
    const email = foldEmail(request.email).slice(0, 254)
    const address = request.address.slice(0, 64)
    const { try_id, wait_seconds } = await admitTry(db, email, address)
    if (try_id === null) {
      const minutes = Math.ceil(wait_seconds / 60)
      return fail(
        'too-many',
        `Too many tries. Wait ${minutes} ${minutes === 1 ? 'minute' : 'minutes'} and try again.`,
      )
    }
    const found = await memberByEmail(db, email)
    if (!(await passwordMatches(request.password, found?.password_hash)) || !found) {
      return fail('unauthenticated', 'The e-mail address or the password is wrong.')
    }
    const token = randomBytes(32).toString('base64url')
    await withFirm(db, found.firm_id, (trx) =>
      insertSession(trx, {
        firmId: found.firm_id,
        id: sessionHash(token),
        memberId: found.member_id,
        address,
      }),
    )
    await forgetTry(db, try_id)
    return succeed({
      sessionToken: token,
      member: { id: found.member_id, name: found.name, role: found.role },
    })
  })
}

/**
 * Who a session token stands for now. `unauthenticated` when it is unknown, ended, idle for 8 hours, 30 days old,
 * or its member was removed.
 */
export function actorOf(sessionToken: string): Promise<Result<Actor>> {
  return attempt(async () => {
    const id = sessionHash(sessionToken)
    const found = await sessionById(database(), id)
    if (!found) return fail('unauthenticated', 'You are signed out. Sign in again to go on.')
    return succeed({
      memberId: found.member_id,
      firmId: found.firm_id,
      firmName: found.firm_name,
      name: found.name,
      email: found.email,
      role: found.role,
      sessionId: id.toString('hex'),
    })
  })
}

/** Ends the session for good; nothing to do when it has ended. */
export function signOut(sessionToken: string): Promise<Result<void>> {
  return attempt(async () => {
    await endSession(database(), sessionHash(sessionToken))
    return succeed(undefined)
  })
}

export interface MemberListed {
  readonly id: string
  readonly email: string
  readonly name: string
  readonly role: Role
}

/** The firm's people, by name. */
export function listMembers(actor: Actor): Promise<Result<readonly MemberListed[]>> {
  return attempt(async () =>
    succeed(await withFirm(database(), actor.firmId, (trx) => selectMembers(trx, actor.firmId))),
  )
}

export const newMemberSchema = z.strictObject({
  email: z
    .string()
    .max(254)
    .transform(foldEmail)
    .pipe(z.email('an e-mail address such as name@firm.example is expected')),
  name: z.string().trim().min(1).max(120),
  role: z.enum(['owner', 'manager', 'estimator', 'viewer']),
  password: z.string(),
})
export type NewMember = z.input<typeof newMemberSchema>

/** Adds a person; owners and managers may, and only owners add owners. `id` is for seeds. */
export function addMember(
  actor: Actor,
  member: NewMember,
  id: string = randomUUID(),
): Promise<Result<{ id: string }>> {
  return attempt(async () => {
    const parsed = newMemberSchema.safeParse(member)
    if (!parsed.success) return fail('invalid', z.prettifyError(parsed.error))
    const { email, name, role, password } = parsed.data
    const refused = refusalToChange(actor, role)
    if (refused) return refused
    const hashed = await hashPassword(password)
    if (!hashed.ok) return hashed
    const added = await withFirm(database(), actor.firmId, (trx) =>
      insertMember(trx, { firmId: actor.firmId, id, email, name, role, passwordHash: hashed.value }),
    )
    if (!added)
      return fail('invalid', 'Somebody signs in with that e-mail address already.', { name: 'email' })
    return succeed({ id })
  })
}

/** Removes a person and ends their sessions in the same transaction. The last owner stays. */
export function removeMember(actor: Actor, memberId: string): Promise<Result<void>> {
  return attempt(async () => {
    if (!keepsPeople(actor.role)) return fail('forbidden', 'Only an owner or a manager may remove people.')
    if (!z.uuid().safeParse(memberId).success) return noSuchMember()
    return withFirm(database(), actor.firmId, async (trx): Promise<Result<void>> => {
      const owners = await lockOwners(trx, actor.firmId)
      const member = await lockMember(trx, actor.firmId, memberId)
      if (!member) return noSuchMember()
      const refused = refusalToChange(actor, member.role)
      if (refused) return refused
      if (owners.length === 1 && owners[0] === memberId) {
        return fail('forbidden', 'The firm needs an owner. Make somebody else owner first.')
      }
      await markMemberRemoved(trx, actor.firmId, memberId)
      await endSessionsOf(trx, actor.firmId, memberId)
      return succeed(undefined)
    })
  })
}

function refusalToChange(actor: Actor, role: Role) {
  if (!keepsPeople(actor.role))
    return fail('forbidden', 'Only an owner or a manager may add or remove people.')
  if (role === 'owner' && actor.role !== 'owner') {
    return fail('forbidden', 'Only an owner may add or remove an owner.')
  }
  return undefined
}

function noSuchMember() {
  return fail('not-found', 'There is no such person in your firm.')
}

/** Addresses are compared without regard to case and outer spaces. */
export function foldEmail(email: string): string {
  return email.trim().normalize('NFC').toLowerCase()
}

function sessionHash(token: string): Buffer {
  return createHash('sha256').update(token).digest()
}
