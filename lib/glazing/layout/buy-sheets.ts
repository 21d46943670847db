import { type Result, succeed } from '../../failures'
import type { SolveIntegerProgram } from '../cutting/exact'
import { type CutSheet, cutSheets } from '../cutting/sheets'
import type { Surface } from '../geometry/surfaces'
import type { Covering } from './covering'
import type { CoveringLayout } from './lay-out-covering'
import { type BoughtSheet, type Offcut, pieceMark } from './layout'
import type { Plan } from './profiles'
import type { LayoutRules } from './rules'
import { type LaidPanel, sheetPiece } from './surface-layout'

export interface SheetPurchase {
  readonly sheets: readonly BoughtSheet[]
  readonly plan: Plan
}

export function buySheets(
  surfaces: readonly Surface[],
  { layouts, choice }: CoveringLayout,
  covering: Covering,
  marks: ReadonlyMap<Surface, string>,
  rules: LayoutRules,
  integerProgram?: SolveIntegerProgram,
): Result<SheetPurchase> {
  const panels = surfaces.flatMap((surface) =>
    (layouts.get(surface)?.panels ?? []).map((panel, i) => ({
      panel,
      mark: pieceMark(marks.get(surface) ?? '', i),
    })),
  )
  const what = `sheets of ${covering.code}`
  if (choice.sheets.length === 0) {
    const sheets = panels.map(({ panel, mark }) => toSize(panel, mark, covering))
    const cost = sheets.reduce((sum, sheet) => sum + sheet.price, 0)
    return succeed({ sheets, plan: { what, cost, bound: cost, proven: true } })
  }
  const plan = cutSheets(
    panels.map(({ panel, mark }) => sheetPiece(panel, mark)),
    choice.sheets,
    rules.sheetKerf,
    integerProgram,
  )
  if (!plan.ok) return plan
  const width = choice.sheets[0]?.width ?? 0
  const { cost, bound, proven } = plan.value
  return succeed({
    sheets: plan.value.sheets.map(
      (sheet): BoughtSheet => ({
        covering: covering.code,
        width,
        length: sheet.length,
        price: sheet.price,
        pieces: sheet.levels.flatMap((level) => level.pieces.map((piece) => piece.mark)),
        levels: sheet.levels,
        offcuts: offcutsOf(sheet, width, rules),
      }),
    ),
    plan: { what, cost, bound, proven },
  })
}

/** C14 Where no sheet is stocked, every piece is bought as its own rectangle, by area. */
function toSize({ size }: LaidPanel, mark: string, covering: Covering): BoughtSheet {
  const { width, length } = size
  const price = width * length * covering.areaPrice
  return { covering: covering.code, width, length, price, pieces: [mark], levels: [], offcuts: [] }
}

/** C15 Offcuts from a set length and width on are kept. */
function offcutsOf(sheet: CutSheet, width: number, rules: LayoutRules): Offcut[] {
  const beside = sheet.levels.map((level) => ({
    width: width - level.width - rules.sheetKerf,
    length: level.length,
  }))
  return [...beside, { width, length: sheet.offcut }]
    .filter((offcut) => Math.min(offcut.width, offcut.length) >= rules.smallestOffcut)
    .map((offcut) => ({
      ...offcut,
      kept: offcut.length >= rules.keptLength && offcut.width >= rules.keptWidth,
    }))
}
