import { type Kysely, sql } from 'kysely'

/**
 * What may be looked up before the firm is known, each as narrow as its one use. The functions run as
 * `panewright_door` with a fixed search path; the application may call them and nothing else of the door's.
 */
export async function up(db: Kysely<unknown>): Promise<void> {
  await sql`
    create function door_member(p_email text)
    returns table (firm_id uuid, member_id uuid, name text, role member_role, password_hash text)
    language sql stable security definer set search_path = pg_catalog, public, pg_temp
    begin atomic
      select m.firm_id, m.id, m.name, m.role, m.password_hash
      from public.member m
      where m.email = p_email and m.removed_at is null;
    end
  `.execute(db)
  // The session's limits: idle 8 hours, 30 days in all. A use is noted at most once a minute.
  await sql`
    create function door_session(p_id bytea)
    returns table (firm_id uuid, firm_name text, member_id uuid, name text, email text, role member_role)
    language plpgsql volatile security definer set search_path = pg_catalog, public, pg_temp
    as $$
    #variable_conflict use_column
    declare
      seen timestamptz;
    begin
      select s.last_seen_at into seen from public.session s
      where s.id = p_id and s.ended_at is null
        and s.last_seen_at > now() - interval '8 hours'
        and s.created_at > now() - interval '30 days';
      if not found then return; end if;
      if seen < now() - interval '1 minute' then
        update public.session set last_seen_at = now() where id = p_id;
      end if;
      return query
        select s.firm_id, f.name, m.id, m.name, m.email, m.role
        from public.session s
        join public.member m on m.firm_id = s.firm_id and m.id = s.member_id
        join public.firm f on f.id = s.firm_id
        where s.id = p_id and s.ended_at is null and m.removed_at is null;
    end $$
  `.execute(db)
  await sql`
    create function door_end_session(p_id bytea) returns void
    language sql volatile security definer set search_path = pg_catalog, public, pg_temp
    begin atomic
      update public.session set ended_at = now() where id = p_id and ended_at is null;
    end
  `.execute(db)
  await admit(db)
  await sql`
    create function door_forget_try(p_id bigint) returns void
    language sql volatile security definer set search_path = pg_catalog, public, pg_temp
    begin atomic
      delete from public.sign_in_try where id = p_id;
    end
  `.execute(db)
  await handOver(db)
}

/**
 * Counts failed tries of the last 15 minutes: 10 an account, 60 an address. The try is written before the password
 * is looked at, so that many at once cannot slip through; success takes it back. An address from which this
 * account signed in within 30 days has 10 tries of its own: strangers cannot lock a person out of their usual place.
 */
async function admit(db: Kysely<unknown>): Promise<void> {
  await sql`
    create function door_admit_try(p_email text, p_address text)
    returns table (try_id bigint, wait_seconds integer)
    language plpgsql volatile security definer set search_path = pg_catalog, public, pg_temp
    as $$
    declare
      since timestamptz := clock_timestamp() - interval '15 minutes';
      familiar boolean;
      account_full timestamptz;
      address_full timestamptz;
    begin
      perform pg_advisory_xact_lock(hashtextextended('sign-in account ' || p_email, 0));
      perform pg_advisory_xact_lock(hashtextextended('sign-in address ' || p_address, 0));
      delete from public.sign_in_try where at < clock_timestamp() - interval '1 day';
      familiar := exists (
        select from public.session s
        join public.member m on m.firm_id = s.firm_id and m.id = s.member_id
        where m.email = p_email and s.address = p_address and s.created_at > clock_timestamp() - interval '30 days');
      select t.at into account_full from public.sign_in_try t
      where t.email = p_email and t.at > since and (not familiar or t.address = p_address)
      order by t.at desc offset 9 limit 1;
      select t.at into address_full from public.sign_in_try t
      where t.address = p_address and t.at > since
      order by t.at desc offset 59 limit 1;
      if account_full is not null or address_full is not null then
        return query select null::bigint, greatest(1, ceil(extract(epoch from
          greatest(coalesce(account_full, since), coalesce(address_full, since)) - since)))::integer;
        return;
      end if;
      return query insert into public.sign_in_try as t (email, address, at)
        values (p_email, p_address, clock_timestamp()) returning t.id, 0;
    end $$
  `.execute(db)
}

const signatures = [
  'door_member(text)',
  'door_session(bytea)',
  'door_end_session(bytea)',
  'door_admit_try(text, text)',
  'door_forget_try(bigint)',
]

async function handOver(db: Kysely<unknown>): Promise<void> {
  // For that moment the owner must belong to the door, and the door be allowed to create. It must not last: members of
  // the door see what the door sees.
  await sql`
    do $$
    begin
      if not pg_has_role(current_user, 'panewright_door', 'member') then
        execute format('grant panewright_door to %I', current_user);
      end if;
    end $$
  `.execute(db)
  await sql`grant create on schema public to panewright_door`.execute(db)
  for (const signature of signatures) {
    await sql`revoke all on function ${sql.raw(signature)} from public`.execute(db)
    await sql`grant execute on function ${sql.raw(signature)} to panewright_app`.execute(db)
    await sql`alter function ${sql.raw(signature)} owner to panewright_door`.execute(db)
  }
  await sql`revoke create on schema public from panewright_door`.execute(db)
  await sql`revoke panewright_door from current_user`.execute(db)
}
