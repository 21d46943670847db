import {
  type ClientPort,
  createEngineClient,
  type EngineClient,
  type EngineReply,
  type ManyTried,
  type Operation,
  type PackedChanges,
  type WorkbookJson,
} from '@/lib/workbook'
import type { EngineStatus } from './session-contract'

export interface EngineEvents {
  /** The workbook as it is now. */
  readonly workbook: () => WorkbookJson
  /**
   * What was computed, for the workbook before `ahead`: operations that were done here since and that the engine
   * has not been given yet. `all` when these are all values there are.
   */
  readonly changes: (packed: PackedChanges, all: boolean, ahead: readonly Operation[]) => void
  readonly status: () => void
  readonly stopped: (text: string) => void
}

/**
 * Gives the engine one list of operations at a time and holds the next ones back until it has answered, so that
 * it is always known which state of the workbook an answer is about.
 */
export class EngineLink {
  private held: Operation[] = []
  private busy = false
  private readonly client: EngineClient

  constructor(events: EngineEvents, spawn: () => ClientPort = spawnWorker) {
    this.client = createEngineClient({
      spawn,
      setTimer: (milliseconds, run) => {
        const timer = setTimeout(run, milliseconds)
        return () => clearTimeout(timer)
      },
      workbook: () => {
        // What is opened holds the operations that were held back too.
        this.held = []
        this.busy = true
        return events.workbook()
      },
      onValues: (packed, all) => {
        this.busy = false
        events.changes(packed, all, this.held)
        this.flush()
      },
      onStatus: (status) => {
        if (status.kind === 'stopped') {
          this.busy = false
          this.held = []
        }
        events.status()
      },
      onStopped: events.stopped,
    })
  }

  get status(): EngineStatus {
    return this.client.status
  }

  start(): void {
    this.client.start()
  }

  apply(operations: readonly Operation[]): void {
    // Before the start there is nothing to follow: what is opened holds them already.
    if (this.client.status.kind === 'starting' && !this.busy) return
    for (const operation of operations) this.held.push(operation)
    if (!this.busy) this.flush()
  }

  tryOut(operations: readonly Operation[], names: readonly string[]) {
    return this.client.tryOut(operations, names)
  }

  tryMany(...asked: Parameters<EngineClient['tryMany']>): ManyTried {
    return this.client.tryMany(...asked)
  }

  close(): void {
    this.client.close()
  }

  private flush(): void {
    if (this.held.length === 0) return
    const operations = this.held
    this.held = []
    this.busy = this.client.status.kind !== 'stopped'
    this.client.apply(operations)
  }
}

function spawnWorker(): ClientPort {
  const worker = new Worker(new URL('./engine.worker.ts', import.meta.url), { type: 'module' })
  return {
    post: (request) => worker.postMessage(request),
    onMessage: (listener) => {
      worker.addEventListener('message', (event: MessageEvent<EngineReply>) => listener(event.data))
    },
    onError: (listener) => {
      worker.addEventListener('error', (event) => listener(event.message))
    },
    terminate: () => worker.terminate(),
  }
}
