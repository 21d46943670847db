import { adminUser } from './cluster.mjs'
import { localUrl, withClient } from './sql.mjs'

/** Owns the tables and runs migrations; not a superuser, so row-level security binds it as well. */
export const ownerUser = 'panewright_owner'
/** What the application signs in as: owns nothing and may not bypass row-level security. */
export const appUser = 'panewright_app'

/** @typedef {{ port: number, adminPassword: string, ownerPassword: string, appPassword: string }} Access */

/**
 * Makes the roles and the database where they are missing, with the passwords of `access`.
 * @param {Access} access
 * @param {string} database
 */
export async function ensureRolesAndDatabase(access, database) {
  await withClient(adminUrl(access, 'postgres'), async (client) => {
    const kinds = [
      [ownerUser, access.ownerPassword, 'createrole nosuperuser nobypassrls'],
      [appUser, access.appPassword, 'nocreaterole nosuperuser nobypassrls'],
    ]
    for (const [name, password, rights] of kinds) {
      const found = await client.query('select 1 from pg_roles where rolname = $1', [name])
      const verb = found.rowCount ? 'alter' : 'create'
      await client.query(`${verb} role ${name} login nocreatedb ${rights} password ${quoted(password ?? '')}`)
    }
    const found = await client.query('select 1 from pg_database where datname = $1', [database])
    if (!found.rowCount) await client.query(`create database ${database} owner ${ownerUser}`)
    await client.query(`revoke connect on database ${database} from public`)
    await client.query(`grant connect on database ${database} to ${appUser}`)
  })
}

/** @param {Access} access @param {string} database */
export function adminUrl({ port, adminPassword }, database) {
  return localUrl({ port, user: adminUser, password: adminPassword, database })
}

/** @param {Access} access @param {string} database */
export function ownerUrl({ port, ownerPassword }, database) {
  return localUrl({ port, user: ownerUser, password: ownerPassword, database })
}

/** @param {Access} access @param {string} database */
export function appUrl({ port, appPassword }, database) {
  return localUrl({ port, user: appUser, password: appPassword, database })
}

function quoted(/** @type {string} */ text) {
  return `'${text.replaceAll("'", "''")}'`
}
