import type { Area, CellAddress, NamedValue, Operation } from '../workbook'
import type { CommandContext } from './command'
import { lowerFirst } from './words'

const inputsOf = new WeakMap<CommandContext, readonly NamedValue[]>()

/** The named inputs in the order of the sheets, then down each sheet. A context is of one moment: sorted once. */
export function namedInputs(context: CommandContext): readonly NamedValue[] {
  const known = inputsOf.get(context) ?? sortedInputs(context)
  inputsOf.set(context, known)
  return known
}

function sortedInputs({ workbook }: CommandContext): readonly NamedValue[] {
  const order = new Map(workbook.sheets.map((sheet, index) => [sheet.id, index]))
  const place = ({ area }: NamedValue) =>
    (order.get(area.sheet) ?? workbook.sheets.length) * 1e9 + area.row * 1e3 + area.column
  return [...workbook.names.values()]
    .filter((named) => named.role === 'input')
    .sort((a, b) => place(a) - place(b))
}

/** "Frame width": the label, or the name in words. */
export function labelOf(named: NamedValue): string {
  return named.label ?? named.name.replaceAll('_', ' ')
}

export function labelInSentence(named: NamedValue): string {
  return lowerFirst(labelOf(named))
}

/** Cells of an area, row by row. */
export function cellsOf(area: Area): readonly CellAddress[] {
  return Array.from({ length: area.rowCount * area.columnCount }, (_, index) => ({
    sheet: area.sheet,
    row: area.row + Math.floor(index / area.columnCount),
    column: area.column + (index % area.columnCount),
  }))
}

/** Sets the cells of a named area, one value each; a single value goes into all of them. */
export function setArea(area: Area, values: readonly (string | number | boolean)[]): Operation {
  const cells = cellsOf(area).map(({ row, column }, index) => ({
    row,
    column,
    input: values.length === 1 ? (values[0] ?? null) : (values[index] ?? null),
  }))
  return { kind: 'set-cells', sheet: area.sheet, cells }
}
