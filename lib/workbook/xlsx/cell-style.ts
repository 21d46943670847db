import type { Fill, Style } from 'exceljs'
import { numberFormat, type Quantity, type UnitSystem } from '../../units'
import type { Cell, Ground } from '../model'

/** Grounds as on the screen in its light theme; a mark goes with the colour where the colour alone would tell it. */
const fills: Readonly<Partial<Record<Ground | 'header', string>>> = {
  input: 'FFFFF3CF',
  table: 'FFDDEAF0',
  override: 'FFF6D9C8',
  header: 'FFEFEAE0',
}

export interface CellLook {
  readonly style: Partial<Style>
  /** Characters that the unit, sign and decimals take beside the digits of a whole number. */
  readonly extraWidth: number
}

/** Looks are shared objects: the writer recognises a style that it has seen by identity. */
export type LookBook = (cell: Cell, column: Quantity | undefined, header: boolean, text: boolean) => CellLook

/**
 * `text` cells get no number format unless they read as a formula, which only the text format keeps from becoming one.
 * Input cells are unlocked, for whoever protects the sheet; protection itself is the sheet's.
 */
export function lookBook(system: UnitSystem, currency: string, sheetLocked: boolean): LookBook {
  const looks = new Map<string, CellLook>()
  return (cell, column, header, text) => {
    const { format, ground } = cell
    const quantity = format?.quantity ?? column
    const key = `${ground} ${header} ${text} ${quantity} ${format?.digits} ${format?.style} ${format?.unit}`
    let look = looks.get(key)
    if (!look) {
      const code = text || header ? undefined : formatCode(cell, quantity, system, currency)
      look = { style: makeStyle(cell, code, header, sheetLocked), extraWidth: extraWidth(code) }
      looks.set(key, look)
    }
    return look
  }
}

/** A text that must not turn into a formula when it is edited. */
export function asTextStyle(style: Partial<Style>): Partial<Style> {
  return { ...style, numFmt: '@' }
}

function formatCode(cell: Cell, quantity: Quantity | undefined, system: UnitSystem, currency: string) {
  const { digits, unit } = cell.format ?? {}
  if (quantity === 'text' || quantity === 'boolean') return undefined
  if (quantity === undefined && digits === undefined && unit === undefined) return undefined
  return numberFormat(quantity ?? 'number', system, currency, digits, unit)
}

function makeStyle(
  cell: Cell,
  code: string | undefined,
  header: boolean,
  sheetLocked: boolean,
): Partial<Style> {
  const fill = header ? fills.header : cell.ground && fills[cell.ground]
  const style = cell.format?.style
  const bold = header || style === 'heading' || style === 'total'
  const font = {
    name: 'Calibri',
    size: style === 'heading' ? 12 : 11,
    ...(bold ? { bold } : {}),
    ...(cell.ground === 'override' ? { italic: true } : {}),
    ...(style === 'quiet' ? { color: { argb: 'FF5F6B73' } } : {}),
  }
  return {
    ...(code && code !== 'General' ? { numFmt: code } : {}),
    ...(fill ? { fill: solid(fill) } : {}),
    ...(bold || font.italic || font.color ? { font } : {}),
    ...(header ? { alignment: { wrapText: true, vertical: 'bottom' } } : {}),
    ...(header ? { border: { bottom: { style: 'thin' } } } : {}),
    ...(style === 'total' ? { border: { top: { style: 'thin' } } } : {}),
    ...(cell.ground === 'input' && !sheetLocked ? { protection: { locked: false } } : {}),
  }
}

function solid(argb: string): Fill {
  return { type: 'pattern', pattern: 'solid', fgColor: { argb } }
}

function extraWidth(code: string | undefined): number {
  if (code === undefined) return 0
  const unit = /"([^"]*)"$/.exec(code)?.[1]?.length ?? 0
  const currency = /^\[\$([^\]-]*)/.exec(code)?.[1]?.length ?? 0
  const decimals = /0(\.[0#]+)/.exec(code)?.[1]?.length ?? 0
  return unit + currency + decimals + (code.includes('%') ? 3 : 0) + (code.includes('E+') ? 4 : 0)
}
