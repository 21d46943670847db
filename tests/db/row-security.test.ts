import { randomUUID } from 'node:crypto'
import { sql } from 'kysely'
import { describe, expect, test } from 'vitest'
import { connect, database, withFirm } from '@/db/connection'
import { asAdmin, makeFirm } from '../_support/database'

/** Tables with a firm_id (and `firm` itself) whose rows some firm could see without a policy of its own. */
function unprotectedTables(): Promise<{ table: string; lacks: string }[]> {
  return asAdmin(`
    select c.relname as table,
      concat_ws(', ',
        case when not c.relrowsecurity then 'enable' end,
        case when not c.relforcerowsecurity then 'force' end,
        case when not exists (
          select from pg_policy p where p.polrelid = c.oid and p.polpermissive and p.polcmd = '*'
            and p.polroles = '{0}' and pg_get_expr(p.polqual, c.oid) like '%app.firm%'
            and pg_get_expr(p.polwithcheck, c.oid) like '%app.firm%') then 'policy' end) as lacks
    from pg_class c join pg_namespace n on n.oid = c.relnamespace
    where n.nspname = 'public' and c.relkind in ('r', 'p')
      and (c.relname = 'firm' or exists (
        select from pg_attribute a where a.attrelid = c.oid and a.attname = 'firm_id' and not a.attisdropped))
      and (not c.relrowsecurity or not c.relforcerowsecurity or not exists (
        select from pg_policy p where p.polrelid = c.oid and p.polpermissive and p.polcmd = '*'
          and p.polroles = '{0}' and pg_get_expr(p.polqual, c.oid) like '%app.firm%'
          and pg_get_expr(p.polwithcheck, c.oid) like '%app.firm%'))
    order by 1`)
}

describe('the wall between firms in the database', () => {
  test('every table with a firm_id has row-level security, forced, with a policy both ways', async () => {
    expect(await unprotectedTables()).toEqual([])
  })

  test('a table that lacks it is found', async () => {
    await asAdmin('create table bare (firm_id uuid, note text)')
    await asAdmin('create table half (firm_id uuid)')
    await asAdmin('alter table half enable row level security')
    await asAdmin('create policy open on half using (true) with check (true)')
    try {
      expect(await unprotectedTables()).toEqual([
        { table: 'bare', lacks: 'enable, force, policy' },
        { table: 'half', lacks: 'force, policy' },
      ])
    } finally {
      await asAdmin('drop table bare, half')
    }
  })

  test('other tables are named here, with nothing granted to the application', async () => {
    const rows = await asAdmin<{ table: string; granted: boolean }>(`
      select c.relname as table,
        has_table_privilege('panewright_app', c.oid, 'select, insert, update, delete') as granted
      from pg_class c join pg_namespace n on n.oid = c.relnamespace
      where n.nspname = 'public' and c.relkind in ('r', 'p', 'v', 'm') and not c.relrowsecurity order by 1`)
    expect(rows).toEqual([
      { table: 'kysely_migration', granted: false },
      { table: 'kysely_migration_lock', granted: false },
      { table: 'sign_in_try', granted: false },
    ])
  })

  test('neither the application, the door nor the owner is a superuser or may bypass it', async () => {
    const rows = await asAdmin(`
      select rolname, rolsuper or rolbypassrls or rolreplication as free,
        exists (select from pg_class c where c.relowner = r.oid and c.relname = 'workbook') as owns
      from pg_roles r where rolname like 'panewright%' and rolname <> 'panewright_admin' order by 1`)
    expect(rows).toEqual([
      { rolname: 'panewright_app', free: false, owns: false },
      { rolname: 'panewright_door', free: false, owns: false },
      { rolname: 'panewright_owner', free: false, owns: true },
    ])
  })

  test('functions that run with rights of their own are the five of the door, with a fixed search path', async () => {
    const rows = await asAdmin(`
      select p.proname as name, r.rolname as owner, p.proconfig::text as config,
        has_function_privilege('public', p.oid, 'execute') as open
      from pg_proc p join pg_roles r on r.oid = p.proowner join pg_namespace n on n.oid = p.pronamespace
      where n.nspname = 'public' and p.prosecdef order by 1`)
    const fixed = {
      owner: 'panewright_door',
      config: '{"search_path=pg_catalog, public, pg_temp"}',
      open: false,
    }
    expect(rows).toEqual(
      ['door_admit_try', 'door_end_session', 'door_forget_try', 'door_member', 'door_session'].map(
        (name) => ({
          name,
          ...fixed,
        }),
      ),
    )
  })

  test('unique and foreign keys between tenant tables include the firm', async () => {
    const rows = await asAdmin(`
      select c.conrelid::regclass::text as table, pg_get_constraintdef(c.oid) as key
      from pg_constraint c
      where c.contype in ('u', 'p', 'f') and c.connamespace = 'public'::regnamespace
        and exists (select from pg_attribute a where a.attrelid = c.conrelid and a.attname = 'firm_id')
        and not exists (select from pg_attribute a
          where a.attrelid = c.conrelid and a.attname = 'firm_id' and a.attnum = any (c.conkey))
      order by 1`)
    // Signing in asks for nothing but an address, and a session's id is 256 random bits.
    expect(rows).toEqual([
      { table: 'member', key: 'UNIQUE (email)' },
      { table: 'session', key: 'PRIMARY KEY (id)' },
    ])
  })

  test('with no firm set, the application and the owner see nothing and add nothing', async () => {
    const firm = await makeFirm()
    const insert = sql`insert into workbook (firm_id, id, title, created_by, created_at, updated_at)
      values (${firm.id}::uuid, ${randomUUID()}::uuid, 'x', ${firm.actors.owner.memberId}::uuid, now(), now())`
    const owner = connect(process.env.TEST_OWNER_URL ?? '')
    try {
      for (const db of [database(), owner]) {
        for (const table of ['firm', 'member', 'session', 'workbook', 'operation', 'snapshot']) {
          const { rows } = await sql<{ count: string }>`select count(*) from ${sql.table(table)}`.execute(db)
          expect([table, rows[0]?.count]).toEqual([table, '0'])
        }
        await expect(insert.execute(db)).rejects.toThrow(/row-level security/)
      }
    } finally {
      await owner.destroy()
    }
  })

  test('another firm set: no row is seen, changed, removed or referred to', async () => {
    const mine = await makeFirm()
    const theirs = await makeFirm()
    const id = await insertWorkbook(theirs.id, theirs.actors.owner.memberId)
    await withFirm(database(), mine.id, async (trx) => {
      expect(await trx.selectFrom('workbook').select('id').where('id', '=', id).execute()).toEqual([])
      const changed = await trx
        .updateTable('workbook')
        .set({ title: 'mine now' })
        .where('id', '=', id)
        .execute()
      expect(changed[0]?.numUpdatedRows).toBe(0n)
    })
    const addTo = (firmId: string, workbookFirm: string) =>
      withFirm(database(), firmId, (trx) =>
        trx
          .insertInto('snapshot')
          .values({ firm_id: workbookFirm, workbook_id: id, seq: 7, body: '{}' })
          .execute(),
      )
    await expect(addTo(mine.id, theirs.id)).rejects.toThrow(/row-level security/)
    await expect(addTo(mine.id, mine.id)).rejects.toThrow(/foreign key/)
  })

  test('the log can be added to, not changed; the first snapshot cannot be removed', async () => {
    const firm = await makeFirm()
    const id = await insertWorkbook(firm.id, firm.actors.owner.memberId)
    const refused = [
      sql`update operation set body = '{}'`,
      sql`delete from operation`,
      sql`truncate operation`,
      sql`delete from workbook`,
      sql`update snapshot set body = '{}'`,
      sql`update workbook set firm_id = ${randomUUID()}::uuid`,
      sql`alter table operation disable row level security`,
      sql`set role panewright_owner`,
      sql`select password_hash from sign_in_try`,
    ]
    for (const statement of refused) {
      await expect(withFirm(database(), firm.id, (trx) => statement.execute(trx))).rejects.toThrow(
        /permission denied|must be owner|does not exist/,
      )
    }
    await withFirm(database(), firm.id, async (trx) => {
      for (const seq of [0, 50]) {
        await trx
          .insertInto('snapshot')
          .values({ firm_id: firm.id, workbook_id: id, seq, body: '{}' })
          .execute()
      }
      await trx.deleteFrom('snapshot').execute()
      expect(await trx.selectFrom('snapshot').select('seq').execute()).toEqual([{ seq: 0 }])
    })
  })

  test('600 mixed queries of fifty clients of two firms over five connections, with rollbacks: no foreign row', async () => {
    const firms = [await makeFirm(), await makeFirm()] as const
    const db = connect(process.env.APP_DATABASE_URL ?? '', { max: 5 })
    let foreign = 0
    let rolledBack = 0
    const one = async (n: number) => {
      const firm = firms[n % 2] ?? firms[0]
      if (n % 7 === 3) {
        // Outside of a firm's transaction a pooled connection must carry nothing over.
        foreign += (await db.selectFrom('workbook').select('firm_id').execute()).length
        foreign += (await db.selectFrom('member').select('firm_id').execute()).length
        return
      }
      await withFirm(db, firm.id, async (trx) => {
        if (n % 3 === 0) {
          await trx
            .insertInto('workbook')
            .values({
              firm_id: firm.id,
              id: randomUUID(),
              title: `${n}`,
              created_by: firm.actors.owner.memberId,
              created_at: new Date(),
              updated_at: new Date(),
            })
            .execute()
        }
        const workbooks = await trx.selectFrom('workbook').select('firm_id').execute()
        const members = await trx.selectFrom('member').select('firm_id').execute()
        expect(members.length).toBe(4)
        foreign += [...workbooks, ...members].filter((row) => row.firm_id !== firm.id).length
        if (n % 5 === 0) throw new Error('roll back')
      }).catch((error: Error) => {
        if (error.message !== 'roll back') throw error
        rolledBack += 1
      })
    }
    try {
      const client = async (first: number) => {
        for (let n = first; n < 600; n += 50) await one(n)
      }
      await Promise.all(Array.from({ length: 50 }, (_, first) => client(first)))
    } finally {
      await db.destroy()
    }
    expect(foreign).toBe(0)
    expect(rolledBack).toBeGreaterThan(50)
  })
})

async function insertWorkbook(firmId: string, memberId: string): Promise<string> {
  const id = randomUUID()
  await withFirm(database(), firmId, (trx) =>
    trx
      .insertInto('workbook')
      .values({
        firm_id: firmId,
        id,
        title: 'A house',
        created_by: memberId,
        created_at: new Date(),
        updated_at: new Date(),
      })
      .execute(),
  )
  return id
}
