import { describe, expect, it } from 'vitest'
import { type Cell, fromJson, type NamedValue, type Workbook } from '../../../../lib/workbook'
import { sayFormula } from '../../../../lib/workbook/words/say'

const heading = (input: string): Cell => ({ input, format: { style: 'heading' } })

const workbook: Workbook = fromJson({
  version: 1,
  system: 'us',
  sheets: [
    {
      id: 'surfaces',
      name: 'Surfaces',
      kind: 'step',
      rowCount: 10,
      columns: [{}, {}, {}, {}],
      cells: [
        [0, 0, heading('Surface')],
        [0, 1, heading('Net area')],
        [0, 2, heading('U-value')],
        [0, 3, heading('Conductance')],
        [1, 0, { input: 'South roof' }],
        [2, 0, { input: 'North roof' }],
        [3, 0, { input: 'All surfaces' }],
      ],
    },
    {
      id: 'heat',
      name: 'Heat',
      kind: 'step',
      rowCount: 10,
      columns: [{}, {}],
      cells: [
        [0, 0, heading('Item')],
        [0, 1, heading('Value')],
        [1, 0, { input: 'Air changes' }],
        [2, 0, { input: 'Conduction' }],
      ],
    },
  ],
  names: [
    named('roof_area', 'Roof area', 'surfaces', 7, 1),
    named('roof_covering', 'Roof covering', 'heat', 5, 1),
    named('conduction_loss', 'Conduction', 'heat', 2, 1),
  ],
})

function named(name: string, label: string, sheet: string, row: number, column: number): NamedValue {
  const area = { sheet, row, column, rowCount: 1, columnCount: 1 }
  return { name, label, area, quantity: 'number', role: 'result' }
}

const at = { sheet: 'surfaces', row: 1, column: 3 }

describe('formula in words', () => {
  it.each([
    ['=B2*C2', 'net area × U-value'],
    ['=B3*C2', 'net area of North roof × U-value'],
    ['=SUM(D2:D3)', 'sum of conductance from South roof to North roof'],
    ['=roof_area/2', 'roof area ÷ 2'],
    ['=(B2+B3)*C2', '(net area + net area of North roof) × U-value'],
    ['=B2-(B3-C2)', 'net area − (net area of North roof − U-value)'],
    ['=B2+(B3+C2)', 'net area + net area of North roof + U-value'],
    ['=Heat!B2', 'air changes on Heat'],
    ['=Heat!B3*2', 'conduction × 2'],
    ['=B2^2', 'net area²'],
    ['=-B2', '−net area'],
    ['=B2*5%', 'net area × 5 %'],
    [
      '=VLOOKUP(roof_covering,coverings,MATCH("resistance",coverings_columns,0),0)',
      'resistance of roof covering in Coverings',
    ],
    ['=IF(B2>=10,B2,0)', 'if net area is at least 10 then net area, otherwise 0'],
    ['=ROUNDUP(ROUND(B2/C2,9),0)', 'net area ÷ U-value, rounded up to a whole number'],
    ['=ROUND(B2*C2,2)', 'net area × U-value, rounded to 2 places'],
    ['=2*SQRT(B2)', '2 × (the square root of net area)'],
    ['=PI()*B2', 'π × net area'],
    [
      '=SUMIFS(D2:D3,A2:A3,"roof")',
      'sum of conductance from South roof to North roof where surface from South roof to North roof is “roof”',
    ],
    ['=MAX(0,B2)', 'the greatest of 0 and net area'],
    ['=some_other_name+1', 'some other name + 1'],
    ['=Gone!A1', 'a sheet that is not there'],
    ['=#REF!+1', 'a broken reference + 1'],
    ['=UNHEARD(B2)', 'UNHEARD of net area'],
  ])('[F1] %s is said as: %s', (formula, words) => {
    expect(sayFormula(workbook, at, formula)).toBe(words)
  })

  it.each(['=', '=1+', '=(1', '=SUM(1', '=1)', '={1,2}', '=1 2'])('[F2] %s is not said', (formula) => {
    expect(sayFormula(workbook, at, formula)).toBeUndefined()
  })
})
