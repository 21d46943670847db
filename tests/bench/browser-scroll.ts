import type { Bench, Uploaded } from './browser'
import { goToCell, openEditor } from './editor-page'
import { frames } from './page-probe'
import type { Line } from './report'
import { maximum, median, percentile } from './statistics'

const rounds = 3
const milliseconds = 3_000

/** Frames while the wheel turns over a long sheet, against frames while nothing happens. */
export async function measureScroll(bench: Bench, { id, title, subject }: Uploaded): Promise<Line[]> {
  const page = await openEditor(bench.context, bench.app, id)
  await goToCell(page, subject.workbook, subject.edits.local.place)
  const box = await page.locator('[data-region="grid"]').boundingBox()
  if (!box) throw new Error('the grid is not on the screen')
  await page.mouse.move(box.x + box.width / 2, box.y + box.height / 2)
  const idle: number[][] = []
  const scrolling: number[][] = []
  for (let round = 0; round < rounds; round++) {
    idle.push(await frames(page, milliseconds))
    const counted = frames(page, milliseconds)
    const until = performance.now() + milliseconds
    const direction = round % 2 === 0 ? 1 : -1
    while (performance.now() < until) {
      await page.mouse.wheel(0, direction * 120)
      await page.waitForTimeout(8)
    }
    scrolling.push(await counted)
  }
  await page.close()
  const p95 = (rounds: readonly number[][]) => median(rounds.map((times) => percentile(times, 95)))
  const all = scrolling.flat()
  return [
    {
      section: 'browser',
      what: `${title}: scrolling, p95 frame to idle p95`,
      value: p95(scrolling) / p95(idle),
      unit: 'ratio',
      goal: { most: 1.1 },
      raw: `${p95(scrolling).toFixed(1)} ms to ${p95(idle).toFixed(1)} ms`,
    },
    {
      section: 'browser',
      what: `${title}: scrolling, longest frame`,
      value: maximum(all),
      unit: 'ms',
      goal: { most: 34 },
      raw: `${all.filter((time) => time > 34).length} of ${all.length} frames above 34 ms; idle ${maximum(idle.flat()).toFixed(1)} ms`,
    },
  ]
}
