import { formatQuantity, isMoney, unitOf } from '@/lib/units'
import { type CellValue, isCellError, type NamedValue, type Workbook } from '@/lib/workbook'

/** A named value that decides the job; `better` says which way is good news, so that a change can say so. */
interface Figure {
  readonly name: string
  readonly label: string
  readonly better?: 'lower' | 'higher'
  /** Which of twelve monthly values stands for the year. */
  readonly month?: number
}

const december = 11

const figures: readonly Figure[] = [
  { name: 'covering_area', label: 'Covering area' },
  { name: 'design_heat_loss', label: 'Design heat loss', better: 'lower' },
  { name: 'annual_fuel_cost', label: 'Fuel a year', better: 'lower' },
  { name: 'covering_light_transmittance', label: 'Light let through', better: 'higher' },
  { name: 'daily_light_integral', label: 'December light', better: 'higher', month: december },
  { name: 'quotation_total', label: 'Quotation', better: 'lower' },
  { name: 'markup_rate', label: 'Markup' },
]

export type ReadNamed = (name: string) => readonly CellValue[] | undefined

export interface Reading {
  readonly name: string
  readonly label: string
  /** Undefined while there is no number: not computed yet, or an error. */
  readonly value: number | undefined
  readonly text: string
  readonly unit: string
  readonly error?: string
}

export interface Difference {
  readonly direction: 'up' | 'down'
  readonly text: string
  readonly news: 'good' | 'bad' | 'plain'
}

/** The figures whose names this workbook has, in reading order. */
export function readTally(workbook: Workbook, read: ReadNamed): Reading[] {
  const currency = currencyOf(read)
  return figures.flatMap((figure) => {
    const named = workbook.names.get(figure.name)
    return named ? [reading(figure, named, workbook, read, currency)] : []
  })
}

function reading(
  figure: Figure,
  named: NamedValue,
  workbook: Workbook,
  read: ReadNamed,
  currency: string | undefined,
): Reading {
  const value = read(figure.name)?.[figure.month ?? 0] ?? null
  const { name, label } = figure
  if (isCellError(value)) return { name, label, value: undefined, text: '—', unit: '', error: value.text }
  if (typeof value !== 'number') return { name, label, value: undefined, text: '—', unit: '' }
  return { name, label, value, ...split(value, named, workbook, currency) }
}

/** Number and unit apart, since the unit is set smaller. */
function split(value: number, named: NamedValue, workbook: Workbook, currency: string | undefined) {
  const { quantity } = named
  const options = currency === undefined ? {} : { currency }
  const digits = digitsShown(value, named)
  const text = formatQuantity(value, quantity, workbook.system, {
    ...options,
    ...(digits === undefined ? {} : { digits }),
    unit: false,
  })
  if (quantity === 'ratio') return { text: text.replace(/%$/, ''), unit: '%' }
  if (quantity === 'money') return { text, unit: '' }
  const unit = isMoney(quantity) ? '' : unitOf(quantity, workbook.system).symbol
  return { text, unit }
}

/** Money over a thousand is read without cents here; the sheet keeps them. */
function digitsShown(value: number, named: NamedValue): number | undefined {
  if (named.quantity === 'money') return Math.abs(value) >= 1000 ? 0 : undefined
  return named.quantity === 'ratio' ? 1 : undefined
}

export function currencyOf(read: ReadNamed): string | undefined {
  const [currency] = read('currency') ?? []
  return typeof currency === 'string' && /^[A-Z]{3}$/.test(currency) ? currency : undefined
}

/** What an edit did to each figure, by name; figures that it left alone are absent. */
export function differences(
  before: readonly Reading[],
  after: readonly Reading[],
  workbook: Workbook,
  read: ReadNamed,
): Map<string, Difference> {
  const found = new Map<string, Difference>()
  const currency = currencyOf(read)
  for (const now of after) {
    const then = before.find((reading) => reading.name === now.name)
    const named = workbook.names.get(now.name)
    if (then?.value === undefined || now.value === undefined || !named || then.value === now.value) continue
    const by = now.value - then.value
    const { text, unit } = split(Math.abs(by), named, workbook, currency)
    if (!/[1-9]/.test(text)) continue
    found.set(now.name, {
      direction: by > 0 ? 'up' : 'down',
      text: named.quantity === 'ratio' ? `${text} ${unit}` : text,
      news: newsOf(now.name, by),
    })
  }
  return found
}

function newsOf(name: string, by: number): Difference['news'] {
  const better = figures.find((figure) => figure.name === name)?.better
  if (!better) return 'plain'
  return by < 0 === (better === 'lower') ? 'good' : 'bad'
}

/** One sentence for people who do not see the figures move. */
export function summary(readings: readonly Reading[], changed: ReadonlyMap<string, Difference>): string {
  const parts = readings.flatMap((reading) => {
    const difference = changed.get(reading.name)
    if (!difference) return []
    const unit = reading.unit === '' ? '' : ` ${reading.unit}`
    return [`${reading.label} ${difference.direction} ${difference.text} to ${reading.text}${unit}`]
  })
  return parts.join('; ')
}

/** Names of single figures, for asking what would become of them. */
export const tallyNames: readonly string[] = figures
  .filter(({ month }) => month === undefined)
  .map(({ name }) => name)
