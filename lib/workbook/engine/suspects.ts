import { cellName } from '../address'
import { isFormula } from '../model'
import type { CellPatch, Operation } from '../operations'
import type { WorkbookJson } from '../serial'

/** The formulas that operations set: the ones to leave out when a calculation was not finished. */
export function formulasOf(operations: readonly Operation[]): string[] {
  return operations.flatMap((operation) =>
    operation.kind === 'set-cells'
      ? operation.cells.flatMap(({ input }) => (holdsFormula(input) ? [input] : []))
      : [],
  )
}

/** The cell of the last formula that was set, else the first cell or the sheet that was changed; empty when there is none. */
export function placeOf(workbook: WorkbookJson, operations: readonly Operation[]): string {
  const last = operations.at(-1)
  if (!last) return ''
  const cell = suspectCell(operations) ?? suspectCell([last], () => true)
  if (cell) return `${sheetName(workbook, cell.sheet)} ${cellName(cell.patch.row, cell.patch.column)}`
  if (last.kind === 'convert-units') return ''
  return last.kind === 'name-value' ? last.name : sheetName(workbook, last.sheet)
}

function suspectCell(
  operations: readonly Operation[],
  suspect: (patch: CellPatch) => boolean = ({ input }) => holdsFormula(input),
): { sheet: string; patch: CellPatch } | undefined {
  for (const operation of operations.toReversed()) {
    if (operation.kind !== 'set-cells') continue
    const patch = operation.cells.find(suspect)
    if (patch) return { sheet: operation.sheet, patch }
  }
  return undefined
}

function holdsFormula(input: CellPatch['input']): input is string {
  return isFormula(input ?? undefined)
}

function sheetName(workbook: WorkbookJson, id: string): string {
  return workbook.sheets.find((sheet) => sheet.id === id)?.name ?? ''
}

export function hangWords(place: string, milliseconds: number): string {
  const seconds = Math.round(milliseconds / 1000)
  const where = place === '' ? 'The calculation' : `The calculation after the change of ${place}`
  return `${where} took longer than ${seconds} seconds and was stopped.`
}
