'use client'

import Link from 'next/link'
import { useEffect, useState } from 'react'
import { Button, buttonClass } from '@/app/_ui/button'
import { Notice } from '@/app/_ui/notice'
import { ask } from '@/app/_ui/request'
import type { Failure } from '@/lib/failures'
import type { WorkbookOpened } from '@/lib/workbook'
import { Editor } from './editor'
import { Opening } from './opening'
import { Session } from './session'

type State =
  | { readonly kind: 'opening' }
  | { readonly kind: 'open'; readonly session: Session }
  | { readonly kind: 'failed'; readonly failure: Failure }

/** Fetches the workbook, opens it, and keeps it open for as long as the page is shown. */
export function OpenWorkbook({ id }: { readonly id: string }) {
  const [state, setState] = useState<State>({ kind: 'opening' })
  const [attempt, setAttempt] = useState(0)

  // biome-ignore lint/correctness/useExhaustiveDependencies: an attempt more asks again
  useEffect(() => {
    let session: Session | undefined
    let gone = false
    setState({ kind: 'opening' })
    void ask<WorkbookOpened>('GET', `/api/workbooks/${encodeURIComponent(id)}`).then((answer) => {
      if (gone) return
      if (!answer.ok) {
        setState({ kind: 'failed', failure: answer.failure })
        return
      }
      session = new Session(answer.value)
      setState({ kind: 'open', session })
      void session.start()
      startEngineAfterPaint(session)
    })
    return () => {
      gone = true
      session?.close()
    }
  }, [id, attempt])

  const session = state.kind === 'open' ? state.session : undefined
  useEffect(() => (session ? guard(session) : undefined), [session])

  if (state.kind === 'opening') return <Opening />
  if (state.kind === 'failed') {
    return <NotOpened failure={state.failure} id={id} again={() => setAttempt((count) => count + 1)} />
  }
  return <Editor session={state.session} />
}

/** Two frames: the first has drawn what the snapshot holds. */
function startEngineAfterPaint(session: Session): void {
  requestAnimationFrame(() => requestAnimationFrame(() => session.startEngine()))
}

/** Sends at once when the network or the person comes back, and asks before a page with unsaved changes is left. */
function guard(session: Session): () => void {
  const wake = () => session.wake()
  const onVisible = () => document.visibilityState === 'visible' && session.wake()
  const onLeave = (event: BeforeUnloadEvent) => {
    if (session.snapshot().save.kind !== 'saved') event.preventDefault()
  }
  window.addEventListener('online', wake)
  window.addEventListener('focus', wake)
  document.addEventListener('visibilitychange', onVisible)
  window.addEventListener('beforeunload', onLeave)
  return () => {
    window.removeEventListener('online', wake)
    window.removeEventListener('focus', wake)
    document.removeEventListener('visibilitychange', onVisible)
    window.removeEventListener('beforeunload', onLeave)
  }
}

function NotOpened({
  failure,
  id,
  again,
}: {
  readonly failure: Failure
  readonly id: string
  readonly again: () => void
}) {
  const signedOut = failure.code === 'unauthenticated'
  const absent = failure.code === 'not-found'
  return (
    <Notice
      title={
        signedOut ? 'You are signed out' : absent ? 'There is no such workbook' : 'The workbook did not open'
      }
      actions={
        <>
          {signedOut ? (
            <Link
              className={buttonClass('action')}
              href={`/sign-in?next=${encodeURIComponent(`/workbooks/${id}`)}`}
            >
              Sign in
            </Link>
          ) : absent ? null : (
            <Button tone="action" onClick={again}>
              Try again
            </Button>
          )}
          <Link className={buttonClass()} href="/workbooks">
            All workbooks
          </Link>
        </>
      }
    >
      <p>
        {absent
          ? 'It was removed, or it belongs to another firm.'
          : signedOut
            ? 'Sign in again to go on. Changes that were not saved yet are kept on this device.'
            : failure.text}
      </p>
    </Notice>
  )
}
