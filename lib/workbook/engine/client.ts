import type { PackedChanges } from '../contracts'
import type { Operation } from '../operations'
import type { WorkbookJson } from '../serial'
import type { ClientPort, EngineReply, EngineRequest, TriedValues } from './protocol'
import { enqueue, type Task } from './queue'
import { formulasOf, hangWords, placeOf } from './suspects'

export type EngineClientStatus =
  | { readonly kind: 'starting' }
  | { readonly kind: 'ready' }
  | { readonly kind: 'working' }
  | { readonly kind: 'stopped'; readonly text: string }

export interface EngineClientOptions {
  /** Starts a worker. */
  readonly spawn: () => ClientPort
  /** Runs `run` after a time; what it returns takes that back. */
  readonly setTimer: (milliseconds: number, run: () => void) => () => void
  /** The workbook as it is now, with every operation that was given to `apply`. */
  readonly workbook: () => WorkbookJson
  /** `all` when these are all values there are, after opening. */
  readonly onValues: (packed: PackedChanges, all: boolean) => void
  readonly onStatus: (status: EngineClientStatus) => void
  /** A calculation was stopped and the engine started again; the sentence names the cell or the sheet. */
  readonly onStopped?: (text: string) => void
  /** Milliseconds that one answer may take. */
  readonly patience?: { readonly open: number; readonly answer: number }
}

export interface EngineClient {
  readonly status: EngineClientStatus
  start(): void
  /** Operations that the workbook got. Never waits. */
  apply(operations: readonly Operation[]): void
  tryOut(operations: readonly Operation[], names: readonly string[]): Promise<TriedValues>
  /**
   * Tries out many lists, one after another, each on the workbook as it is; a name that a list cannot be tried for is absent.
   * Edits go between them as ever, and end it, since what follows would be of another workbook.
   */
  tryMany(
    lists: readonly (readonly Operation[])[],
    names: readonly string[],
    onTried?: (index: number, values: TriedValues) => void,
  ): ManyTried
  close(): void
}

export interface ManyTried {
  /** The values of every list; rejected with words when it was cancelled, the workbook changed, or a calculation was stopped. */
  readonly result: Promise<readonly TriedValues[]>
  cancel(): void
}

const usualPatience = { open: 60_000, answer: 8_000 }

/**
 * The window's end of the engine: asks one thing at a time, and watches that it is answered.
 *
 * E12 An engine that does not answer in time is ended and started anew from the workbook, without the formulas that came with
 *     the last operations; the sentence names the cell. If it cannot even open, the last values stay and it is stopped until
 *     a formula changes.
 */
export function createEngineClient(options: EngineClientOptions): EngineClient {
  return new WatchedEngine(options)
}

class WatchedEngine implements EngineClient {
  status: EngineClientStatus = { kind: 'starting' }
  private port: ClientPort | undefined
  private waiting: Task[] = []
  private asked: { readonly seq: number; readonly task: Task | 'open' } | undefined
  private cancelTimer: () => void = () => {}
  private seq = 0
  private closed = false
  /** How often the workbook changed. */
  private changes = 0
  private readonly stopped = new Set<string>()

  constructor(private readonly options: EngineClientOptions) {}

  start(): void {
    if (this.closed) return
    this.end()
    const port = this.options.spawn()
    this.port = port
    port.onMessage((reply) => {
      if (port === this.port) this.take(reply)
    })
    port.onError((message) => {
      if (port === this.port) this.broke(message)
    })
    // What waits to be applied is part of the workbook that is opened.
    this.waiting = this.waiting.filter((task) => task.kind !== 'apply')
    this.setStatus({ kind: 'starting' })
    const workbook = this.options.workbook()
    this.ask('open', { kind: 'open', seq: this.nextSeq(), workbook, stopped: [...this.stopped] })
  }

  apply(operations: readonly Operation[]): void {
    if (this.closed || operations.length === 0) return
    this.changes += 1
    if (this.status.kind === 'stopped') {
      if (operations.some(changesContent)) this.start()
      return
    }
    if (this.port) this.add({ kind: 'apply', operations })
  }

  tryOut(operations: readonly Operation[], names: readonly string[]): Promise<TriedValues> {
    return this.try('try-out', operations, names)
  }

  tryMany(
    lists: readonly (readonly Operation[])[],
    names: readonly string[],
    onTried?: (index: number, values: TriedValues) => void,
  ): ManyTried {
    const changes = this.changes
    let cancelled = false
    const run = async (): Promise<readonly TriedValues[]> => {
      const all: TriedValues[] = []
      for (const [index, operations] of lists.entries()) {
        const values = await this.try('try-next', operations, names)
        if (cancelled) throw new Error('It was stopped.')
        if (changes !== this.changes) throw new Error('The workbook changed while this was tried out.')
        all.push(values)
        onTried?.(index, values)
      }
      return all
    }
    return {
      result: run(),
      cancel: () => {
        cancelled = true
      },
    }
  }

  private try(
    kind: 'try-out' | 'try-next',
    operations: readonly Operation[],
    names: readonly string[],
  ): Promise<TriedValues> {
    if (this.closed || !this.port || this.status.kind === 'starting' || this.status.kind === 'stopped') {
      return Promise.reject(new Error('The calculation is not ready yet.'))
    }
    return new Promise((resolve, reject) => {
      this.add({ kind, operations, names, resolve, reject })
    })
  }

  close(): void {
    this.closed = true
    this.rejectTryOuts('The workbook was closed.')
    this.waiting = []
    this.end()
  }

  private add(task: Task): void {
    this.waiting = enqueue(this.waiting, task)
    this.next()
  }

  private next(): void {
    if (this.asked || !this.port) return
    const task = this.waiting.shift()
    if (!task) {
      this.setStatus({ kind: 'ready' })
      return
    }
    this.setStatus({ kind: 'working' })
    const seq = this.nextSeq()
    const { operations } = task
    this.ask(
      task,
      task.kind === 'apply'
        ? { kind: 'apply', seq, operations }
        : { kind: task.kind, seq, operations, names: task.names },
    )
  }

  private ask(task: Task | 'open', request: EngineRequest): void {
    const patience = this.options.patience ?? usualPatience
    const time = task === 'open' ? patience.open : patience.answer
    this.asked = { seq: request.seq, task }
    this.cancelTimer = this.options.setTimer(time, () => this.hung(time))
    this.port?.post(request)
  }

  private take(reply: EngineReply): void {
    const asked = this.asked
    if (!asked || reply.seq !== asked.seq) return
    if (reply.kind === 'failed') {
      this.broke(reply.message)
      return
    }
    this.cancelTimer()
    this.asked = undefined
    if (reply.kind === 'tried') {
      if (asked.task !== 'open' && asked.task.kind !== 'apply') asked.task.resolve(reply.values)
    } else {
      this.options.onValues(reply.kind === 'opened' ? reply.values : reply.changes, reply.kind === 'opened')
    }
    this.next()
  }

  private hung(time: number): void {
    this.restart((place) => hangWords(place, time))
  }

  private broke(_message: string): void {
    this.restart((place) => `The calculation broke off${place === '' ? '' : ` at ${place}`}.`)
  }

  private restart(words: (place: string) => string): void {
    const task = this.asked?.task
    const workbook = this.options.workbook()
    const operations = task === undefined || task === 'open' ? [] : task.operations
    const text = words(placeOf(workbook, operations))
    this.end()
    if (task === undefined || task === 'open') {
      this.rejectTryOuts(text)
      this.setStatus({
        kind: 'stopped',
        text: `${text} The last values stay; change or remove a formula to start it again.`,
      })
      return
    }
    if (task.kind !== 'apply') task.reject(new Error(text))
    else for (const formula of formulasOf(operations)) this.stopped.add(formula)
    this.rejectTryOuts(text)
    this.options.onStopped?.(text)
    this.start()
  }

  private rejectTryOuts(text: string): void {
    for (const task of this.waiting) if (task.kind !== 'apply') task.reject(new Error(text))
    if (this.asked && this.asked.task !== 'open' && this.asked.task.kind !== 'apply') {
      this.asked.task.reject(new Error(text))
    }
    this.waiting = this.waiting.filter((task) => task.kind === 'apply')
  }

  private end(): void {
    this.cancelTimer()
    this.asked = undefined
    const port = this.port
    this.port = undefined
    port?.terminate()
  }

  private nextSeq(): number {
    this.seq += 1
    return this.seq
  }

  private setStatus(status: EngineClientStatus): void {
    if (status.kind === this.status.kind && status.kind !== 'stopped') {
      this.status = status
      return
    }
    this.status = status
    this.options.onStatus(status)
  }
}

function changesContent(operation: Operation): boolean {
  return (
    operation.kind === 'remove-sheet' ||
    operation.kind === 'remove-lines' ||
    operation.kind === 'set-cells' ||
    operation.kind === 'convert-units'
  )
}
