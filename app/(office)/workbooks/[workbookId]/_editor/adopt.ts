import type { LocalWorkbook } from './local-workbook'
import type { Server } from './post-operations'
import type { Claim, OperationQueue, QueuedOperation } from './queue'
import { rebasePending } from './rebase-pending'
import type { Sync } from './sync'

/**
 * Takes over the operations that closed tabs of this person left unsent: each list is brought from the sequence
 * it stood on to where this tab stands, applied on top, and written under this tab's name before it is let go.
 */
export async function adoptClosedTabs(
  queue: OperationQueue,
  local: LocalWorkbook,
  server: Server,
  sync: Sync,
): Promise<void> {
  await queue.adopt(async (claims) => {
    const adopted: string[] = []
    for (const claim of claims) {
      const operations = await broughtForward(claim, local, server)
      // Without the operations in between nothing is done: they stay for the next opening.
      if (!operations) continue
      local.adopt(operations)
      adopted.push(claim.tab)
    }
    if (adopted.length === 0) return
    await sync.rewrite(adopted)
  })
  sync.wake()
}

async function broughtForward(
  claim: Claim,
  local: LocalWorkbook,
  server: Server,
): Promise<readonly QueuedOperation[] | undefined> {
  const own = new Set(local.pending.map((operation) => operation.id))
  const fresh = claim.operations.filter((operation) => !own.has(operation.id))
  if (claim.base === local.base) return fresh
  if (claim.base > local.base) return undefined
  const missing = await server.missing(claim.base)
  if (!missing || missing.seq < local.base) return undefined
  const ids = new Set(missing.operations.map((operation) => operation.id))
  const unknown = fresh.filter((operation) => !ids.has(operation.id))
  const mine = new Set(claim.operations.map((operation) => operation.id))
  const others = missing.operations.filter(({ id, seq }) => seq <= local.base && !mine.has(id))
  return rebasePending(
    local.acknowledgedSheets(),
    unknown,
    others.map(({ op }) => op),
    () => crypto.randomUUID(),
  ).pending
}
