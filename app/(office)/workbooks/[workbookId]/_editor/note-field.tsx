'use client'

import { useState } from 'react'
import { type CellAddress, cellAt, cellName, limits } from '@/lib/workbook'
import { say } from './run-effect'
import type { WorkbookSession } from './session-contract'

/** The note of a cell, written in the entry line: Enter keeps it, Esc leaves it as it was. */
export function NoteField({
  session,
  address,
  onDone,
}: {
  readonly session: WorkbookSession
  readonly address: CellAddress
  readonly onDone: () => void
}) {
  const before = cellAt(session.workbook, address)?.note ?? ''
  const [text, setText] = useState(before)
  const name = cellName(address.row, address.column)

  const keep = () => {
    const note = text.trim()
    if (note !== before) {
      const { sheet, row, column } = address
      const cells = [{ row, column, note: note === '' ? null : note }]
      const done = session.dispatch(`Note on ${name}`, [{ kind: 'set-cells', sheet, cells }])
      if (!done.ok) say(done.failure.text)
    }
    onDone()
  }

  return (
    <input
      // The person has just asked to write it.
      // biome-ignore lint/a11y/noAutofocus: see above
      autoFocus
      aria-label={`Note on ${name}`}
      placeholder="a note on this cell"
      maxLength={limits.noteLength}
      value={text}
      onChange={(event) => setText(event.target.value)}
      onKeyDown={(event) => {
        if (event.key === 'Enter') keep()
        else if (event.key === 'Escape') onDone()
        else return
        event.preventDefault()
        event.stopPropagation()
      }}
      onBlur={onDone}
      className="block w-full bg-transparent text-[0.8125rem] leading-5 outline-none placeholder:text-quiet focus-visible:shadow-[0_1px_0_var(--clay)]"
    />
  )
}
