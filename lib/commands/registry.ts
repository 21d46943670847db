import type { Command, CommandContext } from './command'
import { convertCommands } from './convert-commands'
import { editCommands } from './edit-commands'
import { estimateCommands } from './estimate-commands'
import { goToCommands } from './go-to-commands'
import { sheetCommands } from './sheet-commands'
import { solveCommand } from './solve-command'
import { tryEvery } from './try-every-command'
import { accountCommands, viewCommands } from './view-commands'
import { workbookCommands } from './workbook-commands'

/** Every command there is. Palette, context menu and key map render these objects and no others. */
export const commands: readonly Command[] = [
  ...estimateCommands,
  solveCommand,
  tryEvery,
  ...goToCommands,
  ...editCommands,
  ...sheetCommands,
  ...workbookCommands,
  ...convertCommands,
  ...viewCommands,
  ...accountCommands,
]

const byId = new Map(commands.map((command) => [command.id, command]))

export function commandById(id: string): Command | undefined {
  return byId.get(id)
}

/** The commands that make sense here: without an open workbook, only those that need none. */
export function commandsFor(context: CommandContext): readonly Command[] {
  return context.workbook.sheets.length > 0 ? commands : commands.filter(({ anywhere }) => anywhere)
}
