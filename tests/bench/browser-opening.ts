import { engineConfig } from '@/lib/workbook/engine/config'
import type { Bench, Uploaded } from './browser'
import { openRawPage } from './chromium'
import { untilReady, workbookAddress } from './editor-page'
import { addProbe, firstPainted, workerAt } from './page-probe'
import { buildRaw, rawAddress, rawSource } from './raw-engine'
import type { Line } from './report'
import { median, minimum } from './statistics'

const rounds = 3

/** From asking for the page, with an empty cache, until a computed total stands on the screen; then until formulas run. */
export async function measureOpening(bench: Bench, { id, title, subject }: Uploaded): Promise<Line[]> {
  const total = totalOf(subject)
  const source = rawSource(subject.workbook, engineConfig)
  const values: number[] = []
  const ready: number[] = []
  const raw: number[] = []
  for (let round = 0; round < rounds; round++) {
    const context = await bench.browser.newContext({
      viewport: { width: 1440, height: 900 },
      storageState: await bench.context.storageState(),
    })
    await addProbe(context)
    const page = await context.newPage()
    await page.goto(workbookAddress(bench.app, id), { waitUntil: 'commit' })
    values.push(await firstPainted(page, total, 0.0051))
    await untilReady(page)
    ready.push((await page.evaluate(() => performance.now())) - (await workerAt(page)))
    await context.close()
    const rawPage = await bench.browser.newPage()
    raw.push(await openRawPage(rawPage, source))
    await rawPage.close()
  }
  const list = (times: readonly number[]) => times.map((time) => time.toFixed(0)).join(', ')
  return [
    {
      section: 'browser',
      what: `${title}: values on screen on opening`,
      value: median(values),
      unit: 'ms',
      goal: { most: 1_500 },
      raw: `${list(values)} ms, nothing cached`,
    },
    {
      section: 'browser',
      what: `${title}: worker made until ready, to raw build in a page`,
      value: minimum(ready) / minimum(raw),
      unit: 'ratio',
      raw: `app ${list(ready)} ms (fetching the engine included), raw ${list(raw)} ms`,
    },
  ]
}

function totalOf({ workbook, edits }: Uploaded['subject']): number {
  const raw = buildRaw(rawSource(workbook, engineConfig))
  const total = Number(raw.getCellValue(rawAddress(raw, workbook, edits.fan.result)))
  raw.destroy()
  return total
}
