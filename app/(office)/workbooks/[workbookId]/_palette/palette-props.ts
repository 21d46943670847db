import type { ArgumentValues, Command, CommandContext } from '@/lib/commands'
import type { Quantity } from '@/lib/units'
import type { CellValue, Operation } from '@/lib/workbook'

/** What a named value would become. */
export interface Change {
  readonly name: string
  readonly label: string
  readonly quantity: Quantity
  readonly before: CellValue
  readonly after: CellValue
}

export type TryOut = (operations: readonly Operation[]) => Promise<readonly Change[]>

export interface PaletteProps {
  readonly open: boolean
  readonly onClose: () => void
  /** Without sheets in its workbook, only what needs no workbook is offered. */
  readonly context: CommandContext
  /** Does it; the words of an error keep the palette open with all that was typed. */
  readonly onRun: (command: Command, args: ArgumentValues) => string | undefined
  readonly tryOut?: TryOut
  /** A command to begin with (a chord was pressed whose command asks for arguments). */
  readonly begin?: { readonly command: string; readonly args?: ArgumentValues }
}
