import type { Quantity } from '../units'
import type { Choices, GridRow, Limits, Severity, SheetDeclaration, Stated } from './declare'
import { frame } from './sheets/frame'
import { heat } from './sheets/heat'
import { job } from './sheets/job'
import { light } from './sheets/light'
import { openings } from './sheets/openings'
import { options } from './sheets/options'
import { price } from './sheets/price'
import { site } from './sheets/site'
import { sun } from './sheets/sun'
import { surfaces } from './sheets/surfaces'
import { takeOff } from './sheets/take-off'
import { weather } from './sheets/weather'
import { allowableLoads } from './tables/allowable-loads'
import { coverings } from './tables/coverings'
import { freight, longLoads } from './tables/freight'
import { fuels } from './tables/fuels'
import { heaters } from './tables/heaters'
import { crops, tightness } from './tables/reference'
import { sheetsInStock } from './tables/sheets-in-stock'
import { sites } from './tables/sites'
import { fixings, labour, profiles } from './tables/supplies'

/** The steps in the order of the work. */
export const steps = (given: readonly GridRow[] = []): readonly SheetDeclaration[] => [
  job,
  site,
  frame,
  surfaces,
  openings(given),
  takeOff,
  sun,
  heat,
  light,
  weather,
  options,
  price,
]

/** The tables that the steps look things up in. */
export const tables: readonly SheetDeclaration[] = [
  coverings,
  sheetsInStock,
  profiles,
  fixings,
  labour,
  fuels,
  heaters,
  crops,
  sites,
  tightness,
  freight,
  longLoads,
  allowableLoads,
]

/** What is known of an input before there is a workbook. */
export interface TemplateInput {
  readonly name: string
  readonly label: string
  readonly quantity: Quantity
  readonly sheet: string
  /** 1, or 12 for a value a month. */
  readonly count: number
  readonly default?: Stated
  readonly limits?: Limits
  readonly choices?: Choices
  readonly source: string
  readonly note?: string
}

function inputsOf(sheet: SheetDeclaration): TemplateInput[] {
  return sheet.blocks.flatMap((block): TemplateInput[] => {
    if (block.kind === 'lines') {
      return block.lines.flatMap((line): TemplateInput[] => {
        if (line.kind !== 'input') return []
        const { kind, value, unit, digits, ...rest } = line
        return [{ ...rest, sheet: sheet.id, count: 1, ...(value === undefined ? {} : { default: value }) }]
      })
    }
    return block.columns.flatMap((column): TemplateInput[] => {
      if (column.named?.role !== 'input') return []
      const { name, label, limits } = column.named
      return [
        {
          name,
          label,
          quantity: column.quantity,
          sheet: sheet.id,
          count: block.rows.length,
          ...(limits ? { limits } : {}),
          source: 'a row of the sheet each',
        },
      ]
    })
  })
}

/** Every value that can be set by name, in the order of the sheets. */
export const templateInputs: readonly TemplateInput[] = steps().flatMap(inputsOf)

/** Checks of the workbook: which named cell says it, what it is about, how grave it is. */
export interface TemplateCheck {
  readonly name: string
  readonly about: string
  readonly severity: Severity
}

export const templateChecks: readonly TemplateCheck[] = steps().flatMap((sheet) =>
  sheet.blocks.flatMap((block) =>
    block.kind === 'lines'
      ? block.lines.flatMap((line) =>
          line.kind === 'check' ? [{ name: line.name, about: line.about, severity: line.severity }] : [],
        )
      : [],
  ),
)

/** Names of single lines, whose unit stands beside them. */
export const lineNames: ReadonlySet<string> = new Set(
  steps().flatMap((sheet) =>
    sheet.blocks.flatMap((block) =>
      block.kind === 'lines'
        ? block.lines.flatMap((line) => (line.kind === 'heading' ? [] : [line.name]))
        : [],
    ),
  ),
)
