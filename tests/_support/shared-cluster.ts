import { startTestCluster, type TestCluster } from './test-cluster'

const shared = globalThis as {
  panewrightTestCluster?: { users: number; readonly started: ReturnType<typeof startTestCluster> }
}

/** One cluster for all projects of a run: their set-ups share a process but not their modules. */
export async function joinSharedCluster(): Promise<TestCluster & { release(): Promise<void> }> {
  shared.panewrightTestCluster ??= { users: 0, started: startTestCluster() }
  const entry = shared.panewrightTestCluster
  entry.users += 1
  const { access, template, stop } = await entry.started
  return {
    access,
    template,
    release: async () => {
      entry.users -= 1
      if (entry.users > 0) return
      delete shared.panewrightTestCluster
      await stop()
    },
  }
}
