import { joinSharedCluster } from './shared-cluster'

/** Set-up of the `db` project: workers find the cluster in `TEST_CLUSTER`. */
export default async function setup(): Promise<() => Promise<void>> {
  const { access, template, release } = await joinSharedCluster()
  process.env.TEST_CLUSTER = JSON.stringify({ access, template })
  return release
}
