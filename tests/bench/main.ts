import { cpus, loadavg } from 'node:os'
import { stopAll } from './cleanup'
import { type Line, printLines } from './report'

/** Loaded only when they run: a section that is not asked for costs nothing. */
const sections: Record<string, () => Promise<{ run: (say: Say) => Promise<Line[]> }>> = {
  engine: () => import('./engine'),
  export: () => import('./export'),
  append: () => import('./append'),
  autosave: () => import('./autosave'),
  trials: () => import('./trials'),
  browser: () => import('./browser'),
}

export type Say = (text: string) => void

const asked = process.argv.slice(2)
const unknown = asked.filter((name) => !(name in sections))
if (unknown.length > 0) {
  console.error(`There is no section ${unknown.join(', ')}. Sections: ${Object.keys(sections).join(', ')}.`)
  process.exit(2)
}

async function main(): Promise<void> {
  const lines: Line[] = []
  let broken = false
  for (const [name, load] of Object.entries(sections)) {
    if (asked.length > 0 && !asked.includes(name)) continue
    const started = performance.now()
    try {
      lines.push(...(await (await load()).run((text) => console.error(`[${name}] ${text}`))))
    } catch (error) {
      broken = true
      console.error(`[${name}] could not be measured:`, error)
    }
    console.error(`[${name}] ${((performance.now() - started) / 1000).toFixed(0)} s`)
  }
  console.log('')
  if (busy()) console.log('Other programs kept this machine busy: take the times below with care.\n')
  printLines(lines)
  process.exit(broken ? 1 : 0)
}

/** More programs wanted a processor over the last minutes than there are, the benchmark's own two among them. */
function busy(): boolean {
  return (loadavg()[1] ?? 0) > cpus().length + 1
}

for (const signal of ['SIGINT', 'SIGTERM'] as const) {
  process.once(signal, () => void stopAll().then(() => process.exit(1)))
}
void main()
