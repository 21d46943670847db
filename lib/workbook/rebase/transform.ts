import { isLineOperation, type LineOperation, lineChangeOf, shiftArea } from '../apply/lines'
import type { OperationOf } from '../apply/parts'
import { lineAfter } from '../formula/lines'
import { dropSheetInFormula, renameInFormula, shiftFormula } from '../formula/rewrite'
import { isFormula } from '../model'
import type { CellPatch, Operation } from '../operations'
import { nameOf, type SheetGround } from './ground'
import { linesOver, type Side } from './lines'

/**
 * An operation as it reads after another one, both made from the same state.
 *
 * W27 Cells, columns and names follow the lines they stand on; formula texts that are being set follow as formulas do (W1 to W9).
 * W28 What stands on a line or a sheet that is gone, goes.
 * W37 Numbers being set while somebody converts the units are in the system they were typed in. Two conversions at once are one.
 * W29 On one cell or one name the later in the log stands.
 */
export function transform(
  operation: Operation,
  other: Operation,
  sheets: readonly SheetGround[],
  side: Side,
): Operation[] {
  if (operation.kind === 'convert-units') return convertOver(operation, other)
  if (other.kind === 'convert-units') return [inSystemBefore(operation, other)]
  const moved = isLineOperation(other)
    ? overLines(operation, other, side)
    : other.kind === 'remove-sheet'
      ? overRemovedSheet(operation, other, sheets)
      : overSheets(operation, other, sheets, side)
  return moved.map((each) => (each.kind === 'set-cells' ? withFormulas(each, other, sheets) : each))
}

type Convert = OperationOf<'convert-units'>

/** The numbers that a conversion brings back keep to their cells; both convert from one state, so two mean the same. */
function convertOver(operation: Convert, other: Operation): Convert[] {
  if (other.kind === 'convert-units') return []
  const { exact, ...bare } = operation
  if (!exact) return [operation]
  const followed = exact.flatMap((entry) => {
    if (!('sheet' in other) || other.sheet !== entry.sheet) return [entry]
    if (other.kind === 'remove-sheet') return []
    if (!isLineOperation(other)) return [entry]
    const line = lineAfter(lineChangeOf(other), entry[other.axis])
    return line === undefined ? [] : [{ ...entry, [other.axis]: line }]
  })
  return [followed.length > 0 ? { ...bare, exact: followed } : bare]
}

function inSystemBefore(operation: Operation, other: Convert): Operation {
  if (operation.kind !== 'set-cells' || operation.system !== undefined) return operation
  if (!operation.cells.some(({ input }) => typeof input === 'number')) return operation
  return { ...operation, system: other.system === 'us' ? 'si' : 'us' }
}

type NotConvert = Exclude<Operation, Convert>

function overLines(operation: NotConvert, other: LineOperation, side: Side): Operation[] {
  const change = lineChangeOf(other)
  const { axis } = other
  if (operation.kind === 'name-value') {
    if (operation.target?.area.sheet !== other.sheet) return [operation]
    const area = shiftArea(operation.target.area, axis, change)
    return area ? [{ ...operation, target: { ...operation.target, area } }] : []
  }
  if (operation.sheet !== other.sheet) return [operation]
  if (isLineOperation(operation)) {
    return operation.axis === axis ? linesOver(operation, other, side) : [operation]
  }
  switch (operation.kind) {
    case 'set-cells': {
      const cells: CellPatch[] = []
      for (const cell of operation.cells) {
        const line = lineAfter(change, cell[axis])
        if (line !== undefined) cells.push(line === cell[axis] ? cell : { ...cell, [axis]: line })
      }
      return cells.length > 0 ? [{ ...operation, cells }] : []
    }
    case 'set-columns': {
      if (axis === 'row') return [operation]
      const columns = operation.columns.flatMap((entry) => {
        const column = lineAfter(change, entry.column)
        return column === undefined ? [] : [{ ...entry, column }]
      })
      return columns.length > 0 ? [{ ...operation, columns }] : []
    }
    case 'set-extent': {
      const key = axis === 'row' ? 'rowCount' : 'columnCount'
      const grown =
        other.kind === 'insert-lines' ? other.count : other.kind === 'remove-lines' ? -other.count : 0
      return [{ ...operation, [key]: Math.max(1, operation[key] + grown) }]
    }
    default:
      return [operation]
  }
}

function overRemovedSheet(
  operation: NotConvert,
  other: OperationOf<'remove-sheet'>,
  sheets: readonly SheetGround[],
): Operation[] {
  if (operation.kind === 'name-value') {
    return operation.target?.area.sheet === other.sheet ? [] : [operation]
  }
  if (operation.sheet === other.sheet) return []
  const gone = sheets.findIndex(({ id }) => id === other.sheet)
  if (operation.kind === 'add-sheet') {
    return [{ ...operation, at: operation.at > gone && gone >= 0 ? operation.at - 1 : operation.at }]
  }
  if (operation.kind === 'reorder-sheet') {
    return [{ ...operation, to: Math.min(operation.to, Math.max(0, sheets.length - 2)) }]
  }
  return [operation]
}

/** Places among the sheets shift behind a sheet that was added before them. */
function overSheets(
  operation: Operation,
  other: Operation,
  sheets: readonly SheetGround[],
  side: Side,
): Operation[] {
  if (operation.kind === 'add-sheet' && other.kind === 'add-sheet') {
    const behind = operation.at > other.at || (operation.at === other.at && side === 'second')
    return [{ ...operation, at: Math.min(operation.at + (behind ? 1 : 0), sheets.length + 1) }]
  }
  return [operation]
}

function withFormulas(
  operation: OperationOf<'set-cells'>,
  other: Operation,
  sheets: readonly SheetGround[],
): Operation {
  const rewrite = rewriter(operation.sheet, other, sheets)
  if (!rewrite) return operation
  return {
    ...operation,
    cells: operation.cells.map((cell) => {
      if (typeof cell.input !== 'string' || !isFormula(cell.input)) return cell
      const input = rewrite(cell.input)
      return input === cell.input ? cell : { ...cell, input }
    }),
  }
}

function rewriter(
  home: string,
  other: Operation,
  sheets: readonly SheetGround[],
): ((formula: string) => string) | undefined {
  if (other.kind === 'rename-sheet') {
    const name = nameOf(sheets, other.sheet)
    return name === undefined ? undefined : (formula) => renameInFormula(formula, name, other.name)
  }
  if (other.kind === 'remove-sheet') {
    const name = nameOf(sheets, other.sheet)
    return name === undefined ? undefined : (formula) => dropSheetInFormula(formula, name)
  }
  if (!isLineOperation(other)) return undefined
  const homeName = nameOf(sheets, home)
  const name = nameOf(sheets, other.sheet)
  if (homeName === undefined || name === undefined) return undefined
  const change = lineChangeOf(other)
  return (formula) => shiftFormula(formula, homeName, name, other.axis, change).text
}
