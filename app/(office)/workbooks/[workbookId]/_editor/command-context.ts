import type { CommandContext, Selection } from '@/lib/commands'
import type { WorkbookSession } from './session-contract'

/** What commands may ask about, as it is at this moment. */
export function commandContext(
  session: WorkbookSession,
  selection: Selection,
  workbooks: CommandContext['workbooks'],
): CommandContext {
  const { undoLabel, redoLabel } = session.snapshot()
  return {
    workbook: session.workbook,
    system: session.workbook.system,
    selection,
    may: session.may,
    undoLabel,
    redoLabel,
    value: (address) => session.value(address),
    named: (name) => session.named(name),
    workbooks,
    newId: () => crypto.randomUUID(),
  }
}
