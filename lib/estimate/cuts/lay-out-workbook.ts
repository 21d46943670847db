import type { Result } from '../../failures'
import { type Layout, layOutHouse, type SolveIntegerProgram } from '../../glazing'
import type { Engine, Workbook } from '../../workbook'
import { readHouse } from './read-house'

/** The layout of a computed workbook's house. Errors: those of reading it and of `layOutHouse`. */
export function layOutWorkbook(
  workbook: Workbook,
  engine: Engine,
  integerProgram?: SolveIntegerProgram,
): Result<Layout> {
  const house = readHouse(workbook, engine)
  return house.ok ? layOutHouse(house.value, integerProgram) : house
}
