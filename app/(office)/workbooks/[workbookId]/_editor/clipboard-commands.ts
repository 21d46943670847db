import { copiedText } from '../_grid/clipboard'
import type { Editing } from '../_grid/editing'
import type { Session } from './session'

/** Copies for the palette, where no copy event of the browser is at hand; false when the browser refuses. */
export async function copySelection(session: Session, editing: Editing, cut: boolean): Promise<boolean> {
  const { sheet } = editing
  if (!sheet) return false
  const source = {
    ...editing.context(sheet),
    value: (row: number, column: number) => session.value({ sheet: sheet.id, row, column }),
  }
  try {
    await navigator.clipboard.writeText(copiedText(source, editing.area()))
  } catch {
    return false
  }
  if (cut) editing.clear()
  return true
}

export async function pasteClipboard(editing: Editing): Promise<boolean> {
  try {
    editing.paste(await navigator.clipboard.readText())
    return true
  } catch {
    return false
  }
}
