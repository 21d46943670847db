import type { Operation, Sheet, SheetGround, Workbook } from '@/lib/workbook'
import { type CellSelection, clamp, type Extent, type Point, single } from '../_grid/selection'
import type { EditorFocus } from './focus'
import { cellAfter, movesCells } from './follow-cells'

/** A cell being edited; the cell and the entry line show the same text. */
export interface EditState {
  readonly sheet: string
  readonly row: number
  readonly column: number
  readonly text: string
  /** `replace` after typing over the cell, `amend` after F2: they differ in what the arrow keys do. */
  readonly mode: 'replace' | 'amend'
  readonly where: 'cell' | 'line'
  /** Why the text was not taken, in words. */
  readonly error?: string
}

export interface ViewSnapshot {
  readonly sheet: string
  readonly selection: CellSelection
  readonly edit: EditState | undefined
}

/** What this tab looks at: sheet, selection, the edit under way. Never saved, never sent. */
export class EditorView {
  private current: ViewSnapshot
  private readonly bySheet = new Map<string, CellSelection>()
  private readonly listeners = new Set<() => void>()
  /** Set by the pieces on the screen, so that commands can move the focus. */
  focus: EditorFocus | undefined

  constructor(workbook: Workbook) {
    const sheet = workbook.sheets[0]
    this.current = {
      sheet: sheet?.id ?? '',
      selection: sheet ? firstSelection(sheet) : single(1, 0),
      edit: undefined,
    }
  }

  snapshot = (): ViewSnapshot => this.current

  subscribe = (listener: () => void): (() => void) => {
    this.listeners.add(listener)
    return () => this.listeners.delete(listener)
  }

  show(sheet: Sheet, selection?: CellSelection): void {
    const next = selection ?? this.bySheet.get(sheet.id) ?? firstSelection(sheet)
    this.bySheet.set(this.current.sheet, this.current.selection)
    this.set({ sheet: sheet.id, selection: within(next, extentOf(sheet)) })
  }

  select(selection: CellSelection): void {
    if (selection !== this.current.selection) this.set({ selection })
  }

  edit(edit: EditState | undefined): void {
    this.set({ edit })
  }

  /** Somebody else moved lines: the selection and the edit under way go with their cells. Gives back text whose cell is gone. */
  follow(operations: readonly Operation[], sheets: readonly SheetGround[]): string | undefined {
    if (!operations.some(movesCells)) return undefined
    const { sheet, selection, edit } = this.current
    const point = ({ row, column }: Point): Point =>
      cellAfter(sheets, { sheet, row, column }, operations) ?? { row, column }
    const { active, anchor, focus } = selection
    const moved = edit && cellAfter(sheets, edit, operations)
    this.set({
      selection: { active: point(active), anchor: point(anchor), focus: point(focus) },
      edit: edit && moved && { ...edit, row: moved.row, column: moved.column },
    })
    return edit && !moved ? edit.text : undefined
  }

  /** After the workbook changed shape: a sheet may be gone, a selection may lie outside. */
  settle(workbook: Workbook): void {
    const sheet = workbook.sheets.find((candidate) => candidate.id === this.current.sheet)
    const shown = sheet ?? workbook.sheets[0]
    if (!shown) return
    if (!sheet) this.show(shown)
    else {
      const selection = within(this.current.selection, extentOf(sheet))
      if (!same(selection, this.current.selection)) this.set({ selection })
    }
  }

  private set(part: Partial<ViewSnapshot>): void {
    this.current = { ...this.current, ...part }
    for (const listener of this.listeners) listener()
  }
}

/** Blank rows shown below a sheet that may be changed: writing there makes the sheet longer. */
export const spareRows = 12

export function extentOf(sheet: Sheet, page = 12): Extent {
  const rows = sheet.rowCount + (sheet.lock === undefined ? spareRows : 0)
  return { firstRow: 1, lastRow: Math.max(1, rows - 1), lastColumn: sheet.columns.length - 1, page }
}

/** The first input among the first columns, where the work on the sheet begins; else the first cell below the header. */
function firstSelection(sheet: Sheet): CellSelection {
  for (let row = 1; row < Math.min(sheet.rowCount, 200); row += 1) {
    const column = sheet.rows[row]?.findIndex((cell) => cell?.ground === 'input') ?? -1
    if (column >= 0 && column <= 2) return single(row, column)
  }
  return single(1, 0)
}

function within(selection: CellSelection, extent: Extent): CellSelection {
  return {
    active: clamp(selection.active, extent),
    anchor: clamp(selection.anchor, extent),
    focus: clamp(selection.focus, extent),
  }
}

function same(a: CellSelection, b: CellSelection): boolean {
  return (['active', 'anchor', 'focus'] as const).every(
    (key) => a[key].row === b[key].row && a[key].column === b[key].column,
  )
}
