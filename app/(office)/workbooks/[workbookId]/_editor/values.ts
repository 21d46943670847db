import { convert, type UnitSystem } from '@/lib/units'
import {
  type CellAddress,
  type CellInput,
  type CellValue,
  cellAt,
  isFormula,
  type Operation,
  type PackedChanges,
  quantityOf,
  type StoredValues,
  sheetById,
  ValueCache,
  type Workbook,
} from '@/lib/workbook'
import type { ValueChanges } from './session-contract'

/**
 * The values that the screen reads: first those stored with the snapshot, then what the worker computes. What is
 * typed shows at once; a formula keeps its last value until the engine has answered.
 */
export class SessionValues {
  private readonly cache: ValueCache
  /** Until the engine has given every value, an input that was not stored stands for itself. */
  private complete = false
  /** The system that the values are in. */
  private system: UnitSystem

  constructor(
    private readonly workbook: Workbook,
    stored: StoredValues | undefined,
  ) {
    this.system = workbook.system
    this.cache = stored ? ValueCache.fromStored(stored) : new ValueCache()
  }

  value(address: CellAddress): CellValue {
    const known = this.cache.get(address)
    if (known !== null || this.complete) return known
    return literal(cellAt(this.workbook, address)?.input)
  }

  named(name: string): CellValue[] | undefined {
    const area = this.workbook.names.get(name)?.area
    if (!area) return undefined
    const { sheet } = area
    return Array.from({ length: area.rowCount * area.columnCount }, (_, i) =>
      this.value({
        sheet,
        row: area.row + Math.floor(i / area.columnCount),
        column: area.column + (i % area.columnCount),
      }),
    )
  }

  /**
   * What the worker computed. Where the workbook here is some operations ahead of the worker, the values move along
   * with those, and what was typed since stays.
   */
  take(packed: PackedChanges, all: boolean, ahead: readonly Operation[]): ValueChanges {
    if (all) this.complete = true
    if (ahead.length === 0) {
      this.cache.applyPacked(packed)
      return changesOf(packed)
    }
    const computed = new ValueCache()
    computed.applyPacked(packed)
    for (const operation of ahead) computed.follow(operation)
    const changed: CellAddress[] = []
    // Computed before the units were converted: the number is in the units from before.
    const conversion = ahead.find((operation) => operation.kind === 'convert-units')
    const from = conversion && (conversion.system === 'us' ? 'si' : 'us')
    computed.each((address, value) => {
      if (this.isTypedIn(ahead, address)) return
      this.cache.set(address, from ? this.converted(address, value, from) : value)
      changed.push(address)
    })
    return touchedChanges(changed)
  }

  /** A value typed since stands until the worker has it; addresses of earlier lines may differ, which costs a moment's delay. */
  private isTypedIn(ahead: readonly Operation[], { sheet, row, column }: CellAddress): boolean {
    return ahead.some(
      (operation) =>
        operation.kind === 'set-cells' &&
        operation.sheet === sheet &&
        operation.cells.some((cell) => cell.row === row && cell.column === column),
    )
  }

  /** What was done to the workbook here, before the engine has followed. */
  follow(operations: readonly Operation[], touched: readonly CellAddress[]): ValueChanges {
    for (const operation of operations) this.cache.follow(operation)
    const converted = this.convertComputed()
    for (const address of touched) {
      const input = cellAt(this.workbook, address)?.input
      if (!isFormula(input)) this.cache.set(address, literal(input))
    }
    return touchedChanges(converted.length > 0 ? [...touched, ...converted] : touched)
  }

  /** When the workbook has come into the other system, results stand in its units before the engine has answered. */
  private convertComputed(): CellAddress[] {
    const { workbook, system: before } = this
    if (workbook.system === before) return []
    this.system = workbook.system
    const converted: CellAddress[] = []
    for (const sheet of workbook.sheets) {
      sheet.rows.forEach((cells, row) => {
        cells?.forEach((cell, column) => {
          if (!isFormula(cell?.input)) return
          const at = { sheet: sheet.id, row, column }
          const value = this.cache.get(at)
          const now = this.converted(at, value, before)
          if (now === value) return
          this.cache.set(at, now)
          converted.push(at)
        })
      })
    }
    return converted
  }

  private converted(address: CellAddress, value: CellValue, from: UnitSystem): CellValue {
    const sheet = sheetById(this.workbook, address.sheet)
    if (typeof value !== 'number' || !sheet) return value
    const quantity = quantityOf(sheet.rows[address.row]?.[address.column], sheet, address.column)
    return quantity === undefined ? value : convert(value, quantity, from, this.workbook.system)
  }
}

/** The value of an input that is no formula; the mark that makes a text of it is not part of it. */
function literal(input: CellInput | undefined): CellValue {
  if (input === undefined) return null
  if (typeof input !== 'string') return input
  if (input.startsWith('=')) return null
  return input.startsWith("'") ? input.slice(1) : input
}

function changesOf(packed: PackedChanges): ValueChanges {
  const { address, sheets } = packed
  return {
    sheets,
    visit: (sheet, visit) => {
      const index = sheets.indexOf(sheet)
      if (index < 0) return
      for (let i = 0; i < address.length; i += 3) {
        if (address[i] === index) visit(address[i + 1] ?? 0, address[i + 2] ?? 0)
      }
    },
  }
}

function touchedChanges(touched: readonly CellAddress[]): ValueChanges {
  return {
    sheets: [...new Set(touched.map((cell) => cell.sheet))],
    visit: (sheet, visit) => {
      for (const cell of touched) if (cell.sheet === sheet) visit(cell.row, cell.column)
    },
  }
}
