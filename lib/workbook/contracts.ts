import type { CellValue } from './model'
import type { Operation } from './operations'

/** A cell by sheet id and indexes from 0. */
export interface CellAddress {
  readonly sheet: string
  readonly row: number
  readonly column: number
}

/**
 * Computed values that changed, packed so that they cross from the worker as transferred arrays.
 * Entry `i` is the cell (`sheets[address[3i]]`, `address[3i+1]`, `address[3i+2]`); `type[i]` says where its value is:
 * 0 blank, 1 number (`numbers[i]`), 2 text (`texts[numbers[i]]`), 3 boolean (`numbers[i]` 0 or 1), 4 error (`errors[numbers[i]]`).
 */
export interface PackedChanges {
  readonly sheets: readonly string[]
  readonly address: Uint32Array
  readonly type: Uint8Array
  readonly numbers: Float64Array
  readonly texts: readonly string[]
  readonly errors: readonly { readonly error: string; readonly text: string }[]
}

/** What applying an operation did, so that caches and the engine can follow without comparing workbooks. */
export interface Applied {
  /** Applied in order, these restore the workbook exactly. */
  readonly inverse: readonly Operation[]
  /** Cells whose input changed (formulas rewritten by a structural change among them), by their new address. */
  readonly touched: readonly CellAddress[]
}

/** The computing half of a workbook. Holds its own mirror; feed it the same operations in the same order. */
export interface Engine {
  /** Applies operations to the mirror and recomputes. Never throws for what a person typed. */
  apply(operations: readonly Operation[]): PackedChanges
  /** Every value, as when just opened. */
  all(): PackedChanges
  value(address: CellAddress): CellValue
  /** Values of a named area, row-major; undefined when there is no such name. */
  named(name: string): readonly CellValue[] | undefined
  /** What the named values would be if `operations` were applied; nothing stays changed. */
  tryOut(operations: readonly Operation[], names: readonly string[]): Record<string, readonly CellValue[]>
  /**
   * The same for the next of many: the last one tried is taken back in the same calculation, and this one stays in until the
   * next call of any kind, so that trying many computes once for each.
   */
  tryNext(operations: readonly Operation[], names: readonly string[]): Record<string, readonly CellValue[]>
  destroy(): void
}
