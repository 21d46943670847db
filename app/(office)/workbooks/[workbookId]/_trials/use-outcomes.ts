import { useEffect, useState } from 'react'
import type { CellValue, Operation } from '@/lib/workbook'
import { type Outcome, outcomeOf, type Trial, type TrialNames } from './trial'

export type TryOne = (
  operations: readonly Operation[],
  names: readonly string[],
) => Promise<Readonly<Record<string, readonly CellValue[]>>>

export interface Progress {
  readonly outcomes: readonly Outcome[]
  readonly running: boolean
  /** Why it ended before all were tried. */
  readonly stopped?: string
  readonly cancel: () => void
}

/** Tries one after another, in the worker, and shows each as it comes; cancelling keeps what is known so far. */
export function useOutcomes(trials: readonly Trial[], names: TrialNames, tryOne: TryOne): Progress {
  const [outcomes, setOutcomes] = useState<readonly Outcome[]>([])
  const [running, setRunning] = useState(true)
  const [stopped, setStopped] = useState<string | undefined>(undefined)
  const [run] = useState(() => ({ trials, names, tryOne, cancelled: false }))

  useEffect(() => {
    run.cancelled = false
    let gone = false
    const asked = Object.values(run.names).filter((name): name is string => name !== undefined)
    const work = async () => {
      const found: Outcome[] = []
      for (const trial of run.trials) {
        const values = await run.tryOne(trial.operations, asked)
        if (gone) return
        if (run.cancelled) break
        found.push(outcomeOf(trial, run.names, values))
        setOutcomes([...found])
      }
    }
    work()
      .catch((error: unknown) => {
        if (!gone) setStopped(error instanceof Error ? error.message : 'The calculation stopped.')
      })
      .finally(() => {
        if (!gone) setRunning(false)
      })
    return () => {
      gone = true
    }
  }, [run])

  return {
    outcomes,
    running,
    ...(stopped === undefined ? {} : { stopped }),
    cancel: () => {
      run.cancelled = true
      setRunning(false)
    },
  }
}
