import type { NamedValue } from '../workbook'
import type { ArgumentValues, Command, CommandContext } from './command'
import { labelInSentence, labelOf, namedInputs } from './inputs'
import { showNamed } from './measures'
import type { Rankable } from './rank'
import { describeArea } from './references'
import { commandById, commandsFor } from './registry'
import { tableCalled, tableRows, wholeSheet } from './tables'

export type EntryKind = 'command' | 'sheet' | 'input' | 'name' | 'row' | 'workbook' | 'cell' | 'typed'

/** A line of the palette: a command, perhaps with arguments filled in already. */
export interface Entry extends Rankable {
  readonly kind: EntryKind
  readonly title: string
  readonly detail?: string
  readonly command: Command
  readonly args: ArgumentValues
  /** `true`, or why it may not run now. */
  readonly available: true | string
  /** What the arguments that were typed mean, or what is wrong with them. */
  readonly hint?: string
  readonly problem?: string
}

/** All that can be found, made once for a context (the values beside names are those of the moment). */
export function entriesFor(context: CommandContext): readonly Entry[] {
  return [
    ...commandEntries(context),
    ...inputEntries(context),
    ...sheetEntries(context),
    ...nameEntries(context),
    ...rowEntries(context),
    ...workbookEntries(context),
  ]
}

/** `undefined` when the registry has no such command, or when it makes no sense without a workbook. */
function found(context: CommandContext, id: string) {
  const command = commandById(id)
  if (!command || !commandsFor(context).includes(command)) return undefined
  return { command, available: command.when(context) }
}

function commandEntries(context: CommandContext): readonly Entry[] {
  return commandsFor(context)
    .filter(({ id }) => id !== 'open-palette')
    .map((command) => {
      const available = command.when(context)
      return {
        id: `command:${command.id}`,
        kind: 'command' as const,
        title: command.title,
        also: command.synonyms ?? [],
        command,
        args: {},
        available,
        weight: available === true ? 5 : -6,
      }
    })
}

function inputEntries(context: CommandContext): readonly Entry[] {
  const set = found(context, 'set-input')
  if (!set) return []
  return namedInputs(context).map((named) => ({
    id: `set:${named.name}`,
    kind: 'input' as const,
    title: `Set ${labelInSentence(named)}`,
    detail: `now ${showNamed(context, named)}`,
    also: [labelOf(named), named.name],
    command: set.command,
    args: { input: named.name },
    available: set.available,
    weight: set.available === true ? 4 : -8,
  }))
}

function sheetEntries(context: CommandContext): readonly Entry[] {
  const go = found(context, 'go-to-sheet')
  if (!go) return []
  return context.workbook.sheets.map((sheet) => ({
    id: `sheet:${sheet.id}`,
    kind: 'sheet' as const,
    title: sheet.name,
    ...(sheet.about ? { detail: sheet.about } : {}),
    also: [`go to ${sheet.name}`, `${sheet.name} sheet`],
    command: go.command,
    args: { sheet: sheet.id },
    available: go.available,
    weight: 6,
  }))
}

function nameEntries(context: CommandContext): readonly Entry[] {
  const go = found(context, 'go-to-name')
  if (!go) return []
  return [...context.workbook.names.values()]
    .filter(({ role }) => role !== 'table')
    .map((named: NamedValue) => ({
      id: `name:${named.name}`,
      kind: 'name' as const,
      title: labelOf(named),
      detail: `${describeArea(context.workbook, named.area)} · ${showNamed(context, named)}`,
      also: [named.name, `go to ${labelOf(named)}`],
      command: go.command,
      args: { name: named.name },
      available: go.available,
      weight: named.role === 'input' ? -4 : 0,
    }))
}

/** Rows of the tables, and the surfaces of the house. */
function rowEntries(context: CommandContext): readonly Entry[] {
  const go = found(context, 'go-to-cell')
  if (!go) return []
  const { workbook } = context
  return workbook.sheets
    .filter(({ kind, name }) => kind === 'table' || /^surfaces$/i.test(name))
    .flatMap((sheet) => {
      const called = tableCalled(workbook, sheet.id) ?? tableCalled(workbook, sheet.name)
      const table = called?.sheet === sheet ? called : wholeSheet(sheet)
      return tableRows(context, table).map((row) => ({
        id: `row:${sheet.id}:${row.code}:${row.row}`,
        kind: 'row' as const,
        title: row.name,
        detail: [sheet.name, row.detail].filter(Boolean).join(' · '),
        also: [row.code, `${row.name} ${sheet.name}`, `${row.code} ${row.name}`],
        command: go.command,
        args: { cell: `'${sheet.name}'!A${row.row + 1}` },
        available: go.available,
        weight: -2,
      }))
    })
}

function workbookEntries(context: CommandContext): readonly Entry[] {
  const open = found(context, 'open-workbook')
  if (!open) return []
  return context.workbooks.map(({ id, title, changed }) => ({
    id: `workbook:${id}`,
    kind: 'workbook' as const,
    title,
    detail: changed,
    also: [`open ${title}`],
    command: open.command,
    args: { workbook: id },
    available: open.available,
    weight: 1,
  }))
}
