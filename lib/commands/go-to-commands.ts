import { sheetById, type Workbook } from '../workbook'
import { type Availability, all, hasNames, hasWorkbook } from './availability'
import type { Command, CommandContext, Effect, Selection } from './command'
import { labelOf } from './inputs'
import { showNamed } from './measures'
import { describeArea, readReference } from './references'

function select(selection: Selection): Effect {
  return { kind: 'view', change: { kind: 'select', selection } }
}

function firstCell(workbook: Workbook, sheet: string): Selection {
  const rows = sheetById(workbook, sheet)?.rowCount ?? 1
  return { sheet, row: rows > 1 ? 1 : 0, column: 0, rowCount: 1, columnCount: 1 }
}

const goToSheet: Command = {
  id: 'go-to-sheet',
  title: 'Go to a sheet …',
  phrase: ['Go to', { argument: 'sheet' }],
  synonyms: ['open sheet', 'step', 'table', 'show sheet', 'jump'],
  group: 'Go to',
  when: hasWorkbook,
  arguments: [
    {
      kind: 'choice',
      id: 'sheet',
      label: 'a sheet',
      options: ({ workbook }) =>
        workbook.sheets.map((sheet) => ({
          value: sheet.id,
          title: sheet.name,
          detail: sheet.about ?? (sheet.kind === 'table' ? 'table' : ''),
        })),
    },
  ],
  run: ({ workbook }, args) => {
    const sheet = sheetById(workbook, String(args.sheet))
    return sheet
      ? select(firstCell(workbook, sheet.id))
      : { kind: 'refused', text: 'That sheet is no longer there' }
  },
}

const goToName: Command = {
  id: 'go-to-name',
  title: 'Go to a named value …',
  phrase: ['Go to', { argument: 'name' }],
  synonyms: ['find name', 'where is', 'jump', 'result'],
  group: 'Go to',
  when: all(hasWorkbook, hasNames),
  arguments: [
    {
      kind: 'choice',
      id: 'name',
      label: 'a named value',
      options: (context) =>
        [...context.workbook.names.values()].map((named) => ({
          value: named.name,
          title: labelOf(named),
          detail: showNamed(context, named),
          synonyms: [named.name],
        })),
    },
  ],
  says: ({ workbook }, args) => {
    const named = workbook.names.get(String(args.name))
    return named ? `Selects ${describeArea(workbook, named.area)}.` : 'Selects its cells.'
  },
  run: ({ workbook }, args) => {
    const named = workbook.names.get(String(args.name))
    return named ? select(named.area) : { kind: 'refused', text: 'That name is no longer there' }
  },
}

const goToCell: Command = {
  id: 'go-to-cell',
  title: 'Go to a cell …',
  phrase: ['Go to', { argument: 'cell' }],
  synonyms: ['address', 'reference', 'row', 'jump', 'select range'],
  group: 'Go to',
  keys: ['Mod+G'],
  when: hasWorkbook,
  arguments: [
    {
      kind: 'text',
      id: 'cell',
      label: 'a cell',
      example: 'B7, Heat!B7 or B7:D9',
      check: (context, text) => {
        const read = readReference(context.workbook, text, context.selection.sheet)
        return typeof read === 'string' ? read : read ? undefined : 'Type a cell, such as B7 or Heat!B7'
      },
    },
  ],
  says: (context, args) => {
    const read = readReference(context.workbook, String(args.cell ?? ''), context.selection.sheet)
    return typeof read === 'object' ? `Selects ${describeArea(context.workbook, read)}.` : 'Selects a cell.'
  },
  run: (context, args) => {
    const read = readReference(context.workbook, String(args.cell ?? ''), context.selection.sheet)
    if (typeof read === 'object') return select(read)
    return { kind: 'refused', text: read ?? 'Type a cell, such as B7 or Heat!B7' }
  },
}

/** The sheet so many places further on; undefined past either end. */
function neighbour({ workbook, selection }: CommandContext, by: 1 | -1) {
  const at = workbook.sheets.findIndex(({ id }) => id === selection.sheet)
  return at === -1 ? undefined : workbook.sheets[at + by]
}

function step(id: string, title: string, keys: string, by: 1 | -1, end: string): Command {
  return {
    id,
    title,
    group: 'Go to',
    keys: [keys],
    when: all(hasWorkbook, (context): Availability => neighbour(context, by) !== undefined || end),
    says: (context) => `Shows ${neighbour(context, by)?.name ?? 'the same sheet'}.`,
    run: (context) => {
      const sheet = neighbour(context, by)
      return sheet ? select(firstCell(context.workbook, sheet.id)) : { kind: 'refused', text: end }
    },
  }
}

export const goToCommands: readonly Command[] = [
  goToSheet,
  goToName,
  goToCell,
  step('next-sheet', 'Go to the next sheet', 'Alt+PageDown', 1, 'This is the last sheet'),
  step('previous-sheet', 'Go to the sheet before', 'Alt+PageUp', -1, 'This is the first sheet'),
]
