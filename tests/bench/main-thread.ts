import type { Browser } from 'playwright-core'

/** The longest task that a page's main thread had, in milliseconds. */
export interface LongestTask {
  /** Processor time: what the page itself asks for, however busy the machine is. */
  readonly processor: number
  /** By the clock: what a person would have waited. */
  readonly clock: number
}

interface TraceEvent {
  readonly name: string
  readonly ph: string
  readonly pid: number
  readonly tid: number
  /** Microseconds by the clock, and of processor time. */
  readonly dur?: number
  readonly tdur?: number
  readonly args?: { readonly name?: string }
}

/** Records every task of every page's main thread while `act` runs; only one page should have work then. */
export async function longestTaskDuring(browser: Browser, act: () => Promise<unknown>): Promise<LongestTask> {
  await browser.startTracing(undefined, { categories: ['toplevel', '__metadata'] })
  // Tracing is stopped whatever happened, or the next one could not start.
  const failure = await act().then(
    () => undefined,
    (error: unknown) => error ?? new Error('failed'),
  )
  const recorded = await browser.stopTracing()
  if (failure) throw failure
  const { traceEvents } = JSON.parse(recorded.toString()) as { readonly traceEvents: readonly TraceEvent[] }
  const mainThreads = new Set(
    traceEvents
      .filter(({ name, args }) => name === 'thread_name' && args?.name === 'CrRendererMain')
      .map(({ pid, tid }) => `${pid} ${tid}`),
  )
  const tasks = traceEvents.filter(
    ({ name, ph, pid, tid }) =>
      ph === 'X' && name === 'ThreadControllerImpl::RunTask' && mainThreads.has(`${pid} ${tid}`),
  )
  if (tasks.length === 0) throw new Error('no task of a main thread was recorded')
  const longest = (of: (task: TraceEvent) => number | undefined) =>
    tasks.reduce((most, task) => Math.max(most, of(task) ?? 0), 0) / 1000
  return { processor: longest(({ tdur }) => tdur), clock: longest(({ dur }) => dur) }
}
