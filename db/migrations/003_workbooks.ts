import { type Kysely, sql } from 'kysely'

/** Workbooks, the log of their operations (only ever added to) and snapshots (rebuilt from the log at will). */
export async function up(db: Kysely<unknown>): Promise<void> {
  await sql`
    create type workbook_state as enum
      ('draft', 'in-review', 'approved', 'quoted', 'accepted', 'declined', 'expired', 'ordered')
  `.execute(db)
  await sql`
    create table workbook (
      firm_id uuid not null references firm (id),
      id uuid not null,
      title text not null check (char_length(title) between 1 and 120),
      state workbook_state not null default 'draft',
      seq integer not null default 0 check (seq >= 0),
      created_by uuid not null,
      created_at timestamptz not null,
      updated_at timestamptz not null,
      removed_at timestamptz,
      tally jsonb,
      primary key (firm_id, id),
      foreign key (firm_id, created_by) references member (firm_id, id)
    )
  `.execute(db)
  await sql`create index workbook_recent on workbook (firm_id, updated_at desc) where removed_at is null`.execute(
    db,
  )
  await sql`
    create table operation (
      firm_id uuid not null,
      workbook_id uuid not null,
      seq integer not null check (seq > 0),
      id uuid not null,
      batch uuid not null,
      author_id uuid not null,
      at timestamptz not null,
      body text not null,
      primary key (firm_id, workbook_id, seq),
      unique (firm_id, workbook_id, id),
      foreign key (firm_id, workbook_id) references workbook (firm_id, id),
      foreign key (firm_id, author_id) references member (firm_id, id)
    )
  `.execute(db)
  await sql`
    create table snapshot (
      firm_id uuid not null,
      workbook_id uuid not null,
      seq integer not null check (seq >= 0),
      body text not null,
      "values" text,
      primary key (firm_id, workbook_id, seq),
      foreign key (firm_id, workbook_id) references workbook (firm_id, id)
    )
  `.execute(db)
  await secure(db)
  await appendFunction(db)
}

async function secure(db: Kysely<unknown>): Promise<void> {
  const here = sql`firm_id = nullif(current_setting('app.firm', true), '')::uuid`
  for (const table of ['workbook', 'operation', 'snapshot']) {
    await sql`alter table ${sql.table(table)} enable row level security`.execute(db)
    await sql`alter table ${sql.table(table)} force row level security`.execute(db)
    await sql`create policy own_firm on ${sql.table(table)} using (${here}) with check (${here})`.execute(db)
  }
  // The first snapshot is where the log begins: it alone cannot be rebuilt, so it cannot be removed.
  await sql`create policy keep_first on snapshot as restrictive for delete using (seq > 0)`.execute(db)
  await sql`grant select, insert on workbook, operation, snapshot to panewright_app`.execute(db)
  await sql`grant update (title, state, seq, updated_at, removed_at, tally) on workbook to panewright_app`.execute(
    db,
  )
  await sql`grant update ("values"), delete on snapshot to panewright_app`.execute(db)
}

/**
 * Appends a batch in one statement, which is one transaction: sets the firm, locks the workbook's row, checks the base,
 * adds every operation or none. `outcome`: `appended`; `known` (all ids are in the log already); `mixed` (some are;
 * nothing was added); `behind` (others came in since `base`); `ahead` (`base` is beyond the log); `absent`.
 * `ids` and `seqs` pair the sent ids that are now in the log with their sequences.
 */
async function appendFunction(db: Kysely<unknown>): Promise<void> {
  await sql`
    create function append_operations(
      p_firm uuid, p_workbook uuid, p_author uuid, p_base integer, p_ids uuid[], p_batches uuid[], p_bodies text[])
    returns table (outcome text, head integer, ids uuid[], seqs integer[], at timestamptz)
    language plpgsql volatile
    as $$
    #variable_conflict use_column
    declare
      v_head integer;
      v_ids uuid[];
      v_seqs integer[];
      v_now timestamptz;
      v_count integer := cardinality(p_ids);
    begin
      perform set_config('app.firm', p_firm::text, true);
      select w.seq into v_head from public.workbook w
      where w.firm_id = p_firm and w.id = p_workbook and w.removed_at is null
      for no key update;
      if not found then
        return query select 'absent', 0, '{}'::uuid[], '{}'::integer[], null::timestamptz;
        return;
      end if;
      -- One look-up by the whole unique key for each id: a plan over all ids at once reads the workbook's whole log.
      select array_agg(o.id), array_agg(o.seq) into v_ids, v_seqs
      from unnest(p_ids) as s (id) cross join lateral (
        select l.id, l.seq from public.operation l
        where l.firm_id = p_firm and l.workbook_id = p_workbook and l.id = s.id
        offset 0) as o;
      if v_ids is not null or p_base <> v_head then
        return query select
          case when cardinality(v_ids) = v_count then 'known'
               when p_base < v_head then 'behind'
               when p_base > v_head then 'ahead'
               else 'mixed' end,
          v_head, coalesce(v_ids, '{}'), coalesce(v_seqs, '{}'), null::timestamptz;
        return;
      end if;
      v_now := clock_timestamp();
      insert into public.operation (firm_id, workbook_id, seq, id, batch, author_id, at, body)
      select p_firm, p_workbook, v_head + n, s.id, s.batch, p_author, v_now, s.body
      from unnest(p_ids, p_batches, p_bodies) with ordinality as s (id, batch, body, n);
      update public.workbook set seq = v_head + v_count, updated_at = v_now
      where firm_id = p_firm and id = p_workbook;
      return query select 'appended', v_head + v_count, p_ids,
        array(select generate_series(v_head + 1, v_head + v_count)), v_now;
    end $$
  `.execute(db)
  const signature = 'append_operations(uuid, uuid, uuid, integer, uuid[], uuid[], text[])'
  await sql`revoke all on function ${sql.raw(signature)} from public`.execute(db)
  await sql`grant execute on function ${sql.raw(signature)} to panewright_app`.execute(db)
}
