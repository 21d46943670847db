import { limits } from '@/lib/workbook'
import type { LocalWorkbook, PendingOperation } from './local-workbook'
import type { Answer, Server } from './post-operations'
import type { OperationQueue, QueuedOperation } from './queue'
import type { SaveStatus } from './session-contract'

export interface SyncEvents {
  /** What the status words say may have changed. */
  readonly changed: () => void
  /** The server refused an action; it has been taken back here. */
  readonly refused: (label: string, text: string) => void
  /** Somebody else's change left these without a place. */
  readonly lost: (operations: readonly QueuedOperation[]) => void
}

type Trouble = { readonly kind: 'none' | 'offline' } | { readonly kind: 'blocked'; readonly text: string }

const backOff = [1000, 2000, 4000, 8000, 15_000, 30_000]
const removed = 'this workbook was removed; your changes are kept on this device'
const signInAgain = 'sign in again to save; your changes are kept on this device'

/** Sends pending operations in order, one request at a time, until the server has them all. */
export class Sync {
  private disk: Promise<void> = Promise.resolve()
  private sending: Promise<void> | undefined
  private closed = false
  private tries = 0
  private timer: ReturnType<typeof setTimeout> | undefined
  private trouble: Trouble = { kind: 'none' }
  /** After a refusal of several actions at once they go one by one, to find the one that is meant. */
  private alone = false

  constructor(
    private readonly local: LocalWorkbook,
    private readonly server: Server,
    private readonly queue: OperationQueue | undefined,
    private readonly events: SyncEvents,
  ) {}

  status(): SaveStatus {
    const pending = this.local.pending.length
    if (pending === 0) return { kind: 'saved' }
    if (this.trouble.kind === 'blocked') return { kind: 'cannot-save', pending, text: this.trouble.text }
    return { kind: this.trouble.kind === 'offline' ? 'offline' : 'saving', pending }
  }

  /** Writes new operations to disk, then sends them. */
  add(made: readonly PendingOperation[]): void {
    const base = this.local.base
    this.toDisk((queue) => queue.append(base, made.map(queued)))
    void this.disk.then(() => this.send())
    this.events.changed()
  }

  /** Tries at once: the network is back, or somebody has come back to this tab. */
  wake(): void {
    this.tries = 0
    if (this.timer) clearTimeout(this.timer)
    this.timer = undefined
    void this.send().then(() => this.catchUp())
  }

  /** With nothing to send there is no answer that says what others did, so it is asked for. */
  async catchUp(): Promise<void> {
    if (this.local.pending.length > 0 || this.sending || this.closed) return
    const { base } = this.local
    const missing = await this.server.missing(base)
    // What was typed or fetched meanwhile brings its own answer.
    if (!missing || missing.operations.length === 0 || this.closed || this.sending) return
    if (this.local.base === base) this.integrate(missing.operations, missing.seq)
  }

  /** Resolves when the server has everything, or when that cannot be had now. */
  async settle(): Promise<boolean> {
    await this.disk
    await this.send()
    return this.local.pending.length === 0
  }

  close(): void {
    this.closed = true
    if (this.timer) clearTimeout(this.timer)
  }

  /** Puts everything that is pending on disk anew, after it has been rebased; `claimed` tabs were merged in. */
  rewrite(claimed: readonly string[] = []): Promise<void> {
    const { base, pending } = this.local
    this.toDisk((queue) => queue.replace(base, pending.map(queued), claimed))
    return this.disk
  }

  private toDisk(write: (queue: OperationQueue) => Promise<void>): void {
    const queue = this.queue
    if (!queue) return
    // A full or forbidden disk must not keep changes from reaching the server.
    this.disk = this.disk.then(() => write(queue)).catch(() => undefined)
  }

  /** Sends what is pending, unless it is to be tried later; resolves when the sending that is under way has ended. */
  send(): Promise<void> {
    if (this.closed || this.timer) return Promise.resolve()
    this.sending ??= this.sendAll().finally(() => {
      this.sending = undefined
      this.events.changed()
    })
    return this.sending
  }

  private async sendAll(): Promise<void> {
    while (this.local.pending.length > 0 && !this.closed) {
      await this.disk
      const operations = this.next()
      if (operations.length === 0) break
      const answer = await this.server.post({ base: this.local.base, operations })
      if (this.closed || !(await this.take(answer, operations))) break
    }
  }

  /** Whole actions from the front, as many as a request may hold. */
  private next(): PendingOperation[] {
    const { pending } = this.local
    const operations: PendingOperation[] = []
    for (let i = 0; i < pending.length; ) {
      const batch = pending[i]?.batch
      let end = i
      while (end < pending.length && pending[end]?.batch === batch) end += 1
      if (operations.length > 0 && (this.alone || end > limits.operationsInBatch)) break
      operations.push(...pending.slice(i, end))
      i = end
    }
    return operations
  }

  /** True when sending goes on at once. */
  private async take(answer: Answer, sent: readonly PendingOperation[]): Promise<boolean> {
    if (answer.kind === 'unreachable') return this.later({ kind: 'offline' })
    if (answer.kind === 'signed-out') return this.later({ kind: 'blocked', text: signInAgain })
    if (answer.kind === 'gone') return this.later({ kind: 'blocked', text: removed })
    if (answer.kind === 'busy') return this.later({ kind: 'none' }, answer.seconds * 1000)
    this.trouble = { kind: 'none' }
    this.tries = 0
    if (answer.kind === 'refused') return this.takeBack(answer.text, sent)
    this.alone = false
    if (answer.kind === 'behind') return this.integrate(answer.missing, answer.seq)
    if (answer.seq !== this.local.base + answer.fresh) {
      const missing = await this.server.missing(this.local.base)
      if (!missing) return this.later({ kind: 'offline' })
      return this.integrate(missing.operations, missing.seq)
    }
    this.local.acknowledge(answer.seq, answer.ids)
    this.toDisk((queue) => queue.acknowledge(answer.seq, answer.ids))
    this.events.changed()
    return true
  }

  private integrate(...[missing, seq]: Parameters<LocalWorkbook['integrate']>): boolean {
    const lost = this.local.integrate(missing, seq)
    void this.rewrite()
    if (lost.length > 0) this.events.lost(lost)
    this.events.changed()
    return true
  }

  private takeBack(text: string, sent: readonly PendingOperation[]): boolean {
    const batches = new Set(sent.map((operation) => operation.batch))
    const [batch] = batches
    if (batch === undefined) return false
    if (batches.size > 1) {
      this.alone = true
      return true
    }
    this.alone = false
    const { label, lost } = this.local.takeBack(batch)
    void this.rewrite()
    this.events.refused(label, text)
    if (lost.length > 0) this.events.lost(lost)
    return true
  }

  private later(trouble: Trouble, wait?: number): false {
    this.trouble = trouble
    const pause = wait ?? backOff[Math.min(this.tries, backOff.length - 1)] ?? 1000
    this.tries += 1
    this.timer = setTimeout(() => {
      this.timer = undefined
      void this.send()
    }, pause)
    return false
  }
}

const queued = ({ id, batch, label, op }: PendingOperation): QueuedOperation => ({ id, batch, label, op })
