import type { Bench, Uploaded } from './browser'
import { untilReady, workbookAddress } from './editor-page'
import { weighScripts } from './javascript'
import type { Line } from './report'

/** Scripts of the workbook's page against those of an empty page; the grid comes later, the engine only to the worker. */
export async function weighFirstLoad({ app, empty, context }: Bench, { id }: Uploaded): Promise<Line[]> {
  const page = await context.newPage()
  const bare = await weighScripts(page, `${empty.address}/`, () => page.waitForTimeout(500))
  const workbook = await weighScripts(page, workbookAddress(app, id), () => untilReady(page))
  await page.close()
  // Without these the noughts below would mean nothing.
  if (workbook.engineInWorker === 0) throw new Error('no worker was seen to fetch the engine')
  if (workbook.grid.length === 0) throw new Error('the grid was not seen to be fetched after the first load')
  const kB = (bytes: number) => bytes / 1000
  const sum = (sizes: readonly number[]) => sizes.reduce((total, size) => total + size, 0)
  const list = (sizes: readonly number[]) => `${sizes.map((size) => kB(size).toFixed(1)).join(' + ')} kB`
  const section = 'browser'
  return [
    {
      section,
      what: 'first-load JavaScript (gzip), workbook to empty page',
      value: workbook.first / bare.first,
      unit: 'ratio',
      goal: { most: 1.1 },
      raw: `${kB(workbook.first).toFixed(1)} kB to ${kB(bare.first).toFixed(1)} kB`,
    },
    {
      section,
      what: 'scripts of the grid, fetched after the first load (gzip)',
      value: kB(sum(workbook.grid)),
      unit: 'kB',
      goal: { most: 110 },
      raw: list(workbook.grid),
    },
    {
      section,
      what: 'other scripts fetched after the first load (gzip)',
      value: kB(sum(workbook.others)),
      unit: 'kB',
      raw: list(workbook.others),
    },
    {
      section,
      what: 'scripts with HyperFormula, fetched by the window (gzip)',
      value: workbook.engineOnWindow,
      unit: 'bytes',
      goal: { most: 0 },
      raw: `the worker fetches ${kB(workbook.engineInWorker).toFixed(1)} kB`,
    },
  ]
}
