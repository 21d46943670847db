import { type Kysely, sql } from 'kysely'

/**
 * Firms, their people, sessions and sign-in tries.
 * `panewright_app` is what the application signs in as. `panewright_door` cannot sign in: it owns the few functions
 * that look something up before the firm is known, and sees all firms' rows through policies of its own.
 */
export async function up(db: Kysely<unknown>): Promise<void> {
  await sql`
    do $$
    begin
      if not exists (select from pg_roles where rolname = 'panewright_app') then
        create role panewright_app nologin;
      end if;
      if not exists (select from pg_roles where rolname = 'panewright_door') then
        create role panewright_door nologin;
      end if;
      -- So that an owner's connection can put the application's role on.
      if not pg_has_role(current_user, 'panewright_app', 'member') then
        execute format('grant panewright_app to %I', current_user);
      end if;
    end $$
  `.execute(db)
  await sql`revoke create on schema public from public`.execute(db)
  await sql`grant usage on schema public to panewright_app, panewright_door`.execute(db)
  await sql`create type member_role as enum ('owner', 'manager', 'estimator', 'viewer')`.execute(db)
  await sql`
    create table firm (
      id uuid primary key,
      name text not null check (char_length(name) between 1 and 120),
      created_at timestamptz not null default now()
    )
  `.execute(db)
  // An e-mail address belongs to one member of one firm, since sign-in asks for nothing else.
  await sql`
    create table member (
      firm_id uuid not null references firm (id),
      id uuid not null,
      email text not null unique check (email = lower(email) and char_length(email) between 3 and 254),
      name text not null check (char_length(name) between 1 and 120),
      role member_role not null,
      password_hash text not null,
      created_at timestamptz not null default now(),
      removed_at timestamptz,
      primary key (firm_id, id)
    )
  `.execute(db)
  // The id is the SHA-256 of what the browser holds: a copy of this table opens no session.
  await sql`
    create table session (
      firm_id uuid not null,
      id bytea not null primary key check (octet_length(id) = 32),
      member_id uuid not null,
      address text not null,
      created_at timestamptz not null default now(),
      last_seen_at timestamptz not null default now(),
      ended_at timestamptz,
      unique (firm_id, id),
      foreign key (firm_id, member_id) references member (firm_id, id)
    )
  `.execute(db)
  await sql`create index session_of_member on session (firm_id, member_id)`.execute(db)
  await sql`
    create table sign_in_try (
      id bigint generated always as identity primary key,
      email text not null,
      address text not null,
      at timestamptz not null default now()
    )
  `.execute(db)
  await sql`create index sign_in_try_by_email on sign_in_try (email, at)`.execute(db)
  await sql`create index sign_in_try_by_address on sign_in_try (address, at)`.execute(db)
  await secure(db)
}

async function secure(db: Kysely<unknown>): Promise<void> {
  for (const table of ['firm', 'member', 'session']) {
    const column = table === 'firm' ? 'id' : 'firm_id'
    const here = sql`${sql.ref(column)} = nullif(current_setting('app.firm', true), '')::uuid`
    await sql`alter table ${sql.table(table)} enable row level security`.execute(db)
    await sql`alter table ${sql.table(table)} force row level security`.execute(db)
    await sql`create policy own_firm on ${sql.table(table)} using (${here}) with check (${here})`.execute(db)
    await sql`create policy door on ${sql.table(table)} to panewright_door using (true)`.execute(db)
  }
  await sql`grant select, insert on firm to panewright_app`.execute(db)
  await sql`grant select, insert on member to panewright_app`.execute(db)
  await sql`grant update (name, role, password_hash, removed_at) on member to panewright_app`.execute(db)
  await sql`grant select, insert on session to panewright_app`.execute(db)
  await sql`grant update (ended_at) on session to panewright_app`.execute(db)
  await sql`grant select on firm, member, session to panewright_door`.execute(db)
  await sql`grant update (last_seen_at, ended_at) on session to panewright_door`.execute(db)
  await sql`grant select, insert, delete on sign_in_try to panewright_door`.execute(db)
}
