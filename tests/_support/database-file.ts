import { afterAll } from 'vitest'
import { cloneDatabase, type TestCluster } from './test-cluster'

/**
 * Set-up of each file of the `db` project: a database of its own. At top level, since what a test imports may
 * look for the address before any hook runs.
 */
const cluster = JSON.parse(process.env.TEST_CLUSTER ?? 'null') as TestCluster | null
if (!cluster) throw new Error('TEST_CLUSTER is not set: run with `--project db`')

const clone = await cloneDatabase(cluster)
delete process.env.DATABASE_URL
process.env.APP_DATABASE_URL = clone.appUrl
process.env.TEST_OWNER_URL = clone.ownerUrl
process.env.TEST_ADMIN_URL = clone.adminUrl

afterAll(async () => {
  const { closeDatabase } = await import('@/db/connection')
  await closeDatabase()
  await clone.drop()
})
