import type { Quantity, UnitSystem } from '../units/quantities'
import type { CellAddress, CellValue, NamedValue, Operation, Workbook } from '../workbook'

/**
 * One command, three faces: the palette, the context menu and the key map render the same object.
 * A command is an intent: `run` turns it into operations (saved) or into a view change (never saved).
 */
export interface Command {
  readonly id: string
  readonly title: string
  /** Other words that people look it up by. */
  readonly synonyms?: readonly string[]
  readonly group: CommandGroup
  /** Chords such as `Mod+K`, where Mod is Ctrl or Cmd by platform; a test forbids two live commands on one. */
  readonly keys?: readonly string[]
  /** `true`, or the reason why it is not available now. */
  readonly when: (context: CommandContext) => true | string
  readonly arguments?: readonly ArgumentSpec[]
  /** What it would do with these arguments, in a sentence ("Sets Surfaces I2:I3"). */
  readonly says?: (context: CommandContext, args: ArgumentValues) => string
  /** Arguments are complete and checked when it runs. */
  readonly run: (context: CommandContext, args: ArgumentValues) => Effect
}

export type CommandGroup = 'Estimate' | 'Go to' | 'Edit' | 'Sheet' | 'Workbook' | 'View' | 'Account'

export interface Selection {
  readonly sheet: string
  readonly row: number
  readonly column: number
  readonly rowCount: number
  readonly columnCount: number
}

export interface CommandContext {
  readonly workbook: Workbook
  readonly system: UnitSystem
  readonly selection: Selection
  readonly may: { readonly change: boolean; readonly changeLocked: boolean }
  readonly undoLabel: string | undefined
  readonly redoLabel: string | undefined
  readonly value: (address: CellAddress) => CellValue
  readonly named: (name: string) => readonly CellValue[] | undefined
  /** The firm's workbooks that this person may open, most recent first. */
  readonly workbooks: readonly { readonly id: string; readonly title: string; readonly changed: string }[]
}

export interface ArgumentOption {
  readonly value: string
  readonly title: string
  readonly detail?: string
  readonly synonyms?: readonly string[]
}

/** Asked in place, checked as typed. */
export type ArgumentSpec =
  | {
      readonly kind: 'choice'
      readonly id: string
      readonly label: string
      readonly options: (context: CommandContext, args: ArgumentValues) => readonly ArgumentOption[]
    }
  | {
      readonly kind: 'quantity'
      readonly id: string
      readonly label: string
      readonly named: (context: CommandContext, args: ArgumentValues) => NamedValue | undefined
    }
  | {
      readonly kind: 'text'
      readonly id: string
      readonly label: string
      readonly example: string
      /** `undefined` when good, else what was expected. */
      readonly check: (context: CommandContext, text: string, args: ArgumentValues) => string | undefined
    }

/** By argument id: the chosen value or the typed text; a quantity is a number in the workbook's units, or a checked text. */
export type ArgumentValues = Readonly<Record<string, string | number | boolean>>

export type Effect =
  | { readonly kind: 'operations'; readonly label: string; readonly operations: readonly Operation[] }
  | { readonly kind: 'view'; readonly change: ViewChange }
  | { readonly kind: 'refused'; readonly text: string }

/** Never logged. */
export type ViewChange =
  | { readonly kind: 'select'; readonly selection: Selection }
  | { readonly kind: 'undo' | 'redo' | 'edit-cell' | 'edit-note' | 'copy' | 'cut' | 'paste' | 'export-xlsx' }
  | { readonly kind: 'open-palette' | 'switch-theme' | 'toggle-drawing' | 'sign-out' | 'list-workbooks' }
  | { readonly kind: 'open-workbook'; readonly workbook: string }
  | {
      readonly kind: 'new-workbook'
      readonly title: string
      readonly frame: string
      readonly system: UnitSystem
    }

export type { Quantity }
