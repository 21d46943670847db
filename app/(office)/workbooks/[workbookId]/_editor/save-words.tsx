'use client'

import type { SaveStatus, WorkbookSession } from './session-contract'
import { useSession } from './use-session'

/** The status words: saved, saving, offline with how many changes, cannot save and why. */
export function saveWords(save: SaveStatus): { readonly word: string; readonly rest: string } {
  switch (save.kind) {
    case 'saved':
      return { word: 'saved', rest: '' }
    case 'saving':
      return { word: 'saving', rest: '' }
    case 'offline':
      return { word: 'offline', rest: `, ${count(save.pending)} kept here` }
    case 'cannot-save':
      return { word: 'cannot save', rest: `: ${save.text}` }
  }
}

const count = (pending: number) => `${pending} ${pending === 1 ? 'change' : 'changes'}`

const tones: Record<SaveStatus['kind'], string> = {
  saved: 'text-moss',
  saving: 'text-quiet',
  offline: 'text-clay',
  'cannot-save': 'text-ember',
}

export function SaveWords({ session }: { readonly session: WorkbookSession }) {
  const { save, engine } = useSession(session)
  const { word, rest } = saveWords(save)
  return (
    <span role="status" data-save={save.kind} className="text-[0.8125rem]">
      <span className={`font-semibold ${tones[save.kind]}`}>{word}</span>
      <span className={save.kind === 'cannot-save' ? 'text-ember' : 'text-quiet'}>{rest}</span>
      {engine.kind === 'stopped' ? <span className="text-ember"> · {engine.text}</span> : null}
      {engine.kind === 'starting' ? <span className="text-quiet"> · starting to compute</span> : null}
      {engine.kind === 'working' ? <span className="text-quiet"> · computing</span> : null}
    </span>
  )
}
