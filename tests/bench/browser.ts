import type { Browser, BrowserContext } from 'playwright-core'
import { type Api, apiOf } from './api'
import { type BenchApp, signIn, startBenchApp } from './bench-app'
import { measureEdits } from './browser-edits'
import { weighFirstLoad } from './browser-first-load'
import { measureOpening } from './browser-opening'
import { measureScroll } from './browser-scroll'
import { launchChromium } from './chromium'
import { withCleanup } from './cleanup'
import { buildEmptyApp } from './empty-app'
import { generatedSizes, generateWorkbook } from './generated-workbook'
import type { Say } from './main'
import { type Server, startNext } from './next-server'
import { addProbe } from './page-probe'
import type { Line } from './report'
import type { Subject } from './subject'
import { upload } from './uploaded-workbook'

/** What every part of this section works with. */
export interface Bench {
  readonly app: BenchApp
  readonly empty: Server
  readonly browser: Browser
  /** Signed in, with the probe in every page. */
  readonly context: BrowserContext
  readonly api: Api
}

/** A generated workbook, and where the product holds it. */
export interface Uploaded {
  readonly id: string
  readonly title: string
  readonly subject: Subject
}

/** The whole product in Chromium, against an empty page and against HyperFormula alone in the same Chromium. */
export function run(say: Say): Promise<Line[]> {
  return withCleanup(async (later) => {
    const empty = await startNext(await buildEmptyApp())
    later(empty.stop)
    const app = await startBenchApp('browser')
    later(app.stop)
    const browser = await launchChromium()
    later(() => browser.close())
    const context = await signIn(browser, app)
    await addProbe(context)
    const bench: Bench = { app, empty, browser, context, api: await apiOf(context, app) }
    say('signed in')
    const workbooks: Uploaded[] = []
    for (const size of generatedSizes) {
      const subject = generateWorkbook(size)
      const title = `${size / 1000}k cells`
      workbooks.push({ id: await upload(bench.api, subject.workbook, title), title, subject })
      say(`${title} uploaded`)
    }
    const largest = workbooks.at(-1) as Uploaded
    const lines = await weighFirstLoad(bench, workbooks[0] as Uploaded)
    say('scripts weighed')
    lines.push(...(await measureOpening(bench, largest)))
    say('opening measured')
    for (const workbook of workbooks) {
      lines.push(...(await measureEdits(bench, workbook, workbook === largest)))
      say(`edits of ${workbook.title} measured`)
    }
    lines.push(...(await measureScroll(bench, largest)))
    return lines
  })
}
