'use client'

import type { DataEditorRef } from '@glideapps/glide-data-grid'
import { type RefObject, useLayoutEffect, useState } from 'react'
import { isNumeric } from '@/lib/units'
import { cellName, type Sheet } from '@/lib/workbook'
import type { WorkbookSession } from '../_editor/session-contract'
import { useView } from '../_editor/use-session'
import type { EditorView } from '../_editor/view-state'
import { formatOf } from './cell-content'
import { CellEditor, type CellEditorProps } from './cell-editor'
import { cellChoices } from './choices'
import type { ColumnHead } from './draw'
import type { Editing } from './editing'

interface Props {
  readonly session: WorkbookSession
  readonly view: EditorView
  readonly editing: Editing
  readonly sheet: Sheet
  readonly grid: RefObject<DataEditorRef | null>
  /** Counts up as the grid scrolls. */
  readonly scrolled: number
  readonly heads: readonly ColumnHead[]
}

/** The editor over the cell that is being written, wherever scrolling has taken that cell. */
export function OpenCell({ session, view, editing, sheet, grid, scrolled, heads }: Props) {
  const { edit } = useView(view)
  const [bounds, setBounds] = useState<CellEditorProps['bounds'] | undefined>(undefined)
  const open = edit?.where === 'cell' && edit.sheet === sheet.id ? edit : undefined

  // biome-ignore lint/correctness/useExhaustiveDependencies: scrolling moves the cell
  useLayoutEffect(() => {
    setBounds(open && grid.current?.getBounds(open.column, open.row - 1))
  }, [open?.row, open?.column, open?.sheet, scrolled])

  if (!open || !bounds) return null
  const head = heads[open.column]
  return (
    <CellEditor
      edit={open}
      bounds={bounds}
      label={`${cellName(open.row, open.column)} ${head?.title ?? ''}`.trim()}
      right={writtenRight(sheet, open.row, open.column)}
      choices={cellChoices(session, sheet, open.row, open.column)}
      isOpen={() => view.snapshot().edit?.where === 'cell'}
      onText={(text) => editing.retype(text)}
      onCommit={(text, { axis, by }) => editing.commit(text, axis, by)}
      onCancel={() => editing.cancel()}
    />
  )
}

/** A cell of a quantity is written as it will stand: numbers at the right. */
function writtenRight(sheet: Sheet, row: number, column: number): boolean {
  const { quantity, choices } = formatOf(sheet, sheet.rows[row]?.[column], column)
  return quantity !== undefined && choices === undefined && isNumeric(quantity)
}
