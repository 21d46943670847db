'use client'

import { useEffect, useState } from 'react'
import type { WorkbookOpened } from '@/lib/workbook'
import { Editor } from './editor'
import { Opening } from './opening'
import { Session } from './session'

export interface OpenedProps {
  readonly workbook: WorkbookOpened
}

/** Keeps the session of an opened workbook for as long as the page is shown. */
export function Opened({ workbook }: OpenedProps) {
  const [session, setSession] = useState<Session | undefined>(undefined)
  useEffect(() => {
    const opened = new Session(workbook)
    setSession(opened)
    void opened.start()
    const cancelStart = afterPaint(() => opened.startEngine())
    const stopGuard = guard(opened)
    return () => {
      cancelStart()
      stopGuard()
      opened.close()
    }
  }, [workbook])
  return session ? <Editor session={session} /> : <Opening />
}

/** Two frames on: the first has drawn what the snapshot holds. Frames do not come to a tab in the background, so a timer stands by. */
function afterPaint(run: () => void): () => void {
  let done = false
  const once = () => {
    if (done) return
    done = true
    run()
  }
  requestAnimationFrame(() => requestAnimationFrame(once))
  const timer = setTimeout(once, 2000)
  return () => {
    done = true
    clearTimeout(timer)
  }
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
