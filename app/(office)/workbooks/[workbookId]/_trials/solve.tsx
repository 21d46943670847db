'use client'

import { useEffect, useState } from 'react'
import { Button } from '@/app/_ui/button'
import { labelInSentence, labelOf, type SolveEffect } from '@/lib/commands'
import { type FormatOptions, formatQuantity } from '@/lib/units'
import { type NamedValue, type Operation, solveFor } from '@/lib/workbook'
import { commandContext } from '../_editor/command-context'
import { Panel } from '../_editor/panel'
import type { WorkbookSession } from '../_editor/session-contract'
import { tryOutTally } from '../_editor/try-out'
import { changeWords, differs } from '../_palette/change-words'
import type { Change } from '../_palette/palette-props'
import { currencyOf } from '../_tally/figures'

type State =
  | { readonly kind: 'working'; readonly tries: number }
  | { readonly kind: 'failed'; readonly text: string }
  | {
      readonly kind: 'found'
      readonly input: number
      readonly label: string
      readonly operations: readonly Operation[]
      readonly changes: readonly Change[]
    }

/** Looks for the input, says what it found and what that would change, and sets it only when told to. */
export function Solve({
  session,
  asked,
  onSet,
  onClose,
  onClosed,
}: {
  readonly session: WorkbookSession
  readonly asked: SolveEffect
  /** Sets it; the words of a refusal stay in the panel. */
  readonly onSet: (label: string, operations: readonly Operation[]) => string | undefined
  readonly onClose: () => void
  readonly onClosed: () => void
}) {
  const state = useSolved(session, asked)
  const [problem, setProblem] = useState<string | undefined>(undefined)
  const { target, from } = asked
  const result = session.workbook.names.get(asked.result)
  const input = session.workbook.names.get(asked.input)
  const show = shower(session)
  if (!result || !input) return null
  const inputWords = labelInSentence(input)
  return (
    <Panel
      title="Solve for"
      about={`${labelOf(result)} to come to ${show(target, result)}, by changing ${inputWords} alone.`}
      onClose={onClose}
      onClosed={onClosed}
    >
      <div className="min-h-0 overflow-y-auto px-5 py-4" role="status">
        {state.kind === 'working' ? <p>Looking … {state.tries} tried.</p> : null}
        {state.kind === 'failed' ? (
          <p className="text-ember">
            <span aria-hidden="true">! </span>
            {state.text}
          </p>
        ) : null}
        {state.kind === 'found' ? (
          <dl className="grid grid-cols-[auto_1fr] gap-x-6 gap-y-1.5">
            <dt className="font-semibold">{labelOf(input)}</dt>
            <dd className="figure m-0 font-semibold">
              {show(from, input)} → {show(state.input, input)}
            </dd>
            {state.changes.filter(differs).map((change) => (
              <div key={change.name} className="contents">
                <dt className="text-quiet">{change.label}</dt>
                <dd className="figure m-0">{changeWords(wordsFor(session), change)}</dd>
              </div>
            ))}
          </dl>
        ) : null}
        {problem ? (
          <p role="alert" className="mt-2 text-ember">
            {problem}
          </p>
        ) : null}
      </div>
      <footer className="flex flex-wrap items-center justify-end gap-3 border-line border-t px-5 py-3">
        <Button onClick={onClose}>{state.kind === 'working' ? 'Stop' : 'Leave it as it is'}</Button>
        {state.kind === 'found' ? (
          <Button tone="action" autoFocus onClick={() => setProblem(onSet(state.label, state.operations))}>
            Set {inputWords}
          </Button>
        ) : null}
      </footer>
    </Panel>
  )
}

function useSolved(session: WorkbookSession, asked: SolveEffect): State {
  const [state, setState] = useState<State>({ kind: 'working', tries: 0 })
  const [run] = useState({ session, asked })
  useEffect(() => {
    let gone = false
    void look(
      run.session,
      run.asked,
      () => gone,
      (tries) => setState({ kind: 'working', tries }),
    ).then(
      (found) => gone || setState(found),
      (error: unknown) =>
        gone || setState({ kind: 'failed', text: error instanceof Error ? error.message : String(error) }),
    )
    return () => {
      gone = true
    }
  }, [run])
  return state
}

async function look(
  session: WorkbookSession,
  asked: SolveEffect,
  isGone: () => boolean,
  onTry: (count: number) => void,
): Promise<State> {
  const input = session.workbook.names.get(asked.input)
  const result = session.workbook.names.get(asked.result)
  if (!input || !result) return { kind: 'failed', text: 'What was to be solved is no longer there.' }
  const show = shower(session)
  let tries = 0
  const solved = await solveFor(
    async (value) => {
      if (isGone()) throw new Error('It was stopped.')
      const values = await session.tryOut(setTo(input, value), [asked.result])
      tries += 1
      if (!isGone()) onTry(tries)
      return values[asked.result]?.[0] ?? null
    },
    { ...asked, sayInput: (value) => show(value, input), sayResult: (value) => show(value, result) },
  )
  if (!solved.ok) return { kind: 'failed', text: solved.failure.text }
  const found = solved.value.input
  if (found === asked.from) return { kind: 'failed', text: 'It is there already: nothing has to be changed.' }
  const operations = setTo(input, found)
  const changes = await tryOutTally(session, operations)
  const label = `Set ${labelInSentence(input)} to ${show(found, input)}`
  return { kind: 'found', input: found, label, operations, changes }
}

function setTo({ area: { sheet, row, column } }: NamedValue, input: number): readonly Operation[] {
  return [{ kind: 'set-cells', sheet, cells: [{ row, column, input }] }]
}

function shower(session: WorkbookSession): (value: number, named: NamedValue) => string {
  const currency = currencyOf(session.named)
  const options: FormatOptions = currency === undefined ? {} : { currency }
  return (value, { quantity }) => formatQuantity(value, quantity, session.workbook.system, options)
}

function wordsFor(session: WorkbookSession) {
  return commandContext(session, { sheet: '', row: 0, column: 0, rowCount: 1, columnCount: 1 }, [])
}
