import {
  area,
  computed,
  type GridColumn,
  type GridRow,
  grid,
  heading,
  input,
  lines,
  lookUp,
  type SheetDeclaration,
} from '../declare'
import {
  balanceColumns,
  balanceRows,
  compared,
  gainColumns,
  gainRows,
  optionName,
  own,
} from './options-months'

const handbook = 'NIST Handbook 135'
const of = (column: string): string => lookUp('coverings', '[Covering]', column)

const optionColumns: readonly GridColumn[] = [
  { title: 'Option', quantity: 'text', ground: 'label', width: 230 },
  {
    title: 'Covering',
    quantity: 'text',
    ground: 'input',
    choices: 'coverings',
    width: 140,
    named: area('option_covering', 'roof coverings side by side'),
  },
  { title: 'Resistance', quantity: 'thermal-resistance', ground: 'table', formula: `=${of('resistance')}` },
  {
    title: 'Direct light',
    quantity: 'ratio',
    ground: 'table',
    formula: `=${of('light transmittance')}`,
    named: area('option_direct', 'direct light through each option'),
  },
  {
    title: 'Diffuse light',
    quantity: 'ratio',
    ground: 'table',
    formula: `=${of('diffuse light transmittance')}`,
    named: area('option_diffuse', 'diffuse light through each option'),
  },
  { title: 'Life', quantity: 'years', ground: 'table', formula: `=${of('life')}` },
  {
    title: 'First cost',
    quantity: 'money',
    formula: `=roof_sheet_area*((1+waste_allowance)*${of('price')}+labour_by_area)`,
    source: 'sheets with waste, and fixing them',
    named: area('option_first_cost', 'first cost of each option'),
  },
  {
    title: 'Loss by night',
    quantity: 'conductance',
    formula:
      '=night_loss_coefficient-roof_conductance+roof_screened_area/([Resistance]+screen_resistance)+(roof_net_area-roof_screened_area)/[Resistance]',
    named: area('option_night', 'loss by night of each option'),
  },
  {
    title: 'Loss by day',
    quantity: 'conductance',
    formula: '=day_loss_coefficient-roof_day_conductance+roof_net_area/[Resistance]',
    named: area('option_day', 'loss by day of each option'),
  },
  {
    title: 'Exponent',
    quantity: 'number',
    formula: '=utilisation_start+thermal_mass_capacity*hours_of_capacity/([Loss by night]*utilisation_time)',
    source: 'ISO 13790, monthly method',
    named: area('option_exponent', 'exponent of each option'),
  },
  {
    title: 'Heat a year',
    quantity: 'energy',
    formula: '=SUMIFS(option_month_heat,option_month_option,[Option])',
    named: area('option_heat', 'heat of each option, a year'),
  },
  {
    title: 'Fuel a year',
    quantity: 'money',
    formula: '=[Heat a year]/(fuel_heating_value*heater_efficiency)*fuel_price',
    named: area('option_fuel', 'fuel of each option, a year'),
  },
  {
    title: 'Winter light',
    quantity: 'daily-light',
    digits: 1,
    formula: '=MIN(outside_daily_light)*[Direct light]*frame_light_factor*dirt_light_factor',
    named: area('option_light', 'light of each option in the darkest month'),
  },
  {
    title: 'Times renewed',
    quantity: 'count',
    formula: '=IF([Life]=0,0,MAX(0,ROUNDUP(ROUND(study_years/[Life],9),0)-1))',
  },
  {
    title: 'Renewals today',
    quantity: 'money',
    formula:
      '=[First cost]*IF(discount_rate<0.0000001,[Times renewed],(1-(1+discount_rate)^-([Times renewed]*[Life]))/((1+discount_rate)^[Life]-1))',
    source: `${handbook}: present value of each renewal`,
    named: area('option_renewals', 'renewals of each option, today'),
  },
  {
    title: 'Heat today',
    quantity: 'money',
    formula: '=[Fuel a year]*fuel_present_factor',
    source: `${handbook}: UPV*`,
  },
  {
    title: 'Upkeep a year',
    quantity: 'money',
    ground: 'input',
    source: 'washing, patching, tightening; 0 unless typed',
    named: area('option_upkeep', 'upkeep of each option, a year'),
  },
  {
    title: 'Left at the end',
    quantity: 'money',
    ground: 'input',
    source: 'what the covering is worth after the years looked at; 0 unless typed',
    named: area('option_left', 'what is left of each option at the end'),
  },
  {
    title: 'Life-cycle cost',
    quantity: 'money',
    formula:
      '=[First cost]+[Renewals today]+[Heat today]+[Upkeep a year]*upkeep_present_factor-[Left at the end]*end_present_factor',
    source: handbook,
    named: area('option_life_cycle', 'life-cycle cost of each option'),
  },
  {
    title: 'Payback',
    quantity: 'years',
    digits: 1,
    formula:
      '=IF([First cost]<={option_first_cost:0},0,IF({option_fuel:0}-[Fuel a year]<0.01,"never",([First cost]-{option_first_cost:0})/({option_fuel:0}-[Fuel a year])))',
    source: 'extra first cost over yearly saving, against the first row; a saving under a cent is none',
    named: area('option_payback', 'payback of each option'),
  },
]

const optionRows: readonly GridRow[] = [...compared, '=roof_covering'].map((code, row) => ({
  Option: optionName(row),
  Covering: row === own ? { value: code, ground: 'label' } : code,
  'Upkeep a year': 0,
  'Left at the end': 0,
}))

const roofSum = (of: string, more = ''): string => `=SUMIFS(${of},surface_part,"roof"${more})`

/** P4 Every option covers the same roof; walls stay as they are. Money of later years is worth less by the discount rate. */
export const options: SheetDeclaration = {
  id: 'options',
  name: 'Options',
  kind: 'step',
  about:
    'Roof coverings side by side on the same house: first cost, heat, light, and what they cost over the years.',
  blocks: [
    lines(
      input({
        name: 'study_years',
        label: 'Years looked at',
        quantity: 'years',
        value: 20,
        limits: { min: 1, max: 100, whole: true },
        source: handbook,
      }),
      input({
        name: 'discount_rate',
        label: 'Discount rate',
        quantity: 'ratio',
        value: 0.03,
        limits: { min: 0, max: 1 },
        source: `${handbook}; invented rate (demo)`,
      }),
      input({
        name: 'fuel_escalation_rate',
        label: 'Fuel escalation',
        quantity: 'ratio',
        value: 0.01,
        limits: { min: 0, max: 1 },
        source: 'invented rate (demo)',
        note: 'Above general inflation, a year.',
      }),
      computed({
        name: 'fuel_growth',
        label: 'Growth of fuel cost, discounted',
        quantity: 'ratio',
        digits: 4,
        formula: '=(1+fuel_escalation_rate)/(1+discount_rate)',
        source: handbook,
      }),
      computed({
        name: 'fuel_present_factor',
        label: 'Years of fuel, today',
        quantity: 'number',
        digits: 3,
        formula:
          '=IF(ABS(fuel_growth-1)<0.000000001,study_years,fuel_growth*(1-fuel_growth^study_years)/(1-fuel_growth))',
        source: `${handbook}: UPV*`,
      }),
      computed({
        name: 'upkeep_present_factor',
        label: 'Years of upkeep, today',
        quantity: 'number',
        digits: 3,
        formula: '=IF(discount_rate<0.0000001,study_years,(1-(1+discount_rate)^-study_years)/discount_rate)',
        source: `${handbook}: UPV`,
      }),
      computed({
        name: 'end_present_factor',
        label: 'Money at the end, today',
        quantity: 'number',
        digits: 3,
        formula: '=(1+discount_rate)^-study_years',
        source: `${handbook}: SPV`,
      }),
      computed({
        name: 'labour_by_area',
        label: 'Fixing a covering, by area',
        quantity: 'money-per-area',
        formula: `=${lookUp('labour', '"COVER"', 'rate')}/${lookUp('labour', '"COVER"', 'output an hour')}`,
        source: 'Labour',
      }),
      computed({
        name: 'gain_factor',
        label: 'Heat in sun on an area',
        quantity: 'number',
        digits: 8,
        formula: '=frame_light_factor*dirt_light_factor*solar_heat_ratio*energy_per_irradiation',
        source: 'Heat, Light',
      }),
      computed({
        name: 'roof_net_area',
        label: 'Roof, net',
        quantity: 'area',
        formula: roofSum('surface_net_area'),
        source: 'Surfaces',
      }),
      computed({
        name: 'roof_screened_area',
        label: 'Roof under the screen',
        quantity: 'area',
        formula: roofSum('surface_net_area', ',surface_screened,"yes"'),
        source: 'Surfaces',
      }),
      computed({
        name: 'roof_conductance',
        label: 'Conductance of the roof',
        quantity: 'conductance',
        formula: roofSum('surface_conductance'),
        source: 'Surfaces',
      }),
      computed({
        name: 'roof_day_conductance',
        label: 'The same, screen drawn back',
        quantity: 'conductance',
        formula: roofSum('surface_day_conductance'),
        source: 'Surfaces',
      }),
      heading('The roof’s own covering'),
      computed({
        name: 'life_cycle_cost',
        label: 'Life-cycle cost',
        quantity: 'money',
        formula: `=INDEX(option_life_cycle,${own + 1})`,
        source: handbook,
        total: true,
      }),
      computed({
        name: 'simple_payback',
        label: 'Payback against the first option',
        quantity: 'years',
        digits: 1,
        formula: `=INDEX(option_payback,${own + 1})`,
        source: 'extra first cost over yearly saving',
        note: '“never” where it costs more and saves nothing.',
      }),
    ),
    grid({ columns: optionColumns, rows: optionRows }),
    grid({ columns: gainColumns, rows: gainRows }),
    grid({ columns: balanceColumns, rows: balanceRows }),
  ],
}
