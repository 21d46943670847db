'use client'

import { type ComponentType, useEffect, useState } from 'react'
import { ask } from '@/app/_ui/request'
import { type Failure, fail } from '@/lib/failures'
import type { WorkbookOpened } from '@/lib/workbook'
import { NotOpened } from './not-opened'
import type { OpenedProps } from './opened'
import { Opening } from './opening'

type State =
  | { readonly kind: 'opening' }
  | {
      readonly kind: 'opened'
      readonly workbook: WorkbookOpened
      readonly Opened: ComponentType<OpenedProps>
    }
  | { readonly kind: 'failed'; readonly failure: Failure }

/** The first code of the page is small: it asks for the workbook and for the editor at the same time. */
export function OpenWorkbook({ id }: { readonly id: string }) {
  const [state, setState] = useState<State>({ kind: 'opening' })
  const [attempt, setAttempt] = useState(0)

  // biome-ignore lint/correctness/useExhaustiveDependencies: an attempt more asks again
  useEffect(() => {
    let gone = false
    setState({ kind: 'opening' })
    void open(id).then((next) => {
      if (!gone) setState(next)
    })
    return () => {
      gone = true
    }
  }, [id, attempt])

  if (state.kind === 'opening') return <Opening />
  if (state.kind === 'failed') {
    return <NotOpened failure={state.failure} id={id} again={() => setAttempt((count) => count + 1)} />
  }
  return <state.Opened workbook={state.workbook} />
}

async function open(id: string): Promise<State> {
  const code = import('./opened').catch(() => undefined)
  const answer = await ask<WorkbookOpened>('GET', `/api/workbooks/${encodeURIComponent(id)}`)
  if (!answer.ok) return { kind: 'failed', failure: answer.failure }
  const loaded = await code
  if (loaded) return { kind: 'opened', workbook: answer.value, Opened: loaded.Opened }
  return {
    kind: 'failed',
    ...fail('unavailable', 'A part of the page did not arrive. Check the network and try again.'),
  }
}
