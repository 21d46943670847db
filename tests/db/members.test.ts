import { randomUUID } from 'node:crypto'
import { beforeAll, describe, expect, test } from 'vitest'
import { foundFirm } from '@/db/access/firms'
import { actorOf, addMember, listMembers, removeMember, signIn, signOut } from '@/db/access/members'
import { asAdmin, expectOk, makeFirm, signInAs, type TestFirm, testPassword } from '../_support/database'

let firm: TestFirm
beforeAll(async () => {
  firm = await makeFirm()
})

let place = 0
/** A place that nobody has signed in from. */
const somewhere = () => {
  place += 1
  return `198.51.100.${place}`
}

describe('signing in', () => {
  test('opens a session that says who it is, whatever the case of the address', async () => {
    const email = ` ${firm.emails.estimator.toUpperCase()} `
    const { sessionToken, member } = expectOk(
      await signIn({ email, password: testPassword, address: somewhere() }),
    )
    expect(Buffer.from(sessionToken, 'base64url').length).toBe(32)
    expect(member.role).toBe('estimator')
    expect(expectOk(await actorOf(sessionToken))).toMatchObject({
      firmId: firm.id,
      firmName: firm.name,
      memberId: member.id,
      email: firm.emails.estimator,
      role: 'estimator',
    })
  })

  test('the token is not in the database', async () => {
    const { token } = await signInAs(firm.emails.viewer)
    const rows = await asAdmin<{ found: boolean }>(
      'select bool_or(id = $1 or id = $2) as found from session',
      [Buffer.from(token), Buffer.from(token, 'base64url')],
    )
    expect(rows[0]?.found).toBe(false)
  })

  test.each([
    ['a wrong password', () => firm.emails.owner, 'not the password'],
    ['an unknown address', () => 'nobody@nowhere.example', testPassword],
    ['nothing', () => '', ''],
    ['a very long password', () => firm.emails.owner, 'x'.repeat(100_000)],
    ['a password hash', () => firm.emails.owner, '$argon2id$v=19$m=19456,t=2,p=1$AAAA$AAAA'],
  ])('%s is refused in the same words', async (_what, email, password) => {
    const result = await signIn({ email: email(), password, address: somewhere() })
    expect(result).toEqual({
      ok: false,
      failure: { code: 'unauthenticated', text: 'The e-mail address or the password is wrong.' },
    })
  })

  test('an unknown address takes about as long as a known one', async () => {
    const times = { known: [] as number[], unknown: [] as number[] }
    for (let round = 0; round < 5; round++) {
      times.known.push(
        await timeOf(() => signIn({ email: firm.emails.manager, password: 'wrong one', address: 'timing' })),
      )
      times.unknown.push(
        await timeOf(() =>
          signIn({ email: `${randomUUID()}@x.example`, password: 'wrong one', address: 'timing' }),
        ),
      )
    }
    // The hash is what takes the time; without it an answer comes ten times sooner.
    expect(Math.min(...times.unknown)).toBeGreaterThan(Math.min(...times.known) * 0.5)
  })

  test('passwords are kept as argon2id', async () => {
    const rows = await asAdmin<{ password_hash: string }>('select password_hash from member')
    for (const row of rows) expect(row.password_hash).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/)
  })
})

describe('the limit on tries', () => {
  test('ten failures, then the right password must wait too; other accounts need not', async () => {
    const other = await makeFirm()
    const address = somewhere()
    for (let n = 0; n < 10; n++) {
      const result = await signIn({ email: other.emails.owner, password: `wrong ${n}`, address })
      expect(result).toMatchObject({ failure: { code: 'unauthenticated' } })
    }
    const eleventh = await signIn({ email: other.emails.owner, password: testPassword, address })
    expect(eleventh).toMatchObject({ ok: false, failure: { code: 'too-many' } })
    expect(eleventh.ok ? '' : eleventh.failure.text).toMatch(/Wait 1[45] minutes/)
    expect(await signIn({ email: other.emails.viewer, password: testPassword, address })).toMatchObject({
      ok: true,
    })
  })

  test('strangers do not lock a person out of the place they sign in from', async () => {
    const other = await makeFirm()
    const home = somewhere()
    expectOk(await signIn({ email: other.emails.owner, password: testPassword, address: home }))
    for (let n = 0; n < 12; n++)
      await signIn({ email: other.emails.owner, password: 'guess', address: somewhere() })
    const stranger = await signIn({ email: other.emails.owner, password: testPassword, address: somewhere() })
    expect(stranger).toMatchObject({ failure: { code: 'too-many' } })
    expectOk(await signIn({ email: other.emails.owner, password: testPassword, address: home }))
  })

  test('after fifteen minutes it is lifted', async () => {
    const other = await makeFirm()
    for (let n = 0; n < 10; n++)
      await signIn({ email: other.emails.owner, password: 'guess', address: somewhere() })
    const again = () => signIn({ email: other.emails.owner, password: testPassword, address: somewhere() })
    expect(await again()).toMatchObject({ failure: { code: 'too-many' } })
    await asAdmin(`update sign_in_try set at = at - interval '15 minutes' where email = $1`, [
      other.emails.owner,
    ])
    expectOk(await again())
  })

  test('success does not count, and is counted for nobody', async () => {
    const other = await makeFirm()
    const address = somewhere()
    for (let n = 0; n < 15; n++)
      expectOk(await signIn({ email: other.emails.owner, password: testPassword, address }))
  })

  test('forty tries at once: ten are looked at', async () => {
    const email = (await makeFirm()).emails.owner
    const tries = Array.from({ length: 40 }, () => signIn({ email, password: 'guess', address: somewhere() }))
    const codes = (await Promise.all(tries)).map((result) => (result.ok ? 'ok' : result.failure.code))
    expect(codes.filter((code) => code === 'unauthenticated').length).toBe(10)
    expect(codes.filter((code) => code === 'too-many').length).toBe(30)
  })

  test('one address over many accounts: sixty', async () => {
    const address = somewhere()
    await asAdmin(
      `insert into sign_in_try (email, address) select n || '@many.example', $1 from generate_series(1, 59) n`,
      [address],
    )
    const next = (n: number) => signIn({ email: `next-${n}@many.example`, password: 'guess', address })
    expect(await next(1)).toMatchObject({ failure: { code: 'unauthenticated' } })
    expect(await next(2)).toMatchObject({ failure: { code: 'too-many' } })
  })
})

describe('a session', () => {
  const shift = (token: string, column: string, by: string) =>
    asAdmin(`update session set ${column} = ${column} - $2::interval where id = sha256($1::bytea)`, [
      Buffer.from(token),
      by,
    ])

  test.each([
    ['idle for 7 h 59 min', 'last_seen_at', '7 hours 59 minutes', true],
    ['idle for 8 h', 'last_seen_at', '8 hours', false],
    ['29 days old', 'created_at', '29 days', true],
    ['30 days old', 'created_at', '30 days', false],
  ])('%s', async (_what, column, by, alive) => {
    const { token } = await signInAs(firm.emails.estimator)
    await shift(token, column, by)
    const result = await actorOf(token)
    expect(result.ok ? 'alive' : result.failure.code).toBe(alive ? 'alive' : 'unauthenticated')
  })

  test('use is noted at most once a minute', async () => {
    const { token } = await signInAs(firm.emails.estimator)
    const seen = async () =>
      (
        await asAdmin<{ t: Date }>('select last_seen_at as t from session where id = sha256($1::bytea)', [
          Buffer.from(token),
        ])
      )[0]?.t
    const first = await seen()
    expectOk(await actorOf(token))
    expect(await seen()).toEqual(first)
    await shift(token, 'last_seen_at', '61 seconds')
    expectOk(await actorOf(token))
    expect((await seen())?.getTime()).toBeGreaterThanOrEqual(first?.getTime() ?? Number.POSITIVE_INFINITY)
  })

  test('ends at sign-out, and no other does', async () => {
    const one = await signInAs(firm.emails.estimator)
    const two = await signInAs(firm.emails.estimator)
    expectOk(await signOut(one.token))
    expect(await actorOf(one.token)).toMatchObject({ failure: { code: 'unauthenticated' } })
    expectOk(await actorOf(two.token))
    expectOk(await signOut(one.token))
  })

  test.each(['', 'x', 'A'.repeat(43), "' or true --"])('%j is nobody', async (token) => {
    expect(await actorOf(token)).toMatchObject({ failure: { code: 'unauthenticated' } })
  })
})

describe('people', () => {
  test('removal ends every session at once, and the password no longer opens one', async () => {
    const other = await makeFirm()
    const second = await signInAs(other.emails.viewer)
    expectOk(await removeMember(other.actors.manager, other.actors.viewer.memberId))
    for (const token of [other.tokens.viewer, second.token]) {
      expect(await actorOf(token)).toMatchObject({ failure: { code: 'unauthenticated' } })
    }
    expect(
      await signIn({ email: other.emails.viewer, password: testPassword, address: somewhere() }),
    ).toMatchObject({
      failure: { code: 'unauthenticated' },
    })
    const names = expectOk(await listMembers(other.actors.owner)).map((member) => member.role)
    expect(names.sort()).toEqual(['estimator', 'manager', 'owner'])
  })

  test.each([
    ['estimator', 'viewer', 'forbidden'],
    ['viewer', 'viewer', 'forbidden'],
    ['manager', 'owner', 'forbidden'],
    ['owner', 'owner', 'forbidden'],
  ] as const)('%s does not remove %s', async (by, whom, code) => {
    expect(await removeMember(firm.actors[by], firm.actors[whom].memberId)).toMatchObject({
      failure: { code },
    })
    expectOk(await actorOf(firm.tokens[whom]))
  })

  test("another firm's person is not found, like one that never was", async () => {
    const other = await makeFirm()
    const theirs = await removeMember(firm.actors.owner, other.actors.viewer.memberId)
    expect(theirs).toMatchObject({ failure: { code: 'not-found' } })
    expect(await removeMember(firm.actors.owner, randomUUID())).toEqual(theirs)
    expect(await removeMember(firm.actors.owner, 'x')).toEqual(theirs)
    expectOk(await actorOf(other.tokens.viewer))
  })

  test.each([
    ['a taken address', { email: () => firm.emails.viewer.toUpperCase() }, 'invalid'],
    ['no address', { email: () => 'somebody' }, 'invalid'],
    ['two addresses', { email: () => 'a@x.example,b@x.example' }, 'invalid'],
    ['a short password', { password: () => '1234567' }, 'invalid'],
    ['no name', { name: () => '  ' }, 'invalid'],
  ])('is refused with %s', async (_what, change, code) => {
    const good = {
      email: `${randomUUID()}@x.example`,
      name: 'New',
      role: 'viewer' as const,
      password: testPassword,
    }
    const changes = Object.fromEntries(Object.entries(change).map(([key, value]) => [key, value()]))
    expect(await addMember(firm.actors.owner, { ...good, ...changes })).toMatchObject({ failure: { code } })
  })

  test('a manager adds no owner; an estimator adds nobody', async () => {
    const member = { email: `${randomUUID()}@x.example`, name: 'New', password: testPassword }
    expect(await addMember(firm.actors.manager, { ...member, role: 'owner' })).toMatchObject({
      failure: { code: 'forbidden' },
    })
    expect(await addMember(firm.actors.estimator, { ...member, role: 'viewer' })).toMatchObject({
      failure: { code: 'forbidden' },
    })
  })

  test('a firm is founded with its owner or not at all', async () => {
    const id = randomUUID()
    const owner = { id: randomUUID(), email: firm.emails.owner, name: 'Twice', password: testPassword }
    expect(await foundFirm({ id, name: 'Second', owner })).toMatchObject({ failure: { name: 'email' } })
    expect(await asAdmin('select id from firm where id = $1', [id])).toEqual([])
  })
})

async function timeOf(work: () => Promise<unknown>): Promise<number> {
  const start = performance.now()
  await work()
  return performance.now() - start
}
