import { runFresh } from './child'
import type { EngineTimes } from './engine-times'
import { generatedSizes } from './generated-workbook'
import type { Say } from './main'
import type { Line } from './report'
import { median, minimum } from './statistics'
import type { EditKind } from './subject'
import type { SubjectName } from './subjects'

const rounds = 4
const names: readonly SubjectName[] = ['seeded', ...generatedSizes]

/**
 * The app's engine (mirror, recalculation, packing of the changes) against HyperFormula alone, in processes by turns, processor time.
 * Rounds go over all workbooks, so that what else the machine does for a while hits one round of each.
 */
export async function run(say: Say): Promise<Line[]> {
  const measured = names.map((name) => ({ name, raw: [] as EngineTimes[], app: [] as EngineTimes[] }))
  for (let round = 1; round <= rounds; round++) {
    for (const { name, raw, app } of measured) {
      raw.push(await runFresh<EngineTimes>('engine-child.ts', { who: 'raw', what: name }))
      app.push(await runFresh<EngineTimes>('engine-child.ts', { who: 'app', what: name }))
    }
    say(`round ${round} of ${rounds}`)
  }
  return measured.flatMap(({ name, raw, app }) => {
    requireAgreement(name, raw, app)
    return linesOf(name, raw, app)
  })
}

/** Numbers of the two engines may differ in the last bits only. */
function requireAgreement(what: SubjectName, raw: readonly EngineTimes[], app: readonly EngineTimes[]): void {
  for (const kind of ['fan', 'price', 'local'] as const) {
    const [expected, got] = [raw[0]?.results[kind], app[0]?.results[kind]]
    const close =
      typeof expected === 'number' &&
      typeof got === 'number' &&
      Math.abs(expected - got) <= 1e-9 * Math.abs(expected)
    if (!close) throw new Error(`${what}, ${kind} edit: the app says ${JSON.stringify(got)}, not ${expected}`)
  }
}

function linesOf(what: SubjectName, raw: readonly EngineTimes[], app: readonly EngineTimes[]): Line[] {
  const edit = (times: readonly EngineTimes[], kind: EditKind) =>
    minimum(times.map((one) => median(one.edits[kind])))
  const build = (times: readonly EngineTimes[]) => minimum(times.map((one) => one.build))
  const title = typeof what === 'number' ? `${what / 1000}k cells` : 'seeded workbook'
  const against = (
    name: string,
    most: number | undefined,
    of: (times: readonly EngineTimes[]) => number,
  ): Line => ({
    section: 'engine',
    what: `${title}: ${name}, app to raw`,
    value: of(app) / of(raw),
    unit: 'ratio',
    ...(most !== undefined && { goal: { most } }),
    raw: `app ${of(app).toFixed(2)} ms, raw ${of(raw).toFixed(2)} ms`,
  })
  return [
    against('ready', 1.15, build),
    against(`fan edit (${raw[0]?.changes.fan} values)`, 1.15, (times) => edit(times, 'fan')),
    against('price-cell edit', undefined, (times) => edit(times, 'price')),
    against('local edit', undefined, (times) => edit(times, 'local')),
    {
      section: 'engine',
      what: `${title}: price-cell edit to fan edit, app`,
      value: edit(app, 'price') / edit(app, 'fan'),
      unit: 'ratio',
      goal: { most: 0.3 },
      raw: `app ${edit(app, 'price').toFixed(2)} to ${edit(app, 'fan').toFixed(2)} ms, raw ${(edit(raw, 'price') / edit(raw, 'fan')).toFixed(3)}`,
    },
  ]
}
