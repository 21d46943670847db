import {
  area,
  check,
  computed,
  type GridRow,
  grid,
  heading,
  input,
  lines,
  lookUp,
  type SheetDeclaration,
} from '../declare'
import { surfaceNames } from './surfaces'

const labour = (code: string, column: string): string => lookUp('labour', `"${code}"`, column)

const sheetLine = (surface: string): GridRow => ({
  Group: 'materials',
  Line: `Sheets, ${surface.toLowerCase()}`,
  Quantity: '={bought_quantity}',
  Unit: '={bought_unit}',
  'Unit price': '={sheet_prices}',
})

/** Prices differ from surface to surface: the line shows their mean, and bills what they come to. */
const mixedLine = (line: string, unit: string, total: string, needed: string, prices: string): GridRow => ({
  Group: 'materials',
  Line: line,
  Quantity: `=${total}`,
  Unit: unit,
  'Unit price': { value: `=IF([Quantity]=0,0,SUMPRODUCT(${needed},${prices})/[Quantity])` },
  Amount: `=ROUND(SUMPRODUCT(${needed},${prices}),2)`,
})
const lengthUnit = '=IF(unit_system="us","ft","m")'

const workLine = (line: string, code: string, quantity: string): GridRow => ({
  Group: 'labour',
  Line: line,
  Quantity: `=${quantity}/${labour(code, 'output an hour')}`,
  Unit: 'h',
  'Unit price': `=${labour(code, 'rate')}`,
})

/**
 * P1 Every line is rounded to the cent where it is billed; totals are sums of rounded lines.
 * P2 Markup is on cost; the margin that it means is shown beside it. Tax is on the marked-up total.
 */
export const price: SheetDeclaration = {
  id: 'price',
  name: 'Price',
  kind: 'step',
  about: 'From what is bought, fixed and carried to the quotation total.',
  blocks: [
    grid({
      columns: [
        { title: 'Line', quantity: 'text', ground: 'label', width: 230 },
        {
          title: 'Group',
          quantity: 'text',
          ground: 'label',
          choices: ['materials', 'labour', 'freight'],
          width: 130,
          named: area('price_group', 'groups of the price lines'),
        },
        { title: 'Quantity', quantity: 'number', digits: 2 },
        { title: 'Unit', quantity: 'text', ground: 'label' },
        { title: 'Unit price', quantity: 'money', ground: 'table' },
        {
          title: 'Amount',
          quantity: 'money',
          formula: '=ROUND([Quantity]*[Unit price],2)',
          named: area('price_amount', 'amounts of the price lines'),
        },
      ],
      rows: [
        ...surfaceNames.map(sheetLine),
        mixedLine('Joint profiles', lengthUnit, 'joint_length', 'needed_joints', 'joint_prices'),
        mixedLine('End profiles', lengthUnit, 'end_profile_length', 'needed_ends', 'end_prices'),
        mixedLine('Fixings', 'each', 'fixing_count', 'needed_fixings', 'fixing_prices'),
        workLine('Set out and clear up', 'SITE', '1'),
        workLine('Fix the covering', 'COVER', 'sheet_area_needed'),
        workLine('Fix profiles', 'PROFILE', '(joint_length+end_profile_length)'),
        workLine('Frame and seal openings', 'OPENING', 'SUM(opening_count)'),
        {
          Group: 'freight',
          Line: 'Carriage by weight',
          Quantity: '=sheet_weight',
          Unit: '=IF(unit_system="us","lb","kg")',
          'Unit price': { value: '=freight_rate', ground: 'label' },
        },
        {
          Group: 'freight',
          Line: 'Carriage, fixed charge',
          Quantity: 1,
          Unit: 'each',
          'Unit price': { value: '=freight_charge', ground: 'label' },
        },
        {
          Group: 'freight',
          Line: 'Carriage, long sheets',
          Quantity: 1,
          Unit: 'each',
          'Unit price': { value: '=long_load_charge', ground: 'label' },
        },
      ],
      closing: 'Rows for more lines go above this line',
    }),
    lines(
      heading('Rates'),
      input({
        name: 'freight_zone',
        label: 'Carriage to',
        quantity: 'text',
        value: 'REGION',
        choices: 'freight',
        source: 'estimator’s choice',
      }),
      input({
        name: 'freight_rate',
        label: 'Carriage by weight',
        quantity: 'money-per-mass',
        value: `=${lookUp('freight', 'freight_zone', 'rate')}`,
        limits: { min: 0, max: 1e6 },
        source: 'Freight, unless typed here',
      }),
      input({
        name: 'freight_charge',
        label: 'Carriage, fixed charge',
        quantity: 'money',
        value: `=${lookUp('freight', 'freight_zone', 'charge')}`,
        limits: { min: 0, max: 1e9 },
        source: 'Freight, unless typed here',
      }),
      computed({
        name: 'longest_carried',
        label: 'Longest sheet that is carried',
        quantity: 'length',
        formula: '=MAX(carried_length)',
        source: 'Take-off; film goes in rolls',
      }),
      computed({
        name: 'long_load_charge',
        label: 'Carriage of long sheets',
        quantity: 'money',
        formula:
          '=IF(freight_zone="COLLECTED",0,SUMIFS(long_load_adds,long_load_over,"<"&ROUND(longest_carried*(1-0.000000001),6)))',
        source: 'Long loads',
      }),
      input({
        name: 'contingency_rate',
        label: 'Contingency',
        quantity: 'ratio',
        value: 0.05,
        limits: { min: 0, max: 1 },
        source: 'firm’s own',
      }),
      input({
        name: 'markup_rate',
        label: 'Markup',
        quantity: 'ratio',
        value: 0.3,
        limits: { min: 0, max: 10 },
        source: 'firm’s own',
        note: 'On cost.',
      }),
      input({
        name: 'tax_rate',
        label: 'Tax',
        quantity: 'ratio',
        value: 0.07,
        limits: { min: 0, max: 1 },
        source: 'invented (demo)',
      }),
      input({
        name: 'deposit_rate',
        label: 'Deposit',
        quantity: 'ratio',
        value: 0.4,
        limits: { min: 0, max: 1 },
        source: 'firm’s own',
      }),
      input({
        name: 'rounding_step',
        label: 'Total rounded to',
        quantity: 'money',
        value: 0.01,
        limits: { min: 0.01, max: 1e6 },
        source: 'firm’s own',
        note: '0.01 leaves it as it is; 1, 5 or 10 make a round total.',
      }),
      heading('Quotation'),
      computed({
        name: 'materials_cost',
        label: 'Materials',
        quantity: 'money',
        formula: '=SUMIFS(price_amount,price_group,"materials")',
        source: 'lines above',
      }),
      computed({
        name: 'labour_cost',
        label: 'Labour',
        quantity: 'money',
        formula: '=SUMIFS(price_amount,price_group,"labour")',
        source: 'lines above',
      }),
      computed({
        name: 'freight_cost',
        label: 'Freight',
        quantity: 'money',
        formula: '=SUMIFS(price_amount,price_group,"freight")',
        source: 'lines above',
      }),
      computed({
        name: 'contingency_cost',
        label: 'Contingency',
        quantity: 'money',
        formula: '=ROUND((materials_cost+labour_cost+freight_cost)*contingency_rate,2)',
        source: 'firm’s own',
      }),
      computed({
        name: 'total_cost',
        label: 'Cost',
        quantity: 'money',
        formula: '=materials_cost+labour_cost+freight_cost+contingency_cost',
        source: 'sum',
        total: true,
      }),
      computed({
        name: 'markup_amount',
        label: 'Markup',
        quantity: 'money',
        formula: '=ROUND(total_cost*markup_rate,2)',
        source: 'firm’s own',
      }),
      computed({
        name: 'margin_rate',
        label: 'Margin',
        quantity: 'ratio',
        formula: '=IF(total_cost+markup_amount=0,0,markup_amount/(total_cost+markup_amount))',
        source: 'definition',
        note: 'Markup as a part of the price before tax.',
      }),
      computed({
        name: 'tax_amount',
        label: 'Tax',
        quantity: 'money',
        formula: '=ROUND((total_cost+markup_amount)*tax_rate,2)',
        source: 'local law; invented rate (demo)',
      }),
      computed({
        name: 'rounding_amount',
        label: 'Rounding',
        quantity: 'money',
        formula:
          '=ROUND(ROUND((total_cost+markup_amount+tax_amount)/rounding_step,0)*rounding_step-(total_cost+markup_amount+tax_amount),2)',
        source: 'to the nearest step',
      }),
      computed({
        name: 'quotation_total',
        label: 'Quotation total',
        quantity: 'money',
        formula: '=total_cost+markup_amount+tax_amount+rounding_amount',
        source: 'sum of rounded lines',
        total: true,
      }),
      computed({
        name: 'deposit_amount',
        label: 'Deposit',
        quantity: 'money',
        formula: '=ROUND(quotation_total*deposit_rate,2)',
        source: 'firm’s own',
      }),
      check({
        name: 'price_check',
        label: 'Prices of the coverings',
        about: 'roof_covering',
        severity: 'warning',
        formula:
          '=IF(COUNTIFS(sheet_prices,0,needed_area,">0")>0,"A covering that is used has no price in its table","in order")',
        source: 'Coverings, Sheets in stock',
      }),
    ),
  ],
}
