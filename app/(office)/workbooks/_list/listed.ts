import { z } from 'zod'
import type { WorkbookListed } from '@/db/access/workbooks'
import { currencySign, formatQuantity, type Quantity, unitOf, unitSystems } from '@/lib/units'
import type { ListedFigure, ListedWorkbook } from './row'
import { changedWords, stateWord } from './words'

/** What the calculator stored; a workbook that was never computed has none. */
const tallySchema = z.object({
  system: z.enum(unitSystems),
  coveringArea: z.number().nullable(),
  designHeatLoss: z.number().nullable(),
  quotationTotal: z.number().nullable(),
  currency: z.string().nullable(),
})

/** A row of the database as the words and figures of a row of the list. */
export function listedWorkbook(workbook: WorkbookListed, now: Date): ListedWorkbook {
  return {
    id: workbook.id,
    title: workbook.title,
    state: stateWord(workbook.state),
    figures: figuresOf(workbook.tally),
    changed: changedWords(new Date(workbook.changed), now),
    changedAt: workbook.changed,
    madeBy: workbook.createdBy,
  }
}

function figuresOf(stored: unknown): readonly ListedFigure[] {
  const parsed = tallySchema.safeParse(stored)
  const tally = parsed.success ? parsed.data : undefined
  const figure = (label: string, value: number | null | undefined, quantity: Quantity): ListedFigure => {
    if (!tally || value === null || value === undefined) return { label }
    if (quantity === 'money') {
      const currency = tally.currency ?? ''
      const number = formatQuantity(value, 'money', tally.system, { currency })
      return currencySign(currency) === '' ? { label, number, unit: currency } : { label, number }
    }
    return {
      label,
      number: formatQuantity(value, quantity, tally.system, { unit: false, digits: 0 }),
      unit: unitOf(quantity, tally.system).symbol,
    }
  }
  return [
    figure('Covering area', tally?.coveringArea, 'area'),
    figure('Design heat loss', tally?.designHeatLoss, 'heat-rate'),
    figure('Quotation', tally?.quotationTotal, 'money'),
  ]
}
