import { runFresh } from './child'
import type { Say } from './main'
import type { Line } from './report'
import { minimum } from './statistics'
import type { TrialTimes } from './trials-child'

const rounds = 3

/** The app rounds decimal numbers, HyperFormula alone binary ones: a line may come out a cent apart. */
const cents = 0.05

/** Every covering of the table on the seeded house: the app's engine, which takes each trial back, against HyperFormula alone. */
export async function run(say: Say): Promise<Line[]> {
  const [raw, app]: [TrialTimes[], TrialTimes[]] = [[], []]
  for (let round = 1; round <= rounds; round++) {
    raw.push(await runFresh<TrialTimes>('trials-child.ts', { who: 'raw' }))
    app.push(await runFresh<TrialTimes>('trials-child.ts', { who: 'app' }))
    say(`round ${round} of ${rounds}`)
  }
  requireAgreement(raw[0]?.totals ?? [], app[0]?.totals ?? [])
  const [ours, theirs] = [app, raw].map((times) => minimum(times.map(({ time }) => time)))
  if (ours === undefined || theirs === undefined) throw new Error('nothing was measured')
  return [
    {
      section: 'trials',
      what: `every one of ${app[0]?.trials} coverings tried, app to raw`,
      value: ours / theirs,
      unit: 'ratio',
      goal: { most: 1.5 },
      raw: `app ${ours.toFixed(0)} ms, raw ${theirs.toFixed(0)} ms`,
    },
  ]
}

function requireAgreement(raw: TrialTimes['totals'], app: TrialTimes['totals']): void {
  raw.forEach((expected, i) => {
    const got = app[i]
    const close =
      typeof expected === 'number' && typeof got === 'number'
        ? Math.abs(expected - got) <= cents
        : typeof expected === typeof got
    if (!close)
      throw new Error(
        `covering ${i + 1}: the app says ${JSON.stringify(got)}, not ${JSON.stringify(expected)}`,
      )
  })
}
