import { quantityOf } from '../apply/convert-number'
import { formulaBounds } from '../formula/bounds'
import { isFormula, type Workbook } from '../model'
import { parseFormula } from '../words/expression'
import { inferKind } from './infer'
import { clash, isKnown, kindOfQuantity, sayKind } from './kind'
import { kindOfName, lookingOnce } from './places'

export interface QuantityWarning {
  readonly sheet: string
  readonly row: number
  readonly column: number
  readonly text: string
}

/**
 * Where a formula mixes kinds of quantity: within itself, or against the cell that it stands in. One warning a cell, the first.
 *
 * K4 A cell's own kind is its format's, else its name's, else its column's. A format with a unit of its own ("per sheet") is of none.
 * K5 What cannot be known is passed over: no warning is worth more than a false one.
 */
export function quantityWarnings(workbook: Workbook): QuantityWarning[] {
  return lookingOnce(() => everyWarning(workbook))
}

function everyWarning(workbook: Workbook): QuantityWarning[] {
  const warnings: QuantityWarning[] = []
  const names = namesByCell(workbook)
  for (const sheet of workbook.sheets) {
    sheet.rows.forEach((cells, row) => {
      cells?.forEach((cell, column) => {
        if (!isFormula(cell?.input)) return
        const found = warningOf(workbook, { sheet: sheet.id, row, column }, cell.input, ownKind(row, column))
        if (found) warnings.push({ sheet: sheet.id, row, column, text: found })
      })
    })
    function ownKind(row: number, column: number) {
      const cell = sheet.rows[row]?.[column]
      if (cell?.format?.unit) return 'unknown'
      const name = names.get(`${sheet.id} ${row} ${column}`)
      if (cell?.format?.quantity === undefined && name !== undefined) return kindOfName(workbook, name)
      return kindOfQuantity(quantityOf(cell, sheet, column))
    }
  }
  return warnings
}

type Kind = ReturnType<typeof kindOfQuantity>

function warningOf(
  workbook: Workbook,
  at: { readonly sheet: string; readonly row: number; readonly column: number },
  formula: string,
  own: Kind,
): string | undefined {
  const tree = formulaBounds(formula) ? undefined : parseFormula(formula)
  if (!tree) return undefined
  let first: string | undefined
  const kind = inferKind(workbook, at, tree, (text) => {
    first ??= text
  })
  if (first !== undefined) return first
  if (!clash(own, kind, workbook.system) || !isKnown(own) || !isKnown(kind)) return undefined
  // An amount of money may be a price for one of something.
  if (own.quantity === 'money' && kind.dimensions.money === 1) return undefined
  return `Gives ${sayKind(kind)}, where the cell is for ${sayKind(own)}`
}

function namesByCell(workbook: Workbook): ReadonlyMap<string, string> {
  const names = new Map<string, string>()
  for (const { name, area } of workbook.names.values()) {
    if (area.rowCount === 1 && area.columnCount === 1)
      names.set(`${area.sheet} ${area.row} ${area.column}`, name)
  }
  return names
}
