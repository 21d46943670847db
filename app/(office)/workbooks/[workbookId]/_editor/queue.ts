import { type DBSchema, type IDBPDatabase, openDB } from 'idb'
import type { SentOperation } from '@/lib/workbook'

/**
 * Operations that the server has not acknowledged yet, kept by the browser so that a reload, a crash or
 * a lost network loses nothing. Every tab writes under its own id and holds a lock of that name while it
 * lives; the operations of a tab whose lock is free belong to whoever takes that lock next.
 */
export interface QueuedOperation extends SentOperation {
  readonly label: string
}

/** Operations left behind by a tab that is gone, in order, on top of sequence `base`. */
export interface Claim {
  readonly tab: string
  readonly base: number
  readonly operations: readonly QueuedOperation[]
}

export interface OperationQueue {
  /** Adds at the end; resolves when it is on disk. */
  append(base: number, operations: readonly QueuedOperation[]): Promise<void>
  /** Takes acknowledged operations away; the rest now stand on top of `base`. */
  acknowledge(base: number, ids: ReadonlySet<string>): Promise<void>
  /** Puts these in the place of everything this tab holds; `claimed` names tabs that were merged in. */
  replace(base: number, operations: readonly QueuedOperation[], claimed?: readonly string[]): Promise<void>
  /**
   * Calls `merge` with what closed tabs left behind, while no other tab can take it. What `merge`
   * accepted must be written with `replace(…, claimed)` before it returns.
   */
  adopt(merge: (claims: readonly Claim[]) => Promise<void>): Promise<void>
  close(): void
}

interface Schema extends DBSchema {
  operations: {
    key: number
    value: { scope: string; tab: string; operation: QueuedOperation }
    indexes: { tab: [string, string] }
  }
  tabs: { key: [string, string]; value: { scope: string; tab: string; base: number } }
}

const lockName = (scope: string, tab: string) => `panewright ${scope} ${tab}`

/** `scope` is the workbook and the member: nobody sends what somebody else typed on a shared computer. */
export async function openQueue(scope: string, tab: string): Promise<OperationQueue> {
  const database = await openDB<Schema>('panewright', 1, {
    upgrade(db) {
      db.createObjectStore('operations', { autoIncrement: true }).createIndex('tab', ['scope', 'tab'])
      db.createObjectStore('tabs', { keyPath: ['scope', 'tab'] })
    },
  })
  const release = await hold(lockName(scope, tab))
  return {
    append: (base, operations) => append(database, scope, tab, base, operations),
    acknowledge: (base, ids) => acknowledge(database, scope, tab, base, ids),
    replace: (base, operations, claimed = []) => replace(database, scope, tab, base, operations, claimed),
    adopt: (merge) => adopt(database, scope, tab, merge),
    close: () => {
      release()
      database.close()
    },
  }
}

async function append(
  database: IDBPDatabase<Schema>,
  scope: string,
  tab: string,
  base: number,
  operations: readonly QueuedOperation[],
) {
  const transaction = database.transaction(['operations', 'tabs'], 'readwrite', { durability: 'strict' })
  const store = transaction.objectStore('operations')
  await Promise.all([
    transaction.objectStore('tabs').put({ scope, tab, base }),
    ...operations.map((operation) => store.add({ scope, tab, operation })),
    transaction.done,
  ])
}

async function acknowledge(
  database: IDBPDatabase<Schema>,
  scope: string,
  tab: string,
  base: number,
  ids: ReadonlySet<string>,
) {
  const transaction = database.transaction(['operations', 'tabs'], 'readwrite')
  const index = transaction.objectStore('operations').index('tab')
  let left = 0
  for await (const cursor of index.iterate([scope, tab])) {
    if (ids.has(cursor.value.operation.id)) await cursor.delete()
    else left += 1
  }
  const tabs = transaction.objectStore('tabs')
  if (left > 0) await tabs.put({ scope, tab, base })
  else await tabs.delete([scope, tab])
  await transaction.done
}

async function replace(
  database: IDBPDatabase<Schema>,
  scope: string,
  tab: string,
  base: number,
  operations: readonly QueuedOperation[],
  claimed: readonly string[],
) {
  const transaction = database.transaction(['operations', 'tabs'], 'readwrite', { durability: 'strict' })
  const store = transaction.objectStore('operations')
  const tabs = transaction.objectStore('tabs')
  for (const gone of [tab, ...claimed]) {
    for await (const cursor of store.index('tab').iterate([scope, gone])) await cursor.delete()
    await tabs.delete([scope, gone])
  }
  if (operations.length > 0) await tabs.put({ scope, tab, base })
  for (const operation of operations) await store.add({ scope, tab, operation })
  await transaction.done
}

async function adopt(
  database: IDBPDatabase<Schema>,
  scope: string,
  own: string,
  merge: (claims: readonly Claim[]) => Promise<void>,
) {
  const others = (await database.getAll('tabs')).filter((entry) => entry.scope === scope && entry.tab !== own)
  await withFreeLocks(
    others.map((entry) => lockName(scope, entry.tab)),
    async (free) => {
      const claims: Claim[] = []
      for (const { tab } of others.filter((entry) => free.has(lockName(scope, entry.tab)))) {
        // Read again: whoever held the lock a moment ago may have merged it meanwhile.
        const entry = await database.get('tabs', [scope, tab])
        const records = await database.getAllFromIndex('operations', 'tab', [scope, tab])
        if (!entry || records.length === 0) continue
        claims.push({ tab, base: entry.base, operations: records.map((record) => record.operation) })
      }
      if (claims.length > 0) await merge(claims)
    },
  )
}

/** Takes the lock for as long as the tab lives; gives back how to let it go. */
async function hold(name: string): Promise<() => void> {
  if (!navigator.locks) return () => undefined
  return new Promise((resolve) => {
    void navigator.locks.request(name, () => new Promise<void>((release) => resolve(() => release())))
  })
}

async function withFreeLocks(
  names: readonly string[],
  work: (free: ReadonlySet<string>) => Promise<void>,
  free: ReadonlySet<string> = new Set(),
): Promise<void> {
  const [name, ...rest] = names
  if (name === undefined) return work(free)
  if (!navigator.locks) return withFreeLocks(rest, work, new Set([...free, name]))
  await navigator.locks.request(name, { ifAvailable: true }, (lock) =>
    withFreeLocks(rest, work, lock ? new Set([...free, name]) : free),
  )
}
