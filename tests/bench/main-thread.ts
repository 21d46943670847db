import type { Browser, Page } from 'playwright-core'

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
}

const sign = 'benchmark'

/** Records the tasks of this page's main thread while `act` runs. */
export async function longestTaskDuring(
  browser: Browser,
  page: Page,
  act: () => Promise<unknown>,
): Promise<LongestTask> {
  await browser.startTracing(undefined, { categories: ['toplevel', 'blink.user_timing', '__metadata'] })
  // The record is of all pages: a mark tells which thread is this one's.
  await page.evaluate((sign) => performance.mark(sign), sign)
  // Tracing is stopped whatever happened, or the next one could not start.
  const failure = await act().then(
    () => undefined,
    (error: unknown) => error ?? new Error('failed'),
  )
  const recorded = await browser.stopTracing()
  if (failure) throw failure
  const { traceEvents } = JSON.parse(recorded.toString()) as { readonly traceEvents: readonly TraceEvent[] }
  const mark = traceEvents.find(({ name }) => name === sign)
  const tasks = traceEvents.filter(
    ({ name, ph, pid, tid }) =>
      ph === 'X' && name === 'ThreadControllerImpl::RunTask' && pid === mark?.pid && tid === mark.tid,
  )
  if (tasks.length === 0) throw new Error('no task of a main thread was recorded')
  const longest = (of: (task: TraceEvent) => number | undefined) =>
    tasks.reduce((most, task) => Math.max(most, of(task) ?? 0), 0) / 1000
  return { processor: longest(({ tdur }) => tdur), clock: longest(({ dur }) => dur) }
}
