import { randomUUID } from 'node:crypto'
import { foundFirm } from '@/db/access/firms'
import { type Actor, actorOf, addMember, type Role, signIn } from '@/db/access/members'
import { withClient } from '@/db/server/sql.mjs'
import type { Result } from '@/lib/failures'

/** Builders for tests of the `db` project. Everything is made through `db/access`. */

export const testPassword = 'a password for tests'

/** The value of a result that must be a success. */
export function expectOk<T>(result: Result<T>): T {
  if (result.ok) return result.value
  throw new Error(
    `expected success, got ${result.failure.code}: ${result.failure.text} ${result.failure.message ?? ''}`,
  )
}

export interface TestFirm {
  readonly id: string
  readonly name: string
  readonly emails: Readonly<Record<Role, string>>
  readonly actors: Readonly<Record<Role, Actor>>
  readonly tokens: Readonly<Record<Role, string>>
}

/** A firm with one member of each role, all signed in. */
export async function makeFirm(name = 'Test Firm'): Promise<TestFirm> {
  const id = randomUUID()
  const domain = `${id.slice(0, 8)}.example`
  const emails = {
    owner: `owner@${domain}`,
    manager: `manager@${domain}`,
    estimator: `estimator@${domain}`,
    viewer: `viewer@${domain}`,
  }
  const owner = { id: randomUUID(), email: emails.owner, name: 'Owner', password: testPassword }
  expectOk(await foundFirm({ id, name, owner }))
  const ownerSession = await signInAs(emails.owner)
  for (const role of ['manager', 'estimator', 'viewer'] as const) {
    const member = { email: emails[role], name: role, role, password: testPassword }
    expectOk(await addMember(ownerSession.actor, member))
  }
  const sessions = {
    owner: ownerSession,
    manager: await signInAs(emails.manager),
    estimator: await signInAs(emails.estimator),
    viewer: await signInAs(emails.viewer),
  }
  return { id, name, emails, actors: each(sessions, (s) => s.actor), tokens: each(sessions, (s) => s.token) }
}

export async function signInAs(
  email: string,
  password = testPassword,
): Promise<{ token: string; actor: Actor }> {
  const { sessionToken } = expectOk(await signIn({ email, password, address: '192.0.2.1' }))
  return { token: sessionToken, actor: expectOk(await actorOf(sessionToken)) }
}

function each<A, B>(record: Record<Role, A>, change: (value: A) => B): Record<Role, B> {
  return {
    owner: change(record.owner),
    manager: change(record.manager),
    estimator: change(record.estimator),
    viewer: change(record.viewer),
  }
}

/** One statement as the cluster's superuser: to look behind row-level security, or to move clocks. */
export async function asAdmin<T extends object>(text: string, values: unknown[] = []): Promise<T[]> {
  return withClient(
    process.env.TEST_ADMIN_URL ?? '',
    async (client) => (await client.query<T>(text, values)).rows,
  )
}
