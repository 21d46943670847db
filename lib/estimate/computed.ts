import type { UnitSystem } from '../units'
import {
  type CellValue,
  type Engine,
  isCellError,
  type StoredValues,
  ValueCache,
  type Workbook,
} from '../workbook'

/** The figures that the list of workbooks shows, in the workbook's own units; null while one cannot be computed. */
export interface TallyFigures {
  readonly system: UnitSystem
  readonly coveringArea: number | null
  readonly designHeatLoss: number | null
  readonly quotationTotal: number | null
  readonly currency: string | null
}

export interface Computed {
  readonly values: StoredValues
  readonly tally: TallyFigures
}

/** What is kept beside a workbook, so that it opens with values and is listed with figures. `engine` computes `workbook`. */
export function computed(workbook: Workbook, engine: Engine): Computed {
  const cache = new ValueCache()
  cache.applyPacked(engine.all())
  return {
    values: cache.toStored(),
    tally: {
      system: workbook.system,
      coveringArea: numberNamed(engine, 'covering_area'),
      designHeatLoss: numberNamed(engine, 'design_heat_loss'),
      quotationTotal: numberNamed(engine, 'quotation_total'),
      currency: textNamed(engine, 'currency') ?? null,
    },
  }
}

function numberNamed(engine: Engine, name: string): number | null {
  const value = firstNamed(engine, name)
  return typeof value === 'number' ? value : null
}

export function textNamed(engine: Engine, name: string): string | undefined {
  const value = firstNamed(engine, name)
  return typeof value === 'string' && value !== '' ? value : undefined
}

function firstNamed(engine: Engine, name: string): CellValue {
  const value = engine.named(name)?.[0] ?? null
  return isCellError(value) ? null : value
}
