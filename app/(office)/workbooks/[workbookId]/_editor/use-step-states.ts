import { useEffect, useState } from 'react'
import type { Sheet } from '@/lib/workbook'
import type { CheckBook, Finding } from './checks'
import { useKindFindings } from './kind-watch'
import type { WorkbookSession } from './session-contract'
import { type StepState, stepState } from './step-state'
import { useCheckBook } from './use-check-book'
import { useShape } from './use-session'

/** States of all sheets by id; read anew, a little after the values have settled, where something changed. */
export function useStepStates(session: WorkbookSession): ReadonlyMap<string, StepState> {
  const shape = useShape(session)
  const book = useCheckBook()
  const kinds = useKindFindings(session)
  const [states, setStates] = useState<ReadonlyMap<string, StepState>>(new Map())

  // biome-ignore lint/correctness/useExhaustiveDependencies: a change of shape asks for every sheet anew
  useEffect(() => {
    const waiting = new Set(session.workbook.sheets.map((sheet) => sheet.id))
    let timer: ReturnType<typeof setTimeout> | undefined
    const readOne = () => {
      timer = undefined
      const id = waiting.values().next().value
      if (id === undefined) return
      waiting.delete(id)
      const sheet = session.workbook.sheets.find((candidate) => candidate.id === id)
      if (sheet) setStates((before) => withState(before, session, sheet, book, kinds))
      if (waiting.size > 0) plan(0)
    }
    const plan = (wait: number) => {
      timer ??= setTimeout(readOne, wait)
    }
    plan(0)
    const stop = session.onValues((changes) => {
      for (const sheet of changes.sheets) waiting.add(sheet)
      plan(150)
    })
    return () => {
      stop()
      clearTimeout(timer)
    }
  }, [session, shape, book, kinds])

  return states
}

function withState(
  before: ReadonlyMap<string, StepState>,
  session: WorkbookSession,
  sheet: Sheet,
  book: CheckBook | undefined,
  kinds: readonly Finding[],
): ReadonlyMap<string, StepState> {
  const next = stepState(session.workbook, sheet, (address) => session.value(address), book, kinds)
  const known = before.get(sheet.id)
  if (known && same(known, next)) return before
  return new Map(before).set(sheet.id, next)
}

function same(a: StepState, b: StepState): boolean {
  return a.filled === b.filled && a.toLookAt === b.toLookAt && a.words.join() === b.words.join()
}
