import type { Sheet } from '../model'

const usualPixels = 96
/** Screen pixels of one digit and of a cell's padding, in the usual font at 100 % (ECMA-376 part 1, 18.3.1.13). */
const digitPixels = 7
const paddingPixels = 5
const widest = 60

/** Widths in characters. */
export function columnWidths(sheet: Sheet): number[] {
  return sheet.columns.map((column) => pixelsToCharacters(column.width ?? usualPixels))
}

export function pixelsToCharacters(pixels: number): number {
  return Math.max(1, Math.round(((pixels - paddingPixels) / digitPixels) * 100) / 100)
}

/** Widens a column so that a number of this size is not shown as hashes; texts may run over. */
export function widenFor(widths: number[], column: number, value: number, extra: number): void {
  const whole = Math.abs(value) < 1e15 ? Math.max(1, Math.floor(Math.log10(Math.abs(value) + 1)) + 1) : 12
  const needed = Math.min(widest, whole + Math.floor((whole - 1) / 3) + (value < 0 ? 1 : 0) + extra + 1)
  const width = widths[column]
  if (width !== undefined && width < needed) widths[column] = needed
}
