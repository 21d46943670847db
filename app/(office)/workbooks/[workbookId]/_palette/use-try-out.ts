import { useEffect, useRef, useState } from 'react'
import type { Operation } from '@/lib/workbook'
import type { Change, TryOut } from './palette-props'

/** Long enough that a word is typed in one go, short enough to feel like an answer. */
const pause = 140

/** One thing to try: `key` says when two are the same. */
export interface Trial {
  readonly key: string
  readonly operations: readonly Operation[]
}

/**
 * What would change, for each trial in turn, the first first. Nothing is asked before a pause in typing, one is asked
 * at a time, and what is no longer wanted is dropped. A trial that fails (the engine is not ready) shows nothing.
 */
export function useTryOut(
  tryOut: TryOut | undefined,
  trials: readonly Trial[],
): ReadonlyMap<string, readonly Change[]> {
  const [answers, setAnswers] = useState<ReadonlyMap<string, readonly Change[]>>(new Map())
  const latest = useRef({ trials, answers, tryOut })
  useEffect(() => {
    latest.current = { trials, answers, tryOut }
  })
  const wanted = trials.map(({ key }) => key).join('\n')
  useEffect(() => {
    let dropped = false
    const ask = async () => {
      const { trials: all, answers: known, tryOut: asked } = latest.current
      if (wanted === '' || !asked) return
      for (const trial of all) {
        if (known.has(trial.key)) continue
        const changes = await asked(trial.operations).catch(() => undefined)
        if (dropped) return
        if (changes) setAnswers((before) => new Map(before).set(trial.key, changes))
      }
    }
    const timer = setTimeout(() => void ask(), pause)
    return () => {
      dropped = true
      clearTimeout(timer)
    }
  }, [wanted])
  return answers
}
