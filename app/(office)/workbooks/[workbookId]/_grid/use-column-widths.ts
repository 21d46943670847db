import type { GridColumn } from '@glideapps/glide-data-grid'
import { useEffect, useMemo, useRef, useState } from 'react'
import type { Sheet } from '@/lib/workbook'
import { lockWords } from '../_editor/permission-words'
import type { WorkbookSession } from '../_editor/session-contract'
import { useShape } from '../_editor/use-session'
import type { CellSource } from './cell-content'
import { fittingWidths } from './columns'
import type { ColumnHead } from './draw'

/** Widths while the border of a column is dragged; letting go saves them, where this person may. */
export function useColumnWidths(session: WorkbookSession, sheet: Sheet) {
  const shape = useShape(session)
  const [widths, setWidths] = useState<ReadonlyMap<number, number>>(new Map())

  // biome-ignore lint/correctness/useExhaustiveDependencies: once the workbook holds them, the dragged ones are done with
  useEffect(() => setWidths(new Map()), [sheet, shape])

  const drag = (width: number, column: number) =>
    setWidths((before) => new Map(before).set(column, Math.round(width)))
  return {
    widths,
    onColumnResize: (_: GridColumn, width: number, column: number) => drag(width, column),
    onColumnResizeEnd: (_: GridColumn, width: number, column: number) => {
      if (lockWords(session, sheet)) return
      session.dispatch(`Column width on ${sheet.name}`, [
        { kind: 'set-columns', sheet: sheet.id, columns: [{ column, width: Math.round(width) }] },
      ])
    },
  }
}

/** Widths that fit; kept from one reading of the values to the next, and begun anew when the columns change. */
export function useFittingWidths(source: CellSource, heads: readonly ColumnHead[]): readonly number[] {
  const before = useRef<readonly number[]>([])
  return useMemo(() => {
    const kept = before.current.length === heads.length ? before.current : []
    before.current = fittingWidths(source, heads, kept)
    return before.current
  }, [source, heads])
}
