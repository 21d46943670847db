import { useEffect, useState } from 'react'
import type { Trial } from '@/lib/commands'
import type { WorkbookSession } from '../_editor/session-contract'
import { type Outcome, outcomeOf, type TrialNames } from './trial'

export interface Progress {
  readonly outcomes: readonly Outcome[]
  readonly running: boolean
  /** Why it ended before all were tried. */
  readonly stopped?: string
  readonly cancel: () => void
}

/** Tries one after another, in the worker, and shows each as it comes; cancelling keeps what is known so far. */
export function useOutcomes(session: WorkbookSession, trials: readonly Trial[], names: TrialNames): Progress {
  // What was asked for when the panel opened; the same run for as long as it is open.
  const [asked] = useState({ session, trials, names })
  const [outcomes, setOutcomes] = useState<readonly Outcome[]>([])
  const [running, setRunning] = useState(true)
  const [stopped, setStopped] = useState<string | undefined>(undefined)
  const [cancel, setCancel] = useState<() => void>(() => () => undefined)

  useEffect(() => {
    let gone = false
    const wanted = Object.values(asked.names).filter((name): name is string => name !== undefined)
    const found: Outcome[] = []
    const lists = asked.trials.map(({ operations }) => operations)
    const run = asked.session.tryMany(lists, wanted, (index, values) => {
      const trial = asked.trials[index]
      if (gone || !trial) return
      found.push(outcomeOf(trial, asked.names, values))
      setOutcomes([...found])
    })
    setCancel(() => () => {
      run.cancel()
      setRunning(false)
    })
    run.result
      .catch((error: unknown) => {
        if (!gone) setStopped(error instanceof Error ? error.message : 'The calculation stopped.')
      })
      .finally(() => {
        if (!gone) setRunning(false)
      })
    return () => {
      gone = true
      run.cancel()
    }
  }, [asked])

  return { outcomes, running, ...(stopped === undefined ? {} : { stopped }), cancel }
}
