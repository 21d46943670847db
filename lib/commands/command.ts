import type { Quantity, UnitSystem } from '../units/quantities'
import type { CellAddress, CellValue, NamedValue, Operation, Workbook } from '../workbook'

/**
 * One command, three faces: the palette, the context menu and the key map render the same object.
 * A command is an intent: `run` turns it into operations (saved) or into a view change (never saved).
 */
export interface Command {
  readonly id: string
  readonly title: string
  /** The line with its arguments in place: words, and the ids of arguments. Without one, arguments follow the title. */
  readonly phrase?: readonly PhrasePart[]
  /** Other words that people look it up by. */
  readonly synonyms?: readonly string[]
  readonly group: CommandGroup
  /** Chords such as `Mod+K`, where Mod is Ctrl or Cmd by platform; a test forbids two live commands on one. */
  readonly keys?: readonly string[]
  /** Where the chords work; `grid` (while the grid has the keyboard) unless it says otherwise. */
  readonly keysWork?: 'grid' | 'everywhere'
  /** Makes sense without an open workbook (the workbooks list offers these alone). */
  readonly anywhere?: boolean
  /** `true`, or the reason why it is not available now. */
  readonly when: (context: CommandContext) => true | string
  readonly arguments?: readonly ArgumentSpec[]
  /** What it would do with these arguments, in a sentence ("Sets Surfaces I2:I3"). */
  readonly says?: (context: CommandContext, args: ArgumentValues) => string
  /** Arguments are complete when it runs; what no longer fits is refused in words, never thrown. */
  readonly run: (context: CommandContext, args: ArgumentValues) => Effect
}

export type PhrasePart = string | { readonly argument: string }

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
  /** Makes a part of an id that nobody else makes at the same time; without it ids come from names alone. */
  readonly newId?: () => string
}

export interface ArgumentOption {
  readonly value: string
  readonly title: string
  readonly detail?: string
  readonly synonyms?: readonly string[]
  /** A figure of the option itself, in the workbook's units ("R" of a covering). */
  readonly figure?: { readonly label: string; readonly value: number; readonly quantity: Quantity }
}

/** Asked in place, checked as typed. */
export type ArgumentSpec =
  | {
      readonly kind: 'choice'
      readonly id: string
      readonly label: string
      readonly options: (context: CommandContext, args: ArgumentValues) => readonly ArgumentOption[]
      /** Named results whose change is worth showing beside each option. */
      readonly compare?: readonly string[]
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
      /** What stands there before anything is typed. */
      readonly initial?: (context: CommandContext) => string
      /** `undefined` when good, else what was expected. */
      readonly check: (context: CommandContext, text: string, args: ArgumentValues) => string | undefined
    }

/** By argument id: the chosen value or the typed text; a quantity is a number in the workbook's units, or a checked text. */
export type ArgumentValues = Readonly<Record<string, string | number | boolean>>

export type Effect =
  | { readonly kind: 'operations'; readonly label: string; readonly operations: readonly Operation[] }
  | { readonly kind: 'view'; readonly change: ViewChange }
  | SolveEffect
  | TryEveryEffect
  | { readonly kind: 'refused'; readonly text: string }

/** To be searched for with the engine; `solveFor` does it, over try-outs that set the input. Numbers are in the workbook's units. */
export interface SolveEffect {
  readonly kind: 'solve'
  readonly label: string
  /** The named result, and what it is to be. */
  readonly result: string
  readonly target: number
  readonly tolerance: number
  /** The named input that is changed, its value now and how far it may go. */
  readonly input: string
  readonly from: number
  readonly low?: number
  readonly high?: number
}

/** To be tried out one by one and shown side by side; choosing a trial is doing its operations under its label. */
export interface TryEveryEffect {
  readonly kind: 'try-every'
  readonly label: string
  /** What is covered, in words: "the whole house". */
  readonly part: string
  readonly trials: readonly Trial[]
  /** Code of the trial that is there now, where it is one. */
  readonly now: string | undefined
  /** Named results worth comparing, of those that the workbook has: price, yearly heat, winter light. */
  readonly names: readonly string[]
}

export interface Trial {
  readonly code: string
  readonly title: string
  readonly label: string
  readonly operations: readonly Operation[]
}

/** Never logged. */
export type ViewChange =
  | { readonly kind: 'select'; readonly selection: Selection }
  | { readonly kind: 'undo' | 'redo' | 'edit-cell' | 'edit-note' | 'copy' | 'cut' | 'paste' | 'export-xlsx' }
  /** Every check that does not hold, missing input, cell in error and override, to go to. */
  | { readonly kind: 'list-checks' }
  /** The palette, empty or with a command begun. */
  | { readonly kind: 'open-palette'; readonly command?: string }
  | { readonly kind: 'switch-theme' | 'toggle-drawing' | 'sign-out' | 'list-workbooks' }
  | { readonly kind: 'open-workbook'; readonly workbook: string }
  | {
      readonly kind: 'new-workbook'
      readonly title: string
      readonly frame: string
      readonly system: UnitSystem
    }

export type { Quantity }
