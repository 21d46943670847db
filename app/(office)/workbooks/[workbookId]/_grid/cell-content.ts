import type { TextCell, Theme } from '@glideapps/glide-data-grid'
import { formatQuantity, isMoney, type Quantity, type UnitSystem, unitOf } from '@/lib/units'
import {
  type Cell,
  type CellFormat,
  type CellValue,
  displayText,
  isCellError,
  isFormula,
  type Sheet,
} from '@/lib/workbook'
import { type Colours, mono } from './palette-colours'

/** What a cell's ground is for the eye: plain cells and computed ones have none. */
export type ShownGround = 'input' | 'computed' | 'table' | 'override' | 'label' | 'plain'

export interface Mark {
  readonly ground: ShownGround
  readonly note: boolean
}

export function groundOf(cell: Cell | undefined): ShownGround {
  if (cell?.ground) return cell.ground
  return isFormula(cell?.input) ? 'computed' : 'plain'
}

export function formatOf(sheet: Sheet, cell: Cell | undefined, column: number): CellFormat {
  const quantity = cell?.format?.quantity ?? sheet.columns[column]?.quantity
  return quantity === undefined ? (cell?.format ?? {}) : { ...cell?.format, quantity }
}

/** Numbers and errors stand at the right, words at the left. */
export function standsRight(value: CellValue): boolean {
  return typeof value === 'number' || isCellError(value)
}

/** Theme parts by ground and kind, made once for a set of colours: the grid merges them while it draws. */
export class CellThemes {
  private readonly made = new Map<string, Partial<Theme>>()

  constructor(private readonly colours: Colours) {}

  of(ground: ShownGround, value: CellValue, style: CellFormat['style']): Partial<Theme> | undefined {
    const error = isCellError(value)
    const number = typeof value === 'number' || error
    const key = `${ground} ${number} ${error} ${style ?? ''}`
    const known = this.made.get(key)
    if (known) return known
    const background = this.background(ground)
    const bold = style === 'total' || style === 'heading'
    const theme: Partial<Theme> = {
      ...(background ? { bgCell: background } : {}),
      ...(number ? { fontFamily: mono } : {}),
      ...(bold ? { baseFontStyle: '600 13px' } : {}),
      ...(error
        ? { textDark: this.colours.ember }
        : style === 'quiet'
          ? { textDark: this.colours.quiet }
          : {}),
    }
    this.made.set(key, theme)
    return theme
  }

  private background(ground: ShownGround): string | undefined {
    if (ground === 'input') return this.colours.straw
    if (ground === 'table') return this.colours.frost
    return ground === 'override' ? this.colours.override : undefined
  }
}

export interface CellSource {
  readonly sheet: Sheet
  readonly system: UnitSystem
  readonly currency: string | undefined
  readonly value: (row: number, column: number) => CellValue
}

/** The cell as the grid draws it and as a screen reader reads it. */
export function gridCell(
  source: CellSource,
  row: number,
  column: number,
  themes: CellThemes,
  readonly: boolean,
): TextCell {
  const cell = source.sheet.rows[row]?.[column]
  const value = source.value(row, column)
  const text = shownText(source, row, column)
  const theme = themes.of(groundOf(cell), value, cell?.format?.style)
  return {
    kind: 'text' as TextCell['kind'],
    data: text,
    displayData: text,
    // The sheet has an editor of its own, which keeps refused text and the first character typed.
    allowOverlay: false,
    readonly,
    contentAlign: standsRight(value) ? 'right' : 'left',
    ...(theme ? { themeOverride: theme } : {}),
  }
}

/** The value as its cell prints it; the unit is left to the column's heading, or to the cell beside it, where they say it. */
export function shownText(source: CellSource, row: number, column: number): string {
  const { sheet, system, currency } = source
  const format = formatOf(sheet, sheet.rows[row]?.[column], column)
  const value = source.value(row, column)
  const { quantity, digits } = format
  if (typeof value !== 'number' || quantity === undefined || !unitStandsBeside(source, row, column, format)) {
    return displayText(value, format, system, currency)
  }
  return formatQuantity(value, quantity, system, {
    unit: false,
    ...(digits === undefined ? {} : { digits }),
    ...(currency === undefined ? {} : { currency }),
  })
}

function unitStandsBeside(source: CellSource, row: number, column: number, format: CellFormat): boolean {
  const { quantity } = format
  if (quantity === undefined || quantity === 'angle') return false
  if (quantity === source.sheet.columns[column]?.quantity) return format.unit === undefined
  const beside = source.value(row, column + 1)
  return (
    typeof beside === 'string' &&
    beside === (format.unit ?? unitSymbol(quantity, source.system, source.currency))
  )
}

/** As it is printed beside a number or above a column; money has its sign at the number already. */
export function unitSymbol(quantity: Quantity, system: UnitSystem, currency: string | undefined): string {
  const { symbol } = unitOf(quantity, system, currency)
  return isMoney(quantity) && currency !== undefined ? symbol.slice(currency.length) : symbol
}
