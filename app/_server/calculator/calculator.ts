import { type ChildProcess, fork } from 'node:child_process'
import { setPriority } from 'node:os'
import { join } from 'node:path'
import { fail, type Result, succeed } from '@/lib/failures'
import { log } from '../log'
import type { AnswerMessage, AnswerOf, Job, JobMessage } from './jobs'

/**
 * Formulas are computed and files are written in a child process, one job at a time: a heavy workbook never holds
 * up other people's requests, and one that does not end is stopped with its process.
 */
export interface Calculator {
  run<J extends Job>(job: J): Promise<Result<AnswerOf<J>>>
  close(): void
}

export interface CalculatorOptions {
  /** Milliseconds after which a job's process is ended. */
  readonly limit: Readonly<Record<Job['kind'], number>>
  /** Jobs that may wait; one more is refused. */
  readonly waiting: number
  readonly entry: string
}

interface Waiting {
  readonly job: Job
  readonly settle: (result: Result<unknown>) => void
}

const stopped =
  'The workbook took too long to compute and was stopped. Look for a formula over a very large area.'
const died =
  'The workbook could not be computed. Try again; if it fails again, look for what was changed last.'

export function createCalculator(options: CalculatorOptions): Calculator {
  const queue: Waiting[] = []
  let child: ChildProcess | undefined
  let current: (Waiting & { readonly id: number; readonly timer: NodeJS.Timeout }) | undefined
  let lastId = 0

  function start(): ChildProcess {
    const started = fork(/* turbopackIgnore: true */ options.entry, [], {
      cwd: process.cwd(),
      execArgv: ['--import', 'tsx', '--max-old-space-size=768'],
      // The child computes and nothing else: it gets no database address and no secret.
      env: { NODE_ENV: process.env.NODE_ENV, PATH: process.env.PATH, HOME: process.env.HOME },
      serialization: 'advanced',
      stdio: ['ignore', 'ignore', 'inherit', 'ipc'],
    })
    lowerPriority(started)
    started.on('message', (message: AnswerMessage) => answered(message))
    started.on('error', (error) => log('error', { event: 'calculator error', detail: error.message }))
    started.on('exit', (code, signal) => ended(started, `exit ${code ?? signal}`))
    started.unref()
    started.channel?.unref()
    return started
  }

  function next(): void {
    if (current || queue.length === 0) return
    const waiting = queue.shift()
    if (!waiting) return
    child ??= start()
    const id = ++lastId
    const timer = setTimeout(() => {
      log('warning', { event: 'calculator stopped', kind: waiting.job.kind })
      finish(fail('unavailable', stopped, { message: 'time limit' }))
      stop()
      next()
    }, options.limit[waiting.job.kind])
    current = { ...waiting, id, timer }
    const message: JobMessage = { id, job: waiting.job }
    child.send(message, (error) => {
      if (error && current?.id === id) ended(child, error.message)
    })
  }

  function answered(message: AnswerMessage): void {
    if (message.id !== current?.id) return
    if (!message.ok) log('error', { event: 'calculator failed', detail: message.detail })
    finish(message.ok ? succeed(message.answer) : fail('unavailable', died, { message: 'job failed' }))
    next()
  }

  function ended(which: ChildProcess | undefined, detail: string): void {
    if (which !== child) return
    child = undefined
    if (!current) return
    log('error', { event: 'calculator ended', detail })
    finish(fail('unavailable', died, { message: detail }))
    next()
  }

  function finish(result: Result<unknown>): void {
    if (!current) return
    clearTimeout(current.timer)
    const { settle } = current
    current = undefined
    settle(result)
  }

  function stop(): void {
    const ending = child
    child = undefined
    ending?.kill('SIGKILL')
  }

  return {
    run<J extends Job>(job: J) {
      if (queue.length >= options.waiting) {
        return Promise.resolve(fail('unavailable', 'The server is busy computing. Try again in a minute.'))
      }
      return new Promise<Result<AnswerOf<J>>>((resolve) => {
        const waiting: Waiting = { job, settle: (result) => resolve(result as Result<AnswerOf<J>>) }
        // Somebody waits for a file; values are only wanted before the workbook is next opened.
        if (job.kind === 'xlsx')
          queue.splice(queue.filter((one) => one.job.kind === 'xlsx').length, 0, waiting)
        else queue.push(waiting)
        next()
      })
    },
    close() {
      for (const waiting of queue.splice(0)) waiting.settle(fail('unavailable', 'The server is closing.'))
      finish(fail('unavailable', 'The server is closing.'))
      stop()
    },
  }
}

/** A person typing comes before a file being written, on a machine with few cores. */
function lowerPriority(child: ChildProcess): void {
  try {
    if (child.pid !== undefined) setPriority(child.pid, 10)
  } catch {
    // The child may have ended already, which its exit event deals with.
  }
}

const key = Symbol.for('panewright.calculator')
const shared = globalThis as { [key]?: Calculator }

/** The server's one calculator, started by its first job. Routes are bundled apart, so it hangs on the global object. */
export function calculator(): Calculator {
  shared[key] ??= createCalculator({
    limit: { values: 30_000, xlsx: 60_000 },
    waiting: 64,
    entry: join(process.cwd(), 'app', '_server', 'calculator', 'calculator.node.ts'),
  })
  return shared[key]
}

export function closeCalculator(): void {
  shared[key]?.close()
  delete shared[key]
}
