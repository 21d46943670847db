'use client'

import { type KeyboardEvent, useEffect, useId, useReducer, useRef } from 'react'
import { sheetById } from '@/lib/workbook'
import { pressOf } from '../_grid/cell-editor'
import type { Editing } from '../_grid/editing'
import { openingText } from '../_grid/entry'
import { editAction } from '../_grid/keys'
import { CellAbout } from './cell-about'
import { cellWords } from './cell-words'
import { entryPreview } from './entry-preview'
import { lastChangeWords } from './last-change-words'
import { NoteField } from './note-field'
import { lockWords } from './permission-words'
import { SaveWords } from './save-words'
import type { WorkbookSession } from './session-contract'
import { useSession, useView } from './use-session'
import type { EditorView } from './view-state'

interface Props {
  readonly session: WorkbookSession
  readonly view: EditorView
  readonly editing: Editing
  /** The second line is the cell's note, being written. */
  readonly note: boolean
  readonly onNoteDone: () => void
}

/** The selected cell's input, what it is in words, its unit and source, and whether everything is saved. */
export function EntryLine({ session, view, editing, note, onNoteDone }: Props) {
  useSession(session)
  useValuesOf(session, view)
  const { sheet: shown, selection, edit } = useView(view)
  const { row, column } = selection.active
  const sheet = sheetById(session.workbook, shown)
  const address = { sheet: shown, row, column }
  const typing = edit?.sheet === shown && edit.row === row && edit.column === column ? edit.text : undefined
  const words = cellWords(session, address, typing)
  const preview = typing === undefined ? undefined : entryPreview(session, editing, address, typing)
  const changed = lastChangeWords(session, session.lastChange(address), new Date())
  const locked = sheet && lockWords(session, sheet)
  const id = useId()
  const input = useRef<HTMLTextAreaElement>(null)
  const text = edit?.text ?? (sheet ? openingText(editing.context(sheet), row, column) : '')
  const problem = (edit?.where === 'line' ? edit.error : undefined) ?? words.error

  const onKeyDown = (event: KeyboardEvent<HTMLTextAreaElement>) => {
    const action = editAction(pressOf(event), 'amend', false)
    if (!action || action.kind === 'choose' || action.kind === 'newline') return
    event.preventDefault()
    event.stopPropagation()
    if (action.kind === 'cancel') editing.cancel()
    else if (edit) editing.commit(edit.text, action.axis, action.by)
    else view.focus?.grid()
  }

  return (
    <section
      aria-label="Entry line"
      data-region="entry-line"
      className="grid shrink-0 grid-cols-[auto_1fr_auto] items-center gap-x-5 gap-y-0.5 border-line border-t bg-raised px-4 py-2.5 max-sm:grid-cols-[auto_1fr] max-sm:gap-x-3"
    >
      <span className="figure w-14 font-semibold text-[0.875rem] text-clay max-sm:w-10">{words.address}</span>
      <div className="min-w-0">
        <div className="flex items-baseline gap-4">
          {/* A text field of one row: a plain input would drop the line breaks of a text. */}
          <textarea
            ref={input}
            rows={1}
            data-region-focus
            aria-label={`Input of ${words.address}`}
            aria-describedby={`${id}-about`}
            aria-invalid={edit?.where === 'line' && edit.error ? true : undefined}
            value={text}
            readOnly={locked !== undefined}
            spellCheck={false}
            autoComplete="off"
            placeholder={locked ? '' : 'empty'}
            className="block h-6 min-w-0 flex-1 resize-none overflow-hidden whitespace-pre rounded-[2px] focus:h-auto focus:max-h-24 focus:overflow-y-auto focus:field-sizing-content bg-transparent text-[0.9375rem] leading-6 outline-none placeholder:text-quiet focus-visible:bg-paper focus-visible:shadow-[0_0_0_4px_var(--paper),0_2px_0_4px_var(--clay)]"
            onFocus={() => {
              if (locked === undefined && !edit) editing.begin('line')
            }}
            onChange={(event) => {
              if (!edit && !editing.begin('line')) return
              editing.retype(event.target.value)
            }}
            onBlur={() => {
              const now = view.snapshot().edit
              if (now?.where === 'line' && !now.error) editing.commit(now.text, 'none', 0, false)
            }}
            onKeyDown={onKeyDown}
          />
          <output className="figure shrink-0 text-[0.875rem] text-quiet">
            {preview ? `= ${preview}` : ''}
          </output>
        </div>
        {note && sheet && locked === undefined ? (
          <NoteField
            key={`${shown} ${row} ${column}`}
            session={session}
            address={address}
            onDone={() => {
              onNoteDone()
              view.focus?.grid()
            }}
          />
        ) : null}
        {note ? null : (
          <CellAbout
            key={`${shown} ${row} ${column}`}
            id={`${id}-about`}
            problem={problem}
            parts={[words.about, words.formula, words.note, locked]}
          />
        )}
      </div>
      <div className="text-right text-[0.8125rem] text-quiet leading-5 max-sm:col-span-2 max-sm:flex max-sm:justify-between max-sm:text-left">
        <p className="max-w-[26rem] truncate" title={words.source || undefined}>
          {[words.unit, words.source].filter(Boolean).join(' · ')}
        </p>
        <p>
          {changed ? <span className="max-lg:hidden">{changed} · </span> : null}
          <SaveWords session={session} />
        </p>
      </div>
    </section>
  )
}

/** Renders again when the value of the active cell may have changed. */
function useValuesOf(session: WorkbookSession, view: EditorView): void {
  const [, again] = useReducer((count: number) => count + 1, 0)
  useEffect(
    () =>
      session.onValues((changes) => {
        if (changes.sheets.includes(view.snapshot().sheet)) again()
      }),
    [session, view],
  )
}
