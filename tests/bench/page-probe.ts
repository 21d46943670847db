import { join } from 'node:path'
import type { BrowserContext, Page } from 'playwright-core'
import { projectRoot } from './empty-app'

/** What `page-probe.js` keeps on the window. */
interface Probe {
  painted(number: number, within: number): Promise<Painted>
  firstPainted(number: number, within: number): number | undefined
  workerAt(): number
  frames(milliseconds: number): Promise<number[]>
}

/** Milliseconds since the page began, and since Enter was last pressed. */
export interface Painted {
  readonly at: number
  readonly sinceEnter: number
}

type Probed = { readonly probe: Probe }

export async function addProbe(context: BrowserContext): Promise<void> {
  await context.addInitScript({ path: join(projectRoot, 'tests/bench/page-probe.js') })
}

/** Begins to wait for a number to be painted; ask before the act that brings it. Rejects after a minute without it. */
export async function painted(page: Page, number: number, within: number): Promise<Painted> {
  let timer: NodeJS.Timeout | undefined
  const late = new Promise<never>((_, reject) => {
    timer = setTimeout(() => reject(new Error(`${number} was not painted within a minute`)), 60_000)
  })
  const seen = page.evaluate(
    ({ number, within }) => (globalThis as never as Probed).probe.painted(number, within),
    { number, within },
  )
  return Promise.race([seen, late]).finally(() => clearTimeout(timer))
}

/** When a number first stood on the screen, in milliseconds since the page was asked for. */
export async function firstPainted(page: Page, number: number, within: number): Promise<number> {
  const handle = await page.waitForFunction(
    ({ number, within }) => (globalThis as never as Probed).probe.firstPainted(number, within),
    { number, within },
    { timeout: 60_000, polling: 100 },
  )
  return (await handle.jsonValue()) as number
}

/** When the page last made a worker, in its own milliseconds. */
export function workerAt(page: Page): Promise<number> {
  return page.evaluate(() => (globalThis as never as Probed).probe.workerAt())
}

export function frames(page: Page, milliseconds: number): Promise<number[]> {
  return page.evaluate(
    (milliseconds) => (globalThis as never as Probed).probe.frames(milliseconds),
    milliseconds,
  )
}
