import { limits, type Operation, sheetById } from '../workbook'
import {
  all,
  hasRedo,
  hasRowAbove,
  hasRowBelow,
  hasUndo,
  hasWorkbook,
  mayChangeSelection,
  selectionBelowHeader,
} from './availability'
import type { Command, CommandContext, Effect, Selection } from './command'
import { describeArea } from './references'

type PlainView = 'undo' | 'redo' | 'edit-cell' | 'edit-note' | 'copy' | 'cut' | 'paste'
const view = (kind: PlainView) => (): Effect => ({ kind: 'view', change: { kind } })

function selected({ workbook, selection }: CommandContext): string {
  return describeArea(workbook, selection)
}

/** "1 row", "3 rows". */
export function countOf(count: number, one: string): string {
  return count === 1 ? `1 ${one}` : `${count} ${one}s`
}

function operation(label: string, op: Operation): Effect {
  return { kind: 'operations', label, operations: [op] }
}

const history: readonly Command[] = [
  {
    id: 'undo',
    title: 'Undo',
    synonyms: ['take back', 'revert', 'go back'],
    group: 'Edit',
    keys: ['Mod+Z'],
    when: hasUndo,
    says: ({ undoLabel }) => `Undoes: ${undoLabel ?? 'your last change'}.`,
    run: view('undo'),
  },
  {
    id: 'redo',
    title: 'Redo',
    synonyms: ['do again', 'repeat'],
    group: 'Edit',
    keys: ['Mod+Shift+Z', 'Mod+Y'],
    when: hasRedo,
    says: ({ redoLabel }) => `Does again: ${redoLabel ?? 'what you undid'}.`,
    run: view('redo'),
  },
]

const cells: readonly Command[] = [
  {
    id: 'edit-cell',
    title: 'Edit the cell',
    synonyms: ['change cell', 'type', 'formula'],
    group: 'Edit',
    keys: ['F2'],
    when: mayChangeSelection,
    says: (context) => `Opens ${selected(context)} for typing.`,
    run: view('edit-cell'),
  },
  {
    id: 'edit-note',
    title: 'Write a note',
    synonyms: ['comment', 'remark', 'annotate', 'note'],
    group: 'Edit',
    keys: ['Shift+F2'],
    when: mayChangeSelection,
    says: (context) => `Opens the note of ${selected(context)}.`,
    run: view('edit-note'),
  },
  {
    id: 'copy',
    title: 'Copy',
    group: 'Edit',
    keys: ['Mod+C'],
    when: hasWorkbook,
    says: (context) => `Copies ${selected(context)}.`,
    run: view('copy'),
  },
  {
    id: 'cut',
    title: 'Cut',
    group: 'Edit',
    keys: ['Mod+X'],
    when: mayChangeSelection,
    says: (context) => `Takes ${selected(context)} away to paste it elsewhere.`,
    run: view('cut'),
  },
  {
    id: 'paste',
    title: 'Paste',
    synonyms: ['insert clipboard'],
    group: 'Edit',
    keys: ['Mod+V'],
    when: mayChangeSelection,
    says: (context) => `Pastes from ${selected(context)} on.`,
    run: view('paste'),
  },
  {
    id: 'clear-cells',
    title: 'Clear the cells',
    synonyms: ['delete contents', 'empty', 'erase'],
    group: 'Edit',
    keys: ['Delete', 'Backspace'],
    when: mayChangeSelection,
    says: (context) => `Empties ${selected(context)}; formats and notes stay.`,
    run: clearCells,
  },
]

/** Only cells that hold something are patched, so that clearing a whole column stays small. */
function clearCells({ workbook, selection }: CommandContext): Effect {
  const sheet = sheetById(workbook, selection.sheet)
  const patches = []
  for (let row = selection.row; row < selection.row + selection.rowCount; row++) {
    for (let column = selection.column; column < selection.column + selection.columnCount; column++) {
      if (sheet?.rows[row]?.[column]?.input !== undefined) patches.push({ row, column, input: null })
    }
  }
  if (patches.length === 0) return { kind: 'refused', text: 'The selected cells are empty already' }
  if (patches.length > limits.cellsInOperation) {
    return { kind: 'refused', text: `At most ${limits.cellsInOperation} cells are cleared at once` }
  }
  const label = `Clear ${describeArea(workbook, selection)}`
  return operation(label, { kind: 'set-cells', sheet: selection.sheet, cells: patches })
}

interface LineCommand {
  readonly id: string
  readonly title: string
  readonly synonyms: readonly string[]
  readonly keys?: readonly string[]
  readonly axis: 'row' | 'column'
  readonly at: (selection: Selection) => number
  readonly where: string
}

function insertLines({ id, title, synonyms, keys, axis, at, where }: LineCommand): Command {
  const countIn = ({ rowCount, columnCount }: Selection) => (axis === 'row' ? rowCount : columnCount)
  return {
    id,
    title,
    synonyms,
    group: 'Edit',
    ...(keys ? { keys } : {}),
    when:
      axis === 'row' && where === 'above'
        ? all(mayChangeSelection, selectionBelowHeader)
        : mayChangeSelection,
    says: (context) => {
      const { selection } = context
      return `Adds ${countOf(countIn(selection), `blank ${axis}`)} ${where} ${selected(context)}.`
    },
    run: ({ selection }) => {
      const count = countIn(selection)
      const op = { kind: 'insert-lines', sheet: selection.sheet, axis, at: at(selection), count } as const
      return operation(`Insert ${countOf(count, axis)}`, op)
    },
  }
}

const inserts: readonly Command[] = [
  insertLines({
    id: 'insert-rows-above',
    title: 'Insert rows above',
    synonyms: ['add row', 'new row', 'row before', 'insert row'],
    keys: ['Mod+Alt+Enter'],
    axis: 'row',
    at: ({ row }) => row,
    where: 'above',
  }),
  insertLines({
    id: 'insert-rows-below',
    title: 'Insert rows below',
    synonyms: ['add row', 'new row', 'row after', 'insert row'],
    keys: ['Mod+Shift+Enter'],
    axis: 'row',
    at: ({ row, rowCount }) => row + rowCount,
    where: 'below',
  }),
  insertLines({
    id: 'insert-columns-before',
    title: 'Insert columns before',
    synonyms: ['add column', 'new column', 'column left', 'insert column'],
    axis: 'column',
    at: ({ column }) => column,
    where: 'before',
  }),
  insertLines({
    id: 'insert-columns-after',
    title: 'Insert columns after',
    synonyms: ['add column', 'new column', 'column right', 'insert column'],
    axis: 'column',
    at: ({ column, columnCount }) => column + columnCount,
    where: 'after',
  }),
]

const removes: readonly Command[] = [
  {
    id: 'remove-rows',
    title: 'Remove rows',
    synonyms: ['delete rows', 'drop rows'],
    group: 'Edit',
    keys: ['Mod+Backspace'],
    when: all(mayChangeSelection, selectionBelowHeader),
    says: ({ selection }) => {
      const { row, rowCount } = selection
      return rowCount === 1 ? `Removes row ${row + 1}.` : `Removes rows ${row + 1} to ${row + rowCount}.`
    },
    run: ({ selection: { sheet, row, rowCount } }) =>
      operation(`Remove ${countOf(rowCount, 'row')}`, {
        kind: 'remove-lines',
        sheet,
        axis: 'row',
        at: row,
        count: rowCount,
      }),
  },
  {
    id: 'remove-columns',
    title: 'Remove columns',
    synonyms: ['delete columns', 'drop columns'],
    group: 'Edit',
    when: all(mayChangeSelection, ({ workbook, selection }) => {
      const columns = sheetById(workbook, selection.sheet)?.columns.length ?? 0
      return selection.columnCount < columns || 'A sheet keeps at least one column'
    }),
    says: (context) => `Removes ${countOf(context.selection.columnCount, 'column')} at ${selected(context)}.`,
    run: ({ selection: { sheet, column, columnCount } }) =>
      operation(`Remove ${countOf(columnCount, 'column')}`, {
        kind: 'remove-lines',
        sheet,
        axis: 'column',
        at: column,
        count: columnCount,
      }),
  },
]

/** `to` is the row they come to stand before, in the numbering before the move. */
function moveRows(id: string, where: 'up' | 'down', key: string): Command {
  return {
    id,
    title: `Move rows ${where}`,
    synonyms: ['reorder rows', where === 'up' ? 'raise row' : 'lower row'],
    group: 'Edit',
    keys: [key],
    when:
      where === 'up'
        ? all(mayChangeSelection, selectionBelowHeader, hasRowAbove)
        : all(mayChangeSelection, selectionBelowHeader, hasRowBelow),
    says: ({ selection: { rowCount } }) => `Moves ${countOf(rowCount, 'row')} one place ${where}.`,
    run: ({ selection: { sheet, row, rowCount } }) =>
      operation(`Move ${countOf(rowCount, 'row')} ${where}`, {
        kind: 'move-lines',
        sheet,
        axis: 'row',
        at: row,
        count: rowCount,
        to: where === 'up' ? row - 1 : row + rowCount + 1,
      }),
  }
}

export const editCommands: readonly Command[] = [
  ...history,
  ...cells,
  ...inserts,
  ...removes,
  moveRows('move-rows-up', 'up', 'Alt+ArrowUp'),
  moveRows('move-rows-down', 'down', 'Alt+ArrowDown'),
]
