import { runFresh } from './child'
import type { ExportTimes } from './export-child'
import type { Say } from './main'
import type { Line } from './report'
import { median, minimum } from './statistics'

const rounds = 5
const size = 50_000

/** The exported file against exceljs's own streaming writer with the same cells and no style, in processes by turns, processor time. */
export async function run(say: Say): Promise<Line[]> {
  const raw: ExportTimes[] = []
  const app: ExportTimes[] = []
  for (let round = 0; round < rounds; round++) {
    raw.push(await runFresh<ExportTimes>('export-child.ts', { who: 'raw', size }, ['--expose-gc']))
    app.push(await runFresh<ExportTimes>('export-child.ts', { who: 'app', size }, ['--expose-gc']))
  }
  say('done')
  const time = (times: readonly ExportTimes[]) => minimum(times.map((one) => one.milliseconds))
  const growth = (times: readonly ExportTimes[]) => median(times.map((one) => one.megabytes))
  const bytes = (times: readonly ExportTimes[]) => (times[0]?.bytes ?? 0) / 1000
  return [
    {
      section: 'export',
      what: '50k cells: export, app to raw exceljs (stretch 0.7)',
      value: time(app) / time(raw),
      unit: 'ratio',
      goal: { most: 1.3 },
      raw: `app ${time(app).toFixed(0)} ms, raw ${time(raw).toFixed(0)} ms`,
    },
    {
      section: 'export',
      what: '50k cells: growth of the process while it writes',
      value: growth(app),
      unit: 'MB',
      raw: `raw ${growth(raw).toFixed(1)} MB; files ${bytes(app).toFixed(0)} and ${bytes(raw).toFixed(0)} kB`,
    },
  ]
}
