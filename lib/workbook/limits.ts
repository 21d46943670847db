/** Stated limits, checked before any work is done; each is named in the message that refuses. */
export const limits = {
  sheets: 60,
  rows: 100_000,
  columns: 256,
  cells: 200_000,
  formulaLength: 8_192,
  formulaDepth: 64,
  formulaArguments: 255,
  /** Operators in one formula: a longer chain overruns the stack of a formula parser. */
  formulaOperators: 500,
  textLength: 32_767,
  noteLength: 4_000,
  sheetNameLength: 31,
  nameLength: 64,
  cellsInOperation: 20_000,
  operationsInBatch: 200,
} as const
