import { fail, succeed } from '../../failures'
import { dropSheetInFormula, mentionsSheet, renameInFormula } from '../formula/rewrite'
import { limits } from '../limits'
import { sheetByName } from '../lookup'
import type { Sheet, Workbook } from '../model'
import type { CellPatch, Operation } from '../operations'
import { rewriteFormulas } from './formulas'
import { nameTarget } from './names'
import { type Apply, findSheet, type OperationOf, setCells } from './parts'
import { wholePatch } from './set-cells'

/**
 * W15 Sheet names differ by more than case, and the last sheet stays.
 * W16 A removed sheet takes its named values along; references to it become `#REF!`.
 */
export const applyAddSheet: Apply<'add-sheet'> = (workbook, operation) => {
  const { sheet: id, name, at } = operation
  if (workbook.sheets.some((sheet) => sheet.id === id)) {
    return fail('invalid', 'A sheet with this identity is there already.', { name: id })
  }
  const taken = nameTaken(workbook, name)
  if (taken) return taken
  if (workbook.sheets.length >= limits.sheets) {
    return fail('limit', `A workbook has at most ${limits.sheets} sheets.`)
  }
  if (at > workbook.sheets.length) {
    return fail('invalid', `Expected a place from 1 to ${workbook.sheets.length + 1} for the new sheet.`)
  }
  const waiting = formulasThatName(workbook, name)
  workbook.sheets.splice(at, 0, newSheet(operation))
  return succeed({ inverse: [{ kind: 'remove-sheet', sheet: id }, ...waiting], touched: [] })
}

/** Formulas that already name a sheet which is not there: its removal would make `#REF!` of them. */
function formulasThatName(workbook: Workbook, name: string): Operation[] {
  return rewriteFormulas(workbook, (text) => ({ text, exact: !mentionsSheet(text, name) })).restore
}

function newSheet(operation: OperationOf<'add-sheet'>): Sheet {
  const { sheet: id, name, sheetKind: kind, about, lock, rowCount, columns } = operation
  return {
    id,
    name,
    kind,
    ...(about === undefined ? {} : { about }),
    ...(lock === undefined ? {} : { lock }),
    rowCount,
    columns: columns.map((column) => ({ ...column }) as Sheet['columns'][number]),
    rows: [],
  }
}

function nameTaken(workbook: Workbook, name: string, except?: string): ReturnType<typeof fail> | undefined {
  const other = sheetByName(workbook, name)
  if (!other || other.id === except) return undefined
  return fail('invalid', `There is a sheet called ${other.name} already; give another name.`, { name })
}

export const applyRemoveSheet: Apply<'remove-sheet'> = (workbook, operation) => {
  const found = findSheet(workbook, operation.sheet)
  if (!found.ok) return found
  if (workbook.sheets.length === 1) return fail('invalid', 'A workbook keeps at least one sheet.')
  const sheet = found.value
  const at = workbook.sheets.indexOf(sheet)
  const rewritten = rewriteFormulas(
    workbook,
    (text) => {
      const dropped = dropSheetInFormula(text, sheet.name)
      return { text: dropped, exact: dropped === text }
    },
    (home) => home === sheet,
  )
  const lostNames: Operation[] = []
  for (const named of [...workbook.names.values()]) {
    if (named.area.sheet !== sheet.id) continue
    lostNames.push({ kind: 'name-value', name: named.name, target: nameTarget(named) })
    workbook.names.delete(named.name)
  }
  workbook.sheets.splice(at, 1)
  return succeed({
    inverse: [addAgain(sheet, at), ...contents(sheet), ...rewritten.restore, ...lostNames],
    touched: rewritten.touched,
  })
}

function addAgain(sheet: Sheet, at: number): Operation {
  return {
    kind: 'add-sheet',
    sheet: sheet.id,
    name: sheet.name,
    at,
    sheetKind: sheet.kind,
    ...(sheet.about === undefined ? {} : { about: sheet.about }),
    ...(sheet.lock === undefined ? {} : { lock: sheet.lock }),
    rowCount: sheet.rowCount,
    columns: sheet.columns.map((column) => ({ ...column })),
  }
}

function contents(sheet: Sheet): Operation[] {
  const patches: CellPatch[] = []
  sheet.rows.forEach((cells, row) => {
    cells?.forEach((cell, column) => {
      if (cell) patches.push(wholePatch(row, column, cell))
    })
  })
  return setCells(sheet.id, patches)
}

export const applyRenameSheet: Apply<'rename-sheet'> = (workbook, operation) => {
  const found = findSheet(workbook, operation.sheet)
  if (!found.ok) return found
  const sheet = found.value
  const taken = nameTaken(workbook, operation.name, sheet.id)
  if (taken) return taken
  const { name } = sheet
  if (name === operation.name) return succeed({ inverse: [], touched: [] })
  const rewritten = rewriteFormulas(workbook, (text) => {
    const renamed = renameInFormula(text, name, operation.name)
    return { text: renamed, exact: renameInFormula(renamed, operation.name, name) === text }
  })
  sheet.name = operation.name
  return succeed({
    inverse: [{ kind: 'rename-sheet', sheet: sheet.id, name }, ...rewritten.restore],
    touched: rewritten.touched,
  })
}

export const applyReorderSheet: Apply<'reorder-sheet'> = (workbook, operation) => {
  const found = findSheet(workbook, operation.sheet)
  if (!found.ok) return found
  if (operation.to >= workbook.sheets.length) {
    return fail('invalid', `Expected a place from 1 to ${workbook.sheets.length}.`)
  }
  const at = workbook.sheets.indexOf(found.value)
  if (at === operation.to) return succeed({ inverse: [], touched: [] })
  workbook.sheets.splice(at, 1)
  workbook.sheets.splice(operation.to, 0, found.value)
  return succeed({ inverse: [{ kind: 'reorder-sheet', sheet: operation.sheet, to: at }], touched: [] })
}
