import { apiOf, newWorkbook } from './api'
import { signIn, startBenchApp } from './bench-app'
import { launchChromium } from './chromium'
import { withCleanup } from './cleanup'
import { buildEmptyApp } from './empty-app'
import type { Say } from './main'
import { startNext } from './next-server'
import type { Line } from './report'
import { percentile } from './statistics'

const warmUp = 50
const requests = 400

/** One edit saved over HTTP against a route that parses the same body and answers, without a database, by turns. */
export function run(say: Say): Promise<Line[]> {
  return withCleanup(async (later) => {
    const empty = await startNext(await buildEmptyApp())
    later(empty.stop)
    const app = await startBenchApp('autosave')
    later(app.stop)
    const browser = await launchChromium()
    later(() => browser.close())
    const api = await apiOf(await signIn(browser, app), app)
    await browser.close()
    const { id } = await newWorkbook(api, 'Autosave')
    say('ready')
    const path = `/api/workbooks/${id}/operations`
    const times: Record<'app' | 'empty', number[]> = { app: [], empty: [] }
    for (let i = 0; i < warmUp + requests; i++) {
      const body = JSON.stringify(edit(i))
      const saved = await timed(app.address + path, api.headers, body)
      const answered = await timed(
        `${empty.address}/operations`,
        { 'content-type': 'application/json' },
        body,
      )
      if (i < warmUp) continue
      times.app.push(saved)
      times.empty.push(answered)
    }
    const of = (who: 'app' | 'empty', p: number) => percentile(times[who], p)
    const words = (who: 'app' | 'empty') => `${of(who, 50).toFixed(1)} / ${of(who, 95).toFixed(1)} ms`
    return [
      {
        section: 'autosave',
        what: 'autosave p95 to the same route without a database',
        value: of('app', 95) / of('empty', 95),
        unit: 'ratio',
        goal: { most: 1.5 },
        raw: `p50 / p95: app ${words('app')}, empty route ${words('empty')}`,
      },
    ]
  })
}

/** The width of the seeded frame, a little more each time. */
function edit(i: number) {
  const op = {
    kind: 'set-cells',
    sheet: 'frame',
    cells: [{ row: 2, column: 1, input: 24 + i / 64 }],
  }
  return { base: i, operations: [{ id: crypto.randomUUID(), batch: crypto.randomUUID(), op }] }
}

async function timed(address: string, headers: Record<string, string>, body: string): Promise<number> {
  const started = performance.now()
  const response = await fetch(address, { method: 'POST', headers, body })
  const text = await response.text()
  const took = performance.now() - started
  if (!response.ok) throw new Error(`${address} answered ${response.status}: ${text}`)
  return took
}
