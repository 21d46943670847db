import { cellName, type Sheet, sheetById } from '@/lib/workbook'
import { lockWords } from '../_editor/permission-words'
import type { WorkbookSession } from '../_editor/session-contract'
import { type EditorView, extentOf } from '../_editor/view-state'
import { currencyOf } from '../_tally/figures'
import { listedChoices } from './choices'
import { clearOperation, pasteOperations, writeOperations } from './clipboard'
import { type EntryContext, openingText, readEntry } from './entry'
import { moved, type Rectangle, rectangle } from './selection'

/** Says a refusal where the person looks; nothing is lost by it. */
export type Tell = (text: string) => void

/** Writing into cells, whether begun in the grid, in the entry line, by a paste or by Delete. */
export class Editing {
  constructor(
    private readonly session: WorkbookSession,
    private readonly view: EditorView,
    private readonly tell: Tell,
  ) {}

  get sheet(): Sheet | undefined {
    return sheetById(this.session.workbook, this.view.snapshot().sheet)
  }

  context(sheet: Sheet): EntryContext {
    return {
      sheet,
      system: this.session.workbook.system,
      currency: currencyOf(this.session.named),
      choices: (row, column) => listedChoices(this.session, sheet, row, column),
    }
  }

  /** Opens the active cell: with its own text, or with what was typed over it. False, and why is said, when it is locked. */
  begin(where: 'cell' | 'line', typed?: string): boolean {
    const sheet = this.writable()
    if (!sheet) return false
    const { row, column } = this.view.snapshot().selection.active
    const text = typed ?? openingText(this.context(sheet), row, column)
    const mode = typed === undefined ? 'amend' : 'replace'
    this.view.edit({ sheet: sheet.id, row, column, text, mode, where })
    return true
  }

  retype(text: string): void {
    const { edit } = this.view.snapshot()
    if (!edit) return
    const { error: _error, ...rest } = edit
    this.view.edit({ ...rest, text })
  }

  cancel(): void {
    this.view.edit(undefined)
    this.view.focus?.grid()
  }

  /** Takes the text in and moves on; text that cannot be taken stays in the editor with the reason beside it. */
  commit(text: string, axis: 'row' | 'column' | 'none', by: -1 | 0 | 1, refocus = true): boolean {
    const { edit, selection } = this.view.snapshot()
    const sheet = edit && sheetById(this.session.workbook, edit.sheet)
    if (!edit || !sheet) return true
    const context = this.context(sheet)
    if (text !== openingText(context, edit.row, edit.column)) {
      const problem = this.write(context, text, edit.row, edit.column)
      if (problem) {
        this.view.edit({ ...edit, text, error: problem })
        return false
      }
    }
    this.view.edit(undefined)
    if (axis !== 'none' && by !== 0) {
      const step = { kind: 'step', axis, by } as const
      this.view.select(moved(selection, step, extentOf(sheet), () => false))
    }
    if (refocus) this.view.focus?.grid()
    return true
  }

  private write(context: EntryContext, text: string, row: number, column: number): string | undefined {
    const read = readEntry(context, text, row, column)
    if (!read.ok) return read.failure.text
    const { sheet } = context
    const label = `${sheet.name} ${cellName(row, column)}`
    const done = this.session.dispatch(label, writeOperations(sheet, [read.value]))
    return done.ok ? undefined : done.failure.text
  }

  clear(): void {
    const sheet = this.writable()
    if (!sheet) return
    const operation = clearOperation(sheet, this.area())
    if (operation) this.done(this.session.dispatch(`Clear ${sheet.name} ${this.areaName()}`, [operation]))
  }

  paste(text: string): void {
    const sheet = this.writable()
    if (!sheet) return
    const made = pasteOperations(this.context(sheet), text, this.area())
    if (!made.ok) {
      this.tell(made.failure.text)
      return
    }
    const { operations, area } = made.value
    const label = `Paste into ${sheet.name} ${cellName(area.row, area.column)}`
    if (!this.done(this.session.dispatch(label, operations))) return
    const anchor = { row: area.row, column: area.column }
    const focus = { row: area.row + area.rowCount - 1, column: area.column + area.columnCount - 1 }
    this.view.select({ active: anchor, anchor, focus })
  }

  area(): Rectangle {
    return rectangle(this.view.snapshot().selection)
  }

  private areaName(): string {
    const { row, column, rowCount, columnCount } = this.area()
    const first = cellName(row, column)
    return rowCount * columnCount === 1
      ? first
      : `${first}:${cellName(row + rowCount - 1, column + columnCount - 1)}`
  }

  private writable(): Sheet | undefined {
    const { sheet } = this
    const locked = sheet && lockWords(this.session, sheet)
    if (locked) this.tell(locked)
    return locked ? undefined : sheet
  }

  private done(result: ReturnType<WorkbookSession['dispatch']>): boolean {
    if (!result.ok) this.tell(result.failure.text)
    return result.ok
  }
}
