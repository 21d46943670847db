import { isLineOperation, lineChangeOf, rearranged } from '../apply/lines'
import type { CellAddress, PackedChanges } from '../contracts'
import type { CellValue, NamedValue, Workbook } from '../model'
import type { Operation } from '../operations'
import type { StoredValues } from '../wire'
import { packedValue } from './packed'

type ValueRow = CellValue[]

/**
 * Computed values by sheet, as the screen reads them. Fed by change lists; `follow` shifts the values along with a
 * structural operation, so that what was computed stays with its cell until the engine answers.
 */
export class ValueCache {
  private readonly sheets = new Map<string, (ValueRow | undefined)[]>()

  static fromStored(stored: StoredValues): ValueCache {
    const cache = new ValueCache()
    for (const [sheet, rows] of Object.entries(stored)) {
      cache.sheets.set(
        sheet,
        rows.map((row) => [...row]),
      )
    }
    return cache
  }

  get({ sheet, row, column }: CellAddress): CellValue {
    return this.sheets.get(sheet)?.[row]?.[column] ?? null
  }

  set({ sheet, row, column }: CellAddress, value: CellValue): void {
    let rows = this.sheets.get(sheet)
    if (!rows) {
      rows = []
      this.sheets.set(sheet, rows)
    }
    const cells = rows[row] ?? []
    rows[row] = cells
    cells[column] = value
  }

  applyPacked(packed: PackedChanges): void {
    const { address } = packed
    for (let i = 0; i < packed.type.length; i += 1) {
      const sheet = packed.sheets[address[3 * i] ?? 0] ?? ''
      const at = { sheet, row: address[3 * i + 1] ?? 0, column: address[3 * i + 2] ?? 0 }
      this.set(at, packedValue(packed, i))
    }
  }

  /** Moves values with the lines they stand on; values of removed cells and sheets go. */
  follow(operation: Operation): void {
    if (operation.kind === 'remove-sheet') {
      this.sheets.delete(operation.sheet)
      return
    }
    if (!isLineOperation(operation)) return
    const lines = lineChangeOf(operation)
    const rows = this.sheets.get(operation.sheet)
    if (!rows) return
    this.sheets.set(
      operation.sheet,
      operation.axis === 'row'
        ? rearranged<ValueRow | undefined>(rows, lines, undefined)
        : Array.from(rows, (cells) => cells && rearranged<CellValue>(Array.from(cells, blank), lines, null)),
    )
  }

  /** Values of a named area, row-major. */
  area({ area }: NamedValue): CellValue[] {
    const values: CellValue[] = []
    for (let row = area.row; row < area.row + area.rowCount; row += 1) {
      for (let column = area.column; column < area.column + area.columnCount; column += 1) {
        values.push(this.get({ sheet: area.sheet, row, column }))
      }
    }
    return values
  }

  named(workbook: Workbook, name: string): CellValue[] | undefined {
    const named = workbook.names.get(name)
    return named && this.area(named)
  }

  toStored(): StoredValues {
    const stored: Record<string, CellValue[][]> = {}
    for (const [sheet, rows] of this.sheets) {
      stored[sheet] = Array.from(rows, (cells) => Array.from(cells ?? [], blank))
    }
    return stored
  }

  /** Every value that is not blank. */
  each(visit: (address: CellAddress, value: CellValue) => void): void {
    for (const [sheet, rows] of this.sheets) {
      rows.forEach((cells, row) => {
        cells?.forEach((value, column) => {
          if (value !== null && value !== undefined) visit({ sheet, row, column }, value)
        })
      })
    }
  }
}

function blank(value: CellValue | undefined): CellValue {
  return value ?? null
}
