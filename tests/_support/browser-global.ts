import type { TestProject } from 'vitest/node'
import { ensureBuilt } from '@/db/server/build.mjs'
import { joinSharedCluster } from './shared-cluster'
import { startSite } from './site-server'

declare module 'vitest' {
  interface ProvidedContext {
    /** `http://localhost:PORT` of the running application. */
    siteAddress: string
  }
}

/** Set-up of the `browser` project: builds when sources changed, then serves with a seeded database of its own. */
export default async function setup(project: TestProject): Promise<() => Promise<void>> {
  const { release, ...cluster } = await joinSharedCluster()
  try {
    await ensureBuilt()
    const site = await startSite(cluster, 'browser')
    project.provide('siteAddress', site.address)
    process.env.TEST_CLUSTER = JSON.stringify(cluster)
    process.env.TEST_SITE_ADMIN_URL = site.database.adminUrl
    return async () => {
      await site.stop()
      await release()
    }
  } catch (error) {
    await release()
    throw error
  }
}
