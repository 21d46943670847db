import { fail, type Result, succeed } from '@/lib/failures'
import {
  type CellAddress,
  type CellValue,
  fromJson,
  limits,
  type Operation,
  type Role,
  refusal,
  type SheetGround,
  toJson,
  type Workbook,
  type WorkbookOpened,
} from '@/lib/workbook'
import { adoptClosedTabs } from './adopt'
import { EngineLink } from './engine-link'
import { type LastChange, LastChanges } from './last-changes'
import { type Followed, LocalWorkbook, type PendingOperation } from './local-workbook'
import { serverOf } from './post-operations'
import { type OperationQueue, openQueue, type QueuedOperation } from './queue'
import type { SessionSnapshot, ValueChanges, WorkbookSession } from './session-contract'
import { Sync } from './sync'
import { SessionValues } from './values'

/** What the screen is told besides values and status: refusals, and where an undo took place. */
export interface SessionNews {
  readonly kind: 'refused' | 'lost' | 'moved'
  readonly text: string
  readonly place?: CellAddress | undefined
}

export type ForeignListener = (operations: readonly Operation[], sheets: readonly SheetGround[]) => void

/** Joins the parts: the local workbook, the values, the engine's worker, the queue on disk and the sending. */
export class Session implements WorkbookSession {
  readonly id: string
  readonly title: string
  readonly state: string
  readonly actor: WorkbookOpened['actor']
  readonly may: WorkbookOpened['may']
  private readonly local: LocalWorkbook
  private readonly values: SessionValues
  private readonly engine: EngineLink
  private readonly listeners = new Set<() => void>()
  private readonly valueListeners = new Set<(changes: ValueChanges) => void>()
  private readonly foreignListeners = new Set<ForeignListener>()
  private readonly newsListeners = new Set<(news: SessionNews) => void>()
  private sync: Sync | undefined
  private queue: OperationQueue | undefined
  private readonly lastChanges = new LastChanges()
  /** How the next operations are remembered: as made here, as already remembered, or as only moving cells. */
  private remember: 'own' | 'done' | 'moves' = 'moves'
  private shape = 0
  private current: SessionSnapshot
  private closed = false

  constructor(opened: WorkbookOpened) {
    this.id = opened.id
    this.title = opened.title
    this.state = opened.state
    this.actor = opened.actor
    this.may = opened.may
    const workbook = fromJson(opened.snapshot.workbook)
    this.values = new SessionValues(workbook, opened.snapshot.values)
    this.engine = new EngineLink({
      workbook: () => toJson(this.workbook),
      changes: (packed, all, ahead) => this.tell(this.values.take(packed, all, ahead)),
      status: () => this.changed(),
      stopped: (text) => this.announce({ kind: 'refused', text }),
    })
    this.local = new LocalWorkbook(workbook, opened.snapshot.seq, () => crypto.randomUUID(), this.follow)
    this.local.onForeign = (operations, sheets, logged) => {
      this.lastChanges.followLogged(operations, logged)
      this.remember = 'done'
      for (const listener of this.foreignListeners) listener(operations, sheets)
    }
    this.current = this.read(0)
    this.local.integrate(opened.tail, opened.seq)
  }

  get workbook(): Workbook {
    return this.local.workbook
  }

  /** Opens the queue, takes over what closed tabs left, and begins to send. Changes may be made before it is done. */
  async start(): Promise<void> {
    const server = serverOf(this.id)
    const tab = crypto.randomUUID()
    this.queue = await openQueue(`${this.id} ${this.actor.id}`, tab).catch(() => undefined)
    if (this.closed) {
      this.queue?.close()
      return
    }
    const sync = new Sync(this.local, server, this.queue, {
      changed: () => this.changed(),
      refused: (label, text) => this.announce({ kind: 'refused', text: `${label}: ${text}` }),
      lost: (operations) => this.announce({ kind: 'lost', text: lostWords(operations) }),
    })
    this.sync = sync
    if (this.local.pending.length > 0) sync.add(this.local.pending)
    if (this.queue && this.may.change) {
      await adoptClosedTabs(this.queue, this.local, server, sync).catch(() => undefined)
    }
    this.changed()
  }

  /** Makes the worker; called once the first values are on the screen. */
  startEngine(): void {
    if (!this.closed) this.engine.start()
  }

  snapshot(): SessionSnapshot {
    return this.current
  }

  subscribe(listener: () => void): () => void {
    this.listeners.add(listener)
    return () => this.listeners.delete(listener)
  }

  onValues(listener: (changes: ValueChanges) => void): () => void {
    this.valueListeners.add(listener)
    return () => this.valueListeners.delete(listener)
  }

  onNews(listener: (news: SessionNews) => void): () => void {
    this.newsListeners.add(listener)
    return () => this.newsListeners.delete(listener)
  }

  /** What somebody else did, told before it is applied here. */
  onForeign(listener: ForeignListener): () => void {
    this.foreignListeners.add(listener)
    return () => this.foreignListeners.delete(listener)
  }

  value(address: CellAddress): CellValue {
    return this.values.value(address)
  }

  named = (name: string): readonly CellValue[] | undefined => this.values.named(name)

  dispatch(label: string, operations: readonly Operation[], place?: CellAddress): Result<void> {
    const role = this.actor.role as Role
    if (!this.may.change) return fail('forbidden', 'You can read this workbook but not change it.')
    if (operations.length > limits.operationsInBatch) {
      return fail('limit', `At most ${limits.operationsInBatch} changes are made at once.`)
    }
    for (const operation of operations) {
      const refused = refusal(this.workbook, operation, role)
      if (refused) return { ok: false, failure: refused }
    }
    const made = this.asOwn(() => this.local.dispatch(label, operations, place ?? placeOf(operations)))
    if (!made.ok) return made
    this.send(made.value)
    return succeed(undefined)
  }

  undo(): Result<string> {
    return this.took(
      this.asOwn(() => this.local.undo()),
      'Undid',
    )
  }

  redo(): Result<string> {
    return this.took(
      this.asOwn(() => this.local.redo()),
      'Did again',
    )
  }

  private took(step: ReturnType<LocalWorkbook['undo']>, verb: string): Result<string> {
    if (!step.ok) {
      this.changed()
      return step
    }
    const { label, made, place } = step.value
    this.send(made)
    const text = `${verb}: ${label}`
    this.announce({ kind: 'moved', text, place })
    return succeed(text)
  }

  lastChange(address: CellAddress): LastChange | undefined {
    return this.lastChanges.of(address)
  }

  private asOwn<T>(act: () => T): T {
    this.remember = 'own'
    try {
      return act()
    } finally {
      this.remember = 'moves'
    }
  }

  tryOut(operations: readonly Operation[], names: readonly string[]) {
    return this.engine.tryOut(operations, names)
  }

  tryMany: WorkbookSession['tryMany'] = (...asked) => this.engine.tryMany(...asked)

  /** Waits until the server has everything; false when it cannot be had now. */
  async saved(): Promise<boolean> {
    return (await this.sync?.settle()) ?? this.local.pending.length === 0
  }

  /** Tries to send at once. */
  wake(): void {
    this.sync?.wake()
  }

  close(): void {
    this.closed = true
    this.sync?.close()
    this.queue?.close()
    this.engine.close()
    this.listeners.clear()
    this.valueListeners.clear()
    this.newsListeners.clear()
  }

  private send(made: readonly PendingOperation[]): void {
    this.sync?.add(made)
    this.changed()
  }

  private readonly follow = ({ operations, touched }: Followed): void => {
    if (operations.length === 0) return
    if (operations.some((operation) => operation.kind !== 'set-cells')) this.shape += 1
    this.followChanges(operations)
    const changes = this.values.follow(operations, touched)
    this.engine.apply(operations)
    this.tell(changes)
    this.changed()
  }

  private followChanges(operations: readonly Operation[]): void {
    if (this.remember !== 'done') {
      const own = { author: this.actor.id, at: new Date().toISOString() }
      this.lastChanges.follow(operations, this.remember === 'own' ? own : undefined)
    }
    this.remember = 'moves'
  }

  private tell(changes: ValueChanges): void {
    if (changes.sheets.length > 0) for (const listener of this.valueListeners) listener(changes)
  }

  private announce(news: SessionNews): void {
    for (const listener of this.newsListeners) listener(news)
  }

  private changed(): void {
    this.current = this.read(this.current.version + 1)
    for (const listener of this.listeners) listener()
  }

  private read(version: number): SessionSnapshot {
    const pending = this.local.pending.length
    return {
      version,
      shape: this.shape,
      save: this.sync?.status() ?? (pending > 0 ? { kind: 'saving', pending } : { kind: 'saved' }),
      engine: this.engine.status,
      undoLabel: this.local.done.top?.label,
      redoLabel: this.local.undone.top?.label,
    }
  }
}

function placeOf(operations: readonly Operation[]): CellAddress | undefined {
  for (const operation of operations) {
    if (operation.kind === 'set-cells') {
      const [cell] = operation.cells
      if (cell) return { sheet: operation.sheet, row: cell.row, column: cell.column }
    }
    if (
      operation.kind === 'insert-lines' ||
      operation.kind === 'remove-lines' ||
      operation.kind === 'move-lines'
    ) {
      const { sheet, axis, at } = operation
      return axis === 'row' ? { sheet, row: at, column: 0 } : { sheet, row: 1, column: at }
    }
  }
  return undefined
}

function lostWords(operations: readonly QueuedOperation[]): string {
  const labels = [...new Set(operations.map((operation) => operation.label))]
  return `Somebody else removed the place of: ${labels.join('; ')}`
}
