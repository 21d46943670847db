import { toast } from 'sonner'
import { ask } from '@/app/_ui/request'
import { signOut } from '@/app/_ui/sign-out'
import { switchTheme } from '@/app/_ui/theme'
import type { Effect, Selection, ViewChange } from '@/lib/commands'
import { assertNever, fail, type Result, succeed } from '@/lib/failures'
import { sheetById } from '@/lib/workbook'
import type { Editing } from '../_grid/editing'
import { fromCommand } from '../_grid/selection'
import { copySelection, pasteClipboard } from './clipboard-commands'
import type { PanelShown } from './panels'
import type { Session } from './session'
import { type EditorView, extentOf } from './view-state'

/** What an effect may reach: the open workbook, what is looked at, and the way to other pages. */
export interface EffectReach {
  readonly session: Session
  readonly view: EditorView
  readonly editing: Editing
  readonly openPalette: (command?: string) => void
  readonly openPanel: (panel: PanelShown) => void
  readonly editNote: () => void
  readonly goTo: (address: string) => void
}

/** Does what a command came to. Operations are done whole or refused whole; the caller says why. */
export function runEffect(reach: EffectReach, effect: Effect): Result<void> {
  switch (effect.kind) {
    case 'operations':
      return reach.session.dispatch(effect.label, effect.operations)
    case 'refused':
      return fail('invalid', effect.text)
    case 'solve':
    case 'try-every':
      reach.openPanel(effect)
      return succeed(undefined)
    case 'view':
      changeView(reach, effect.change)
      return succeed(undefined)
    default:
      return assertNever(effect)
  }
}

function changeView(reach: EffectReach, change: ViewChange): void {
  const { session, editing } = reach
  switch (change.kind) {
    case 'select':
      select(reach, change.selection)
      return
    case 'undo':
    case 'redo': {
      const done = change.kind === 'undo' ? session.undo() : session.redo()
      if (!done.ok) say(done.failure.text)
      return
    }
    case 'edit-cell':
      editing.begin('cell')
      return
    case 'edit-note':
      reach.editNote()
      return
    case 'copy':
    case 'cut':
      void copySelection(session, editing, change.kind === 'cut').then((done) => !done && say(clipboardWords))
      return
    case 'paste':
      void pasteClipboard(editing).then((done) => !done && say(clipboardWords))
      return
    case 'export-xlsx':
      void exportXlsx(session)
      return
    case 'list-checks':
      reach.openPanel({ kind: 'look-at' })
      return
    case 'open-palette':
      reach.openPalette(change.command)
      return
    case 'switch-theme':
      switchTheme()
      return
    case 'toggle-drawing':
      return
    case 'sign-out':
      void leave(session)
      return
    case 'list-workbooks':
      reach.goTo('/workbooks')
      return
    case 'open-workbook':
      reach.goTo(`/workbooks/${change.workbook}`)
      return
    case 'new-workbook':
      void newWorkbook(reach, change)
      return
    default:
      assertNever(change)
  }
}

export function select({ session, view }: Pick<EffectReach, 'session' | 'view'>, selection: Selection): void {
  const sheet = sheetById(session.workbook, selection.sheet)
  if (!sheet) return
  view.show(sheet, fromCommand(selection, extentOf(sheet)))
  // The grid of another sheet is laid out first.
  requestAnimationFrame(() => {
    view.focus?.reveal(Math.max(1, selection.row), selection.column)
    view.focus?.grid()
  })
}

async function newWorkbook(
  reach: EffectReach,
  { title, frame, system }: Extract<ViewChange, { kind: 'new-workbook' }>,
): Promise<void> {
  const made = await ask<{ readonly id: string }>('POST', '/api/workbooks', { title, frame, system })
  if (made.ok) reach.goTo(`/workbooks/${made.value.id}`)
  else say(made.failure.text)
}

/** The file is made from what the server has, so it waits until everything is there. */
async function exportXlsx(session: Session): Promise<void> {
  if (!(await session.saved())) {
    say('Some changes are not saved yet. Export again once they are.')
    return
  }
  const link = document.createElement('a')
  link.href = `/api/workbooks/${encodeURIComponent(session.id)}/xlsx`
  link.download = ''
  link.click()
}

async function leave(session: Session): Promise<void> {
  if (!(await session.saved())) {
    say('Some changes are not saved yet. They stay on this device; sign out again once they are saved.')
    return
  }
  const done = await signOut()
  if (!done.ok) say(done.failure.text)
}

const clipboardWords = 'The browser did not allow it from here. Use the keys for it in the grid.'

export function say(text: string): void {
  toast(text)
}
