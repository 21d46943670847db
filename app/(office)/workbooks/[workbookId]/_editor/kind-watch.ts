import { useSyncExternalStore } from 'react'
import { type QuantityWarning, toJson } from '@/lib/workbook'
import type { Finding } from './checks'
import type { WorkbookSession } from './session-contract'

const rest = 2000
const none: readonly Finding[] = []

/** Formulas that mix kinds of quantity, read anew in a worker once a change has rested. */
class KindWatch {
  private found: readonly Finding[] = none
  private readonly listeners = new Set<() => void>()
  private readonly session: WorkbookSession
  private worker: Worker | undefined
  private timer: ReturnType<typeof setTimeout> | undefined
  private stop: (() => void) | undefined
  /** What stood when it was last read. */
  private seen = ''

  constructor(session: WorkbookSession) {
    this.session = session
  }

  snapshot = (): readonly Finding[] => this.found

  subscribe = (listener: () => void): (() => void) => {
    this.listeners.add(listener)
    if (this.listeners.size === 1) this.start()
    return () => {
      this.listeners.delete(listener)
      if (this.listeners.size === 0) this.end()
    }
  }

  private start(): void {
    this.plan()
    this.stop = this.session.subscribe(() => this.plan())
  }

  private end(): void {
    this.stop?.()
    clearTimeout(this.timer)
    this.worker?.terminate()
    this.worker = undefined
    this.seen = ''
  }

  private plan(): void {
    if (this.state() === this.seen) return
    clearTimeout(this.timer)
    this.timer = setTimeout(() => this.read(), rest)
  }

  private state(): string {
    const { shape, undoLabel, redoLabel, save } = this.session.snapshot()
    return [shape, undoLabel, redoLabel, save.kind === 'saved' ? 0 : save.pending].join(' ')
  }

  private read(): void {
    this.seen = this.state()
    this.worker?.terminate()
    const worker = new Worker(new URL('./kinds.worker.ts', import.meta.url), { type: 'module' })
    this.worker = worker
    worker.addEventListener('message', (event: MessageEvent<readonly QuantityWarning[]>) => {
      worker.terminate()
      this.found = event.data.map(({ text, ...at }) => ({ severity: 'warning', words: text, at, goTo: at }))
      for (const listener of this.listeners) listener()
    })
    worker.postMessage(toJson(this.session.workbook))
  }
}

const watches = new WeakMap<WorkbookSession, KindWatch>()

export function useKindFindings(session: WorkbookSession): readonly Finding[] {
  const watch = watches.get(session) ?? new KindWatch(session)
  watches.set(session, watch)
  return useSyncExternalStore(watch.subscribe, watch.snapshot, watch.snapshot)
}
