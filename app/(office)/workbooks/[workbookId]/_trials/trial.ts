import type { Trial } from '@/lib/commands'
import type { CellValue } from '@/lib/workbook'

/** What a trial came to; figures by name. A figure is undefined where the workbook gives no number. */
export interface Outcome {
  readonly trial: Trial
  readonly price: number | undefined
  readonly heat: number | undefined
  readonly light: number | undefined
}

/** The figures that coverings are weighed by; the first of each that this workbook names. */
const candidates = {
  price: ['quotation_total'],
  heat: ['annual_heat_demand', 'annual_fuel_cost', 'design_heat_loss'],
  light: ['darkest_month_light', 'covering_light_transmittance'],
} as const

export type Aspect = keyof typeof candidates
export type TrialNames = Readonly<Record<Aspect, string | undefined>>

export function trialNames(has: (name: string) => boolean): TrialNames {
  const first = (aspect: Aspect) => candidates[aspect].find(has)
  return { price: first('price'), heat: first('heat'), light: first('light') }
}

export function outcomeOf(
  trial: Trial,
  names: TrialNames,
  values: Readonly<Record<string, readonly CellValue[]>>,
): Outcome {
  const read = (aspect: Aspect) => {
    const name = names[aspect]
    const value = name === undefined ? undefined : values[name]?.[0]
    return typeof value === 'number' ? value : undefined
  }
  return { trial, price: read('price'), heat: read('heat'), light: read('light') }
}

/** The cheapest first; what has no price comes last. */
export function byPrice(outcomes: readonly Outcome[]): Outcome[] {
  return [...outcomes].sort((a, b) => (a.price ?? Infinity) - (b.price ?? Infinity))
}
