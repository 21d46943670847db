'use client'

import { useEffect, useState } from 'react'
import { cellName, type Sheet } from '@/lib/workbook'
import type { WorkbookSession } from '../_editor/session-contract'
import { useView } from '../_editor/use-session'
import type { EditorView } from '../_editor/view-state'
import { type CellSource, groundOf, shownText } from './cell-content'
import type { ColumnHead } from './draw'
import { rectangle } from './selection'

const rest = 150

/** Says where the selection has come to, once it rests: one announcement a move. */
export function SelectedCellWords({
  view,
  sheet,
  source,
  heads,
}: {
  readonly session: WorkbookSession
  readonly view: EditorView
  readonly sheet: Sheet
  readonly source: CellSource
  readonly heads: readonly ColumnHead[]
}) {
  const { selection } = useView(view)
  const [said, setSaid] = useState('')
  useEffect(() => {
    const timer = setTimeout(() => {
      const { row, column } = selection.active
      const { rowCount, columnCount } = rectangle(selection)
      const ground = groundOf(sheet.rows[row]?.[column])
      const parts = [
        `${cellName(row, column)} ${heads[column]?.title ?? ''}`.trim(),
        shownText(source, row, column) || 'empty',
        ['input', 'table', 'override'].includes(ground) ? ground : '',
        rowCount * columnCount > 1 ? `${rowCount} by ${columnCount} cells selected` : '',
      ]
      setSaid(parts.filter(Boolean).join(', '))
    }, rest)
    return () => clearTimeout(timer)
  }, [selection, sheet, source, heads])
  return (
    <p className="sr-only" aria-live="polite">
      {said}
    </p>
  )
}
