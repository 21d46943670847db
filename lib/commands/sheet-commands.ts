import { quantities } from '../units'
import {
  type CellFormat,
  cellAt,
  limits,
  type NamedValue,
  type Operation,
  refusedName,
  sheetById,
  sheetNameSchema,
} from '../workbook'
import { all, hasAnotherSheet, mayChange, mayChangeSelection, sheetIsOpen } from './availability'
import type { ArgumentSpec, Command, CommandContext, Effect } from './command'
import { cellsOf } from './inputs'
import { describeArea } from './references'

function operation(label: string, op: Operation): Effect {
  return { kind: 'operations', label, operations: [op] }
}

const sheetNameExpected = `Give a name of 1 to ${limits.sheetNameLength} characters without : \\ / ? * [ ] or '`

function checkSheetName({ workbook }: CommandContext, text: string, except?: string): string | undefined {
  const name = text.trim()
  if (!sheetNameSchema.safeParse(name).success) return sheetNameExpected
  const same = workbook.sheets.find((sheet) => sheet.name.toLowerCase() === name.toLowerCase())
  return same && same.id !== except ? `There is a sheet called ${same.name} already` : undefined
}

/** An id from the name, made different from those there are; the caller's `newId` parts it from others' at the same time. */
function newSheetId({ workbook, newId }: CommandContext, name: string): string {
  const taken = new Set(workbook.sheets.map(({ id }) => id))
  const plain = name
    .normalize('NFD')
    .toLowerCase()
    .replaceAll(/[^a-z0-9]+/g, '-')
  const slug = plain.replaceAll(/^-+|-+$/g, '').slice(0, 40) || 'sheet'
  const own = newId?.()
    .toLowerCase()
    .replaceAll(/[^a-z0-9]/g, '')
    .slice(0, 8)
  const first = own ? `${slug}-${own}` : slug
  let id = first
  for (let number = 2; taken.has(id); number++) id = `${first}-${number}`
  return id
}

const addSheet: Command = {
  id: 'add-sheet',
  title: 'Add a sheet called …',
  phrase: ['Add a sheet called', { argument: 'title' }],
  synonyms: ['new sheet', 'create sheet', 'insert sheet', 'add sheet'],
  group: 'Sheet',
  when: all(
    mayChange,
    ({ workbook }) =>
      workbook.sheets.length < limits.sheets || `A workbook has at most ${limits.sheets} sheets`,
  ),
  arguments: [
    {
      kind: 'text',
      id: 'title',
      label: 'a sheet name',
      example: 'a name, such as Site visit',
      check: (context, text) => checkSheetName(context, text),
    },
  ],
  says: ({ workbook, selection }) => {
    const name = sheetById(workbook, selection.sheet)?.name
    return name === undefined ? 'Adds a blank sheet.' : `Adds a blank sheet after ${name}.`
  },
  run: (context, args) => {
    const name = String(args.title ?? '').trim()
    const problem = checkSheetName(context, name)
    if (problem !== undefined) return { kind: 'refused', text: problem }
    const here = context.workbook.sheets.findIndex(({ id }) => id === context.selection.sheet)
    return operation(`Add sheet ${name}`, {
      kind: 'add-sheet',
      sheet: newSheetId(context, name),
      name,
      at: here === -1 ? context.workbook.sheets.length : here + 1,
      sheetKind: 'step',
      rowCount: 100,
      columns: Array.from({ length: 12 }, () => ({})),
    })
  },
}

const renameSheet: Command = {
  id: 'rename-sheet',
  title: 'Rename this sheet to …',
  phrase: ['Rename this sheet to', { argument: 'title' }],
  synonyms: ['rename sheet', 'call sheet', 'sheet title'],
  group: 'Sheet',
  when: mayChangeSelection,
  arguments: [
    {
      kind: 'text',
      id: 'title',
      label: 'a sheet name',
      example: 'a name, such as Site visit',
      initial: ({ workbook, selection }) => sheetById(workbook, selection.sheet)?.name ?? '',
      check: (context, text) => checkSheetName(context, text, context.selection.sheet),
    },
  ],
  says: ({ workbook, selection }) =>
    `Renames ${sheetById(workbook, selection.sheet)?.name ?? 'the sheet'}; formulas follow.`,
  run: (context, args) => {
    const name = String(args.title ?? '').trim()
    const problem = checkSheetName(context, name, context.selection.sheet)
    if (problem !== undefined) return { kind: 'refused', text: problem }
    return operation(`Rename sheet to ${name}`, {
      kind: 'rename-sheet',
      sheet: context.selection.sheet,
      name,
    })
  },
}

const removeSheet: Command = {
  id: 'remove-sheet',
  title: 'Remove a sheet …',
  phrase: ['Remove the sheet', { argument: 'sheet' }],
  synonyms: ['delete sheet', 'drop sheet', 'remove sheet'],
  group: 'Sheet',
  when: all(mayChange, hasAnotherSheet),
  arguments: [
    {
      kind: 'choice',
      id: 'sheet',
      label: 'a sheet',
      options: (context) =>
        context.workbook.sheets
          .filter(({ id }) => sheetIsOpen(context, id) === true)
          .map(({ id, name, about }) => ({ value: id, title: name, ...(about ? { detail: about } : {}) })),
    },
  ],
  says: ({ workbook }, args) => {
    const sheet = sheetById(workbook, String(args.sheet))
    const names = [...workbook.names.values()].filter(({ area }) => area.sheet === sheet?.id).length
    if (!sheet) return 'Removes a sheet and the names on it.'
    return names === 0
      ? `Removes ${sheet.name} and all that is on it.`
      : `Removes ${sheet.name} and its ${names} names; formulas that use them will show an error.`
  },
  run: (context, args) => {
    const sheet = sheetById(context.workbook, String(args.sheet))
    if (!sheet) return { kind: 'refused', text: 'That sheet is no longer there' }
    const open = sheetIsOpen(context, sheet.id)
    if (open !== true) return { kind: 'refused', text: open }
    return operation(`Remove sheet ${sheet.name}`, { kind: 'remove-sheet', sheet: sheet.id })
  },
}

/** The first cell's kind, so that the name carries the unit that the cell shows. */
function kindOfSelection({ workbook, selection }: CommandContext): NamedValue['quantity'] {
  const format = cellAt(workbook, selection)?.format
  const column = sheetById(workbook, selection.sheet)?.columns[selection.column]
  return format?.quantity ?? column?.quantity ?? 'number'
}

function checkName({ workbook }: CommandContext, text: string): string | undefined {
  const name = text.trim()
  if (name === '') return 'Expected a name, such as door_count.'
  const refused = refusedName(name)
  if (refused !== undefined) return refused
  const taken = workbook.names.get(name)
  return taken && `${name} already names ${describeArea(workbook, taken.area)}`
}

const nameCells: Command = {
  id: 'name-cells',
  title: 'Name the selected cells …',
  phrase: ['Name the selected cells', { argument: 'name' }],
  synonyms: ['define name', 'named value', 'call cells', 'label'],
  group: 'Sheet',
  when: mayChangeSelection,
  arguments: [
    { kind: 'text', id: 'name', label: 'a name', example: 'a name, such as door_count', check: checkName },
  ],
  says: ({ workbook, selection }) => `Formulas can then call ${describeArea(workbook, selection)} by it.`,
  run: (context, args) => {
    const name = String(args.name ?? '').trim()
    const problem = checkName(context, name)
    if (problem !== undefined) return { kind: 'refused', text: problem }
    const { sheet, row, column, rowCount, columnCount } = context.selection
    return operation(`Name ${describeArea(context.workbook, context.selection)} ${name}`, {
      kind: 'name-value',
      name,
      target: {
        area: { sheet, row, column, rowCount, columnCount },
        quantity: kindOfSelection(context),
        role: 'constant',
      },
    })
  },
}

/** Formats are replaced whole, so each cell's other parts are written again with the changed one. */
function formatCells(context: CommandContext, label: string, change: CellFormat): Effect {
  const { selection, workbook } = context
  const size = selection.rowCount * selection.columnCount
  if (size > limits.cellsInOperation) {
    return { kind: 'refused', text: `At most ${limits.cellsInOperation} cells are formatted at once` }
  }
  const cells = cellsOf(selection).map(({ sheet, row, column }) => {
    const { choices, ...format } = cellAt(workbook, { sheet, row, column })?.format ?? {}
    const kept =
      choices === undefined ? {} : { choices: typeof choices === 'string' ? choices : [...choices] }
    return { row, column, format: { ...format, ...kept, ...change } as Writable }
  })
  return operation(label, { kind: 'set-cells', sheet: selection.sheet, cells })
}
type Writable = NonNullable<Extract<Operation, { kind: 'set-cells' }>['cells'][number]['format']>

const quantityChoice: ArgumentSpec = {
  kind: 'choice',
  id: 'quantity',
  label: 'a kind of value',
  options: () => quantities.map((value) => ({ value, title: value.replaceAll('-', ' ') })),
}

const setKind: Command = {
  id: 'set-kind',
  title: 'Show the selected cells as …',
  phrase: ['Show the selected cells as', { argument: 'quantity' }],
  synonyms: ['number format', 'quantity', 'unit', 'format cells', 'kind of value'],
  group: 'Sheet',
  when: mayChangeSelection,
  arguments: [quantityChoice],
  says: ({ workbook, selection }) =>
    `Gives ${describeArea(workbook, selection)} the unit and notation of that kind; numbers stay.`,
  run: (context, args) => {
    const quantity = quantities.find((known) => known === args.quantity)
    if (!quantity) return { kind: 'refused', text: 'Pick a kind of value from the list' }
    return formatCells(context, `Show as ${quantity.replaceAll('-', ' ')}`, { quantity })
  },
}

const digitsExpected = 'Give the digits after the point, 0 to 10'
const isDigits = (text: string) => /^(10|[0-9])$/.test(text.trim())

const setDigits: Command = {
  id: 'set-digits',
  title: 'Show digits after the point …',
  phrase: ['Show', { argument: 'digits' }, 'digits after the point'],
  synonyms: ['decimals', 'decimal places', 'precision', 'rounding', 'number format'],
  group: 'Sheet',
  when: mayChangeSelection,
  arguments: [
    {
      kind: 'text',
      id: 'digits',
      label: 'a number of digits',
      example: '0 to 10',
      check: (_, text) => (isDigits(text) ? undefined : digitsExpected),
    },
  ],
  says: ({ workbook, selection }) =>
    `Changes how ${describeArea(workbook, selection)} is shown, not its value.`,
  run: (context, args) => {
    const text = String(args.digits ?? '')
    if (!isDigits(text)) return { kind: 'refused', text: digitsExpected }
    return formatCells(context, `Show ${text.trim()} digits`, { digits: Number(text) })
  },
}

export const sheetCommands: readonly Command[] = [
  addSheet,
  renameSheet,
  removeSheet,
  nameCells,
  setKind,
  setDigits,
]
