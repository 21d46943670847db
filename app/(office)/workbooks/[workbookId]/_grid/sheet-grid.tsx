'use client'

import '@glideapps/glide-data-grid/dist/index.css'
import {
  DataEditor,
  type DataEditorProps,
  type DataEditorRef,
  type GridSelection,
  type Item,
  type Rectangle,
} from '@glideapps/glide-data-grid'
import { type KeyboardEvent, useCallback, useEffect, useMemo, useRef, useState } from 'react'
import { type Command, type Platform, resolveKey } from '@/lib/commands'
import type { Sheet } from '@/lib/workbook'
import { lockWords } from '../_editor/permission-words'
import type { WorkbookSession } from '../_editor/session-contract'
import { useShape, useView } from '../_editor/use-session'
import { type EditorView, extentOf } from '../_editor/view-state'
import { currencyOf } from '../_tally/figures'
import { type CellSource, CellThemes, gridCell, groundOf } from './cell-content'
import { pressOf } from './cell-editor'
import { copiedText } from './clipboard'
import { columnHeads, gridColumns } from './columns'
import { cellDrawer, headerDrawer, headerHeight, rowHeight } from './draw'
import type { Editing } from './editing'
import { fromGrid, toGrid } from './grid-selection'
import { gridAction } from './keys'
import { noKeys } from './no-keys'
import { OpenCell } from './open-cell'
import { type Colours, gridTheme, mono } from './palette-colours'
import { SelectedCellWords } from './selected-cell-words'
import { moved } from './selection'
import { useChangedCells } from './use-changed-cells'
import { useColumnWidths, useFittingWidths } from './use-column-widths'
import { useWideScreen } from './use-wide-screen'

export interface SheetGridProps {
  readonly session: WorkbookSession
  readonly view: EditorView
  readonly editing: Editing
  readonly sheet: Sheet
  readonly colours: Colours
  readonly platform: Platform
  readonly onCommand: (command: Command) => void
}

/** One sheet on a canvas. The grid component draws and scrolls; selection, keys, editing and the clipboard are ours. */
export default function SheetGrid(props: SheetGridProps) {
  const { session, view, editing, sheet, colours, platform, onCommand } = props
  const shape = useShape(session)
  const { selection } = useView(view)
  const grid = useRef<DataEditorRef>(null)
  const visible = useRef<Rectangle>({ x: 0, y: 0, width: 30, height: 60 })
  /** Once the sheet is drawn it takes the keyboard, unless something else has it. */
  const drawn = useRef(false)
  const [scrolled, setScrolled] = useState(0)
  const settled = useChangedCells(session, sheet.id, grid, visible)
  const { widths, onColumnResize, onColumnResizeEnd } = useColumnWidths(session, sheet)
  const readonly = lockWords(session, sheet) !== undefined
  const wide = useWideScreen()
  const extent = extentOf(sheet, Math.max(1, visible.current.height - 2))

  const themes = useMemo(() => new CellThemes(colours), [colours])
  const theme = useMemo(() => gridTheme(colours), [colours])

  // biome-ignore lint/correctness/useExhaustiveDependencies: shape and settled values are what it is made anew for
  const source = useMemo<CellSource>(
    () => ({
      sheet,
      system: session.workbook.system,
      currency: currencyOf(session.named),
      value: (row, column) => session.value({ sheet: sheet.id, row, column }),
    }),
    [session, sheet, shape, settled],
  )
  const heads = useMemo(() => columnHeads(source), [source])
  const fitting = useFittingWidths(source, heads)
  const columns = useMemo(() => gridColumns(sheet, heads, fitting, widths), [sheet, heads, fitting, widths])
  const getCellContent = useCallback(
    ([column, row]: Item) => gridCell(source, row + 1, column, themes, readonly),
    [source, themes, readonly],
  )
  const rowMarkers = useMemo(() => rowNumbers(colours), [colours])
  const drawHeader = useMemo(() => headerDrawer(heads, colours), [heads, colours])
  const drawCell = useMemo(
    () =>
      cellDrawer(
        (column, row) => {
          const cell = sheet.rows[row + 1]?.[column]
          return cell && { ground: groundOf(cell), note: cell.note !== undefined }
        },
        (column, row) => {
          const { active } = view.snapshot().selection
          return active.column === column && active.row === row + 1
        },
        colours,
      ),
    [sheet, view, colours],
  )
  const gridSelection = useMemo(() => toGrid(selection), [selection])

  useEffect(() => {
    view.focus = {
      ...(view.focus ?? { entryLine: () => undefined }),
      grid: () => grid.current?.focus(),
      reveal: (row, column) => grid.current?.scrollTo(column, row - 1),
    }
  }, [view])

  const onGridSelectionChange = (next: GridSelection) => {
    const chosen = fromGrid(next, extent)
    if (chosen) view.select(chosen)
  }

  const onKeyDownCapture = (event: KeyboardEvent) => {
    const press = pressOf(event)
    const command = resolveKey({ ...press, code: event.code }, platform, 'grid')
    // The browser gives the clipboard only to its own copy, cut and paste.
    if (command && ['copy', 'cut', 'paste'].includes(command.id)) return
    if (command) {
      stop(event)
      onCommand(command)
      return
    }
    const action = gridAction(press, platform)
    if (!action) return
    if (action.kind === 'type') {
      const composed = [...press.key].length !== 1
      event.stopPropagation()
      if (!composed) event.preventDefault()
      editing.begin('cell', composed ? '' : press.key)
      return
    }
    stop(event)
    const filled = (at: { row: number; column: number }) =>
      sheet.rows[at.row]?.[at.column]?.input !== undefined
    const next = moved(view.snapshot().selection, action, extent, filled)
    view.select(next)
    if (next.focus !== next.anchor) grid.current?.scrollTo(next.focus.column, next.focus.row - 1)
  }

  const area = () => editing.area()
  return (
    <>
      <div
        className="h-full w-full"
        onKeyDownCapture={onKeyDownCapture}
        onCopy={(event) => {
          event.preventDefault()
          event.clipboardData.setData('text/plain', copiedText(source, area()))
        }}
        onCut={(event) => {
          event.preventDefault()
          event.clipboardData.setData('text/plain', copiedText(source, area()))
          editing.clear()
        }}
        onPaste={(event) => {
          event.preventDefault()
          editing.paste(event.clipboardData.getData('text/plain'))
        }}
      >
        <DataEditor
          ref={grid}
          width="100%"
          height="100%"
          columns={columns}
          rows={extent.lastRow}
          getCellContent={getCellContent}
          gridSelection={gridSelection}
          onGridSelectionChange={onGridSelectionChange}
          onCellActivated={() => editing.begin('cell')}
          cellActivationBehavior="double-click"
          onVisibleRegionChanged={(range) => {
            visible.current = range
            if (!drawn.current) {
              requestAnimationFrame(() => {
                const { active } = view.snapshot().selection
                grid.current?.scrollTo(active.column, active.row - 1)
                takeKeyboard(grid.current)
              })
            }
            drawn.current = true
            if (view.snapshot().edit) setScrolled((count) => count + 1)
          }}
          onColumnResize={onColumnResize}
          onColumnResizeEnd={onColumnResizeEnd}
          freezeColumns={wide && sheet.columns.length > 1 ? 1 : 0}
          rowMarkers={rowMarkers}
          rowHeight={rowHeight}
          headerHeight={headerHeight}
          theme={theme}
          drawHeader={drawHeader}
          drawCell={drawCell}
          rangeSelect="rect"
          columnSelect="single"
          rowSelect="single"
          smoothScrollX
          smoothScrollY
          overscrollX={24}
          fixedShadowX={false}
          fixedShadowY={false}
          editOnType={false}
          keybindings={noKeys}
          onPaste={false}
        />
      </div>
      <OpenCell
        session={session}
        view={view}
        editing={editing}
        sheet={sheet}
        grid={grid}
        scrolled={scrolled}
        heads={heads}
      />
      <SelectedCellWords session={session} view={view} sheet={sheet} source={source} heads={heads} />
    </>
  )
}

function takeKeyboard(grid: DataEditorRef | null): void {
  if (document.activeElement === document.body) grid?.focus()
}

function rowNumbers({ paper, quiet }: Colours): NonNullable<DataEditorProps['rowMarkers']> {
  const theme = { fontFamily: mono, bgCell: paper, textMedium: quiet, textLight: quiet }
  // The first row of the sheet is its heading.
  return { kind: 'clickable-number', startIndex: 2, width: 38, theme }
}

function stop(event: KeyboardEvent): void {
  event.preventDefault()
  event.stopPropagation()
}
