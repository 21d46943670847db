import { type UnitSystem, workbookUnit } from '../units'
import { quantityOf, systemWords, type Workbook } from '../workbook'
import { all, mayChange } from './availability'
import type { Command } from './command'

const others: Readonly<Record<UnitSystem, readonly string[]>> = {
  us: ['imperial', 'us customary', 'feet', 'inches', 'fahrenheit', 'convert units', 'change units'],
  si: ['metric', 'si', 'metres', 'meters', 'celsius', 'convert units', 'change units'],
}

function convertTo(system: UnitSystem): Command {
  return {
    id: `convert-to-${system}`,
    title: `Convert to ${systemWords[system]}`,
    synonyms: others[system],
    group: 'Workbook',
    when: all(
      mayChange,
      (context) => context.system !== system || `This workbook is in ${systemWords[system]} already`,
    ),
    says: ({ workbook }) =>
      `Writes ${numbersOf(workbook)} numbers in ${systemWords[system]}, on every sheet, locked ones too. Formulas stay, results mean the same.`,
    run: () => ({
      kind: 'operations',
      label: `Convert to ${systemWords[system]}`,
      operations: [{ kind: 'convert-units', system }],
    }),
  }
}

/** Numbers of a kind that has a unit of its own in each system. */
function numbersOf(workbook: Workbook): number {
  let count = 0
  for (const sheet of workbook.sheets) {
    for (const row of sheet.rows) {
      row?.forEach((cell, column) => {
        if (typeof cell?.input !== 'number') return
        const quantity = quantityOf(cell, sheet, column)
        if (quantity && workbookUnit(quantity, 'us') !== workbookUnit(quantity, 'si')) count += 1
      })
    }
  }
  return count
}

export const convertCommands: readonly Command[] = [convertTo('si'), convertTo('us')]
