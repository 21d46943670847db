import { useSyncExternalStore } from 'react'
import type { SessionSnapshot, WorkbookSession } from './session-contract'
import type { EditorView, ViewSnapshot } from './view-state'

/** The part of the session that screens show; renders again when it changes. */
export function useSession(session: WorkbookSession): SessionSnapshot {
  const read = () => session.snapshot()
  return useSyncExternalStore((listener) => session.subscribe(listener), read, read)
}

/** Counts up as lines, sheets, names or columns change; renders for nothing else. */
export function useShape(session: WorkbookSession): number {
  const read = () => session.snapshot().shape
  return useSyncExternalStore((listener) => session.subscribe(listener), read, read)
}

export function useView(view: EditorView): ViewSnapshot {
  return useSyncExternalStore(view.subscribe, view.snapshot, view.snapshot)
}
