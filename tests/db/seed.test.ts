import { sql } from 'kysely'
import { expect, test } from 'vitest'
import { actorOf, signIn } from '@/db/access/members'
import { listWorkbooks, workbookForExport } from '@/db/access/workbooks'
import { connect } from '@/db/connection'
import { seedDemo } from '@/db/seed/demo'
import { asAdmin, expectOk } from '../_support/database'
import { demoFirm } from '../_support/sign-ins'

/** Everything in the tables, but sessions and tries, which signing in makes. */
async function contents(): Promise<unknown> {
  const tables = ['firm', 'member', 'workbook', 'operation', 'snapshot']
  return Promise.all(tables.map((table) => asAdmin(`select md5(t::text) from ${table} t order by 1`)))
}

test('the demo has three workbooks and a sign-in for each role; a second run changes nothing', async () => {
  expect((await seedDemo()).length).toBe(7)
  const first = await contents()
  expect(await seedDemo()).toEqual([])
  expect(await contents()).toEqual(first)
  for (const [role, email] of Object.entries(demoFirm.emails)) {
    const session = expectOk(await signIn({ email, password: demoFirm.password, address: 'test' }))
    const actor = expectOk(await actorOf(session.sessionToken))
    expect(actor.role).toBe(role)
    const listed = expectOk(await listWorkbooks(actor))
    expect(listed.length).toBe(3)
    for (const { id } of listed) expectOk(await workbookForExport(actor, id))
  }
})

test('an address of the owner alone puts the application’s role on', async () => {
  const db = connect(process.env.TEST_OWNER_URL ?? '', { role: 'panewright_app' })
  try {
    const { rows } = await sql`select current_user as who, count(*)::int as firms from firm`.execute(db)
    expect(rows).toEqual([{ who: 'panewright_app', firms: 0 }])
  } finally {
    await db.destroy()
  }
})
