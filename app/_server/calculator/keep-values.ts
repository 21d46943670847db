import type { Actor } from '@/db/access/members'
import { openWorkbook, saveSnapshot } from '@/db/access/workbooks'
import { log, logBug } from '../log'
import { calculator } from './calculator'
import { storedState } from './stored-state'

/** Milliseconds without a further change after which values are computed, and the longest wait while changes go on. */
const quiet = 3_000
const longest = 30_000

interface Due {
  readonly since: number
  readonly timer: NodeJS.Timeout
}

const key = Symbol.for('panewright.due-values')
const shared = globalThis as { [key]?: Map<string, Due> }
shared[key] ??= new Map()
const due = shared[key]

/**
 * Sees to it that the workbook's newest state gets its computed values and list figures stored, some seconds from now:
 * the next opening then paints values before any engine runs. Losing this to a crash costs only that.
 */
export function keepValues(actor: Actor, workbookId: string): void {
  const slot = `${actor.firmId}/${workbookId}`
  const waiting = due.get(slot)
  const now = performance.now()
  const since = waiting?.since ?? now
  if (waiting) clearTimeout(waiting.timer)
  const timer = setTimeout(
    () => {
      due.delete(slot)
      computeAndKeep(actor, workbookId).catch((error: unknown) => logBug('values not kept', error))
    },
    Math.max(0, Math.min(quiet, since + longest - now)),
  )
  timer.unref()
  due.set(slot, { since, timer })
}

/** Lets go of everything that waits, as the server closes. */
export function stopKeeping(): void {
  for (const { timer } of due.values()) clearTimeout(timer)
  due.clear()
}

/** Whether the values of the newest state were stored; no when it changed meanwhile, or cannot be computed. */
export async function computeAndKeep(actor: Actor, workbookId: string): Promise<boolean> {
  const opened = await openWorkbook(actor, workbookId)
  if (!opened.ok) return false
  const { seq } = opened.value
  if (opened.value.snapshot.values && seq === opened.value.snapshot.seq) return true
  const computed = await calculator().run({ kind: 'values', state: storedState(opened.value) })
  if (!computed.ok) {
    log('warning', { event: 'values not computed', workbook: workbookId, code: computed.failure.code })
    return false
  }
  const { values, tally } = computed.value
  const saved = await saveSnapshot(actor, workbookId, { seq, values, tally: { ...tally } })
  return saved.ok && saved.value.saved
}
