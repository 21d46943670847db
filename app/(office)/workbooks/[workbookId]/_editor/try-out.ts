import { labelOf } from '@/lib/commands'
import type { CellValue, Operation } from '@/lib/workbook'
import type { Change } from '../_palette/palette-props'
import { tallyNames } from '../_tally/figures'
import type { WorkbookSession } from './session-contract'

/** What the figures of the tally would become; only those that would change. */
export async function tryOutTally(
  session: WorkbookSession,
  operations: readonly Operation[],
): Promise<readonly Change[]> {
  const { workbook } = session
  // In other units the same figure is another number.
  if (operations.some(({ kind }) => kind === 'convert-units')) return []
  const names = tallyNames.filter((name) => workbook.names.has(name))
  const after = await session.tryOut(operations, names)
  return names.flatMap((name): Change[] => {
    const named = workbook.names.get(name)
    if (!named) return []
    const before: CellValue = session.named(name)?.[0] ?? null
    const value: CellValue = after[name]?.[0] ?? null
    if (value === before) return []
    return [{ name, label: labelOf(named), quantity: named.quantity, before, after: value }]
  })
}
