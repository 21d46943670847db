import { randomBytes } from 'node:crypto'
import {
  chmodSync,
  existsSync,
  mkdirSync,
  readdirSync,
  readFileSync,
  rmSync,
  statfsSync,
  writeFileSync,
} from 'node:fs'
import { join } from 'node:path'
import { initCluster, startCluster, stopCluster } from '@/db/server/cluster.mjs'
import { password } from '@/db/server/local.mjs'
import { markIsAlive, processMark } from '@/db/server/lock.mjs'
import { type Access, adminUrl, appUrl, ensureRolesAndDatabase, ownerUrl } from '@/db/server/roles.mjs'
import { withClient } from '@/db/server/sql.mjs'

/** What the workers need to clone databases; passed by environment. */
export interface TestCluster {
  readonly access: Access
  readonly template: string
}

export interface ClonedDatabase {
  readonly name: string
  readonly adminUrl: string
  readonly ownerUrl: string
  readonly appUrl: string
  drop(): Promise<void>
}

const template = 'test_template'
const firstPort = 25_432
const prefix = 'panewright-test-'

/** In memory where there is room: a clone takes a tenth of what it takes on disk. */
function parentFolder(): string {
  const memory = '/dev/shm'
  if (!existsSync(memory)) return '/tmp'
  const { bavail, bsize } = statfsSync(memory)
  return bavail * bsize > 600e6 ? memory : '/tmp'
}

/** Starts a cluster without durability, with the migrated template in it. */
export async function startTestCluster(): Promise<TestCluster & { stop(): Promise<void> }> {
  await removeAbandoned()
  const place = join(parentFolder(), `${prefix}${randomBytes(5).toString('hex')}`)
  mkdirSync(place)
  chmodSync(place, 0o711)
  writeFileSync(join(place, 'owner'), processMark())
  const folder = join(place, 'pg')
  const passwords = { adminPassword: password(), ownerPassword: password(), appPassword: password() }
  const stop = async () => {
    await stopCluster({ folder })
    rmSync(place, { recursive: true, force: true })
  }
  try {
    await initCluster({ folder, durable: false }, passwords.adminPassword)
    const { port } = await startCluster({ folder }, firstPort)
    const access = { port, ...passwords }
    await ensureRolesAndDatabase(access, template)
    // Loaded here: whoever only clones needs no migrations.
    const { migrate } = await import('@/db/migrate')
    await migrate(ownerUrl(access, template))
    await withClient(adminUrl(access, 'postgres'), (client) =>
      client.query(`alter database ${template} is_template true allow_connections false`),
    )
    return { access, template, stop }
  } catch (error) {
    await stop()
    throw error
  }
}

/** Clusters of test runs that were killed. */
async function removeAbandoned(): Promise<void> {
  for (const parent of ['/dev/shm', '/tmp']) {
    if (!existsSync(parent)) continue
    for (const name of readdirSync(parent)) {
      const place = join(parent, name)
      const owner = join(place, 'owner')
      if (!name.startsWith(prefix) || !existsSync(owner) || markIsAlive(readFileSync(owner, 'utf8'))) continue
      await stopCluster({ folder: join(place, 'pg') })
      rmSync(place, { recursive: true, force: true })
    }
  }
}

/** A fresh database like the template. */
export async function cloneDatabase(cluster: TestCluster): Promise<ClonedDatabase> {
  const { access } = cluster
  const name = `t_${randomBytes(6).toString('hex')}`
  const admin = adminUrl(access, 'postgres')
  await withClient(admin, async (client) => {
    await client.query(
      `create database ${name} template ${cluster.template} strategy file_copy owner panewright_owner`,
    )
    await client.query(`grant connect on database ${name} to panewright_app`)
  })
  return {
    name,
    adminUrl: adminUrl(access, name),
    ownerUrl: ownerUrl(access, name),
    appUrl: appUrl(access, name),
    drop: () =>
      withClient(admin, async (client) => {
        await client.query(`drop database if exists ${name} with (force)`)
      }),
  }
}
