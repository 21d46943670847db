import { type CommandContext, showValue } from '@/lib/commands'
import { formatQuantity, isMoney, isNumeric } from '@/lib/units'
import type { Change } from './palette-props'

/** "83,250 → 58,940 Btu/h". */
export function changeWords(context: CommandContext, { before, after, quantity }: Change): string {
  const to = showValue(context, after, quantity)
  if (typeof before !== 'number' || typeof after !== 'number' || !isNumeric(quantity)) {
    return `${showValue(context, before, quantity)} → ${to}`
  }
  const from = formatQuantity(before, quantity, context.system, { currency: currency(context), unit: false })
  return `${from} → ${to}`
}

/** "−24,310", "+$2,184", "same": without the unit, which the heading gives. */
export function differenceWords(context: CommandContext, change: Change | 'same' | undefined): string {
  if (change === 'same') return 'same'
  if (!change || typeof change.before !== 'number' || typeof change.after !== 'number') return '–'
  const difference = change.after - change.before
  const shown = formatQuantity(Math.abs(difference), change.quantity, context.system, {
    currency: currency(context),
    unit: false,
    ...(isMoney(change.quantity) ? { digits: 0 } : {}),
  })
  if (!/[1-9]/.test(shown)) return 'same'
  return `${difference < 0 ? '−' : '+'}${shown}`
}

/** Whether anything that a person would see differs. */
export function differs({ before, after }: Change): boolean {
  return JSON.stringify(before) !== JSON.stringify(after)
}

function currency(context: CommandContext): string {
  const value = context.named('currency')?.[0]
  return typeof value === 'string' ? value : ''
}
