import type { DataEditorRef, Rectangle } from '@glideapps/glide-data-grid'
import { type RefObject, useEffect, useState } from 'react'
import type { WorkbookSession } from '../_editor/session-contract'

const settleAfter = 250

/**
 * Draws the visible cells whose values changed, and no others. Gives back a number that counts up once the values
 * have come to rest, for what may follow later: column titles and what a screen reader finds in the grid.
 */
export function useChangedCells(
  session: WorkbookSession,
  sheet: string,
  grid: RefObject<DataEditorRef | null>,
  visible: RefObject<Rectangle>,
): number {
  const [settled, setSettled] = useState(0)
  useEffect(() => {
    let timer: ReturnType<typeof setTimeout> | undefined
    const stop = session.onValues((changes) => {
      if (!changes.sheets.includes(sheet)) return
      const { x, y, width, height } = visible.current
      const damage: { cell: [number, number] }[] = []
      changes.visit(sheet, (row, column) => {
        const inside =
          row > y && row <= y + height + 1 && (column === 0 || (column >= x && column <= x + width))
        if (inside) damage.push({ cell: [column, row - 1] })
      })
      if (damage.length > 0) grid.current?.updateCells(damage)
      clearTimeout(timer)
      timer = setTimeout(() => setSettled((count) => count + 1), settleAfter)
    })
    return () => {
      stop()
      clearTimeout(timer)
    }
  }, [session, sheet, grid, visible])
  return settled
}
