import { computed, constant, grid, heading, input, lines, lookUp, type SheetDeclaration } from '../declare'
import { heatMonthColumns, heatMonthRows } from './heat-months'
import { yearLines } from './heat-year'

const method = 'ASABE EP406; NRAES-33'

/**
 * H2 Design heat loss is conduction, infiltration and perimeter loss at design temperatures, never below nothing.
 * H3 The heat capacity of air is stated once, as 0.018 Btu/(ft³·°F), and converted exactly.
 */
export const heat: SheetDeclaration = {
  id: 'heat',
  name: 'Heat',
  kind: 'step',
  about: 'What the house loses on the coldest night, and the heater that it needs.',
  blocks: [
    lines(
      heading('Given'),
      input({
        name: 'tightness',
        label: 'Tightness',
        quantity: 'text',
        value: 'NEW-SHEET',
        choices: 'tightness_table',
        source: 'estimator’s choice',
      }),
      input({
        name: 'air_changes_per_hour',
        label: 'Air changes',
        quantity: 'air-changes',
        value: `=${lookUp('tightness_table', 'tightness', 'air changes')}`,
        limits: { min: 0, max: 100 },
        source: 'Tightness, unless typed here',
        note: 'New glass 0.75 to 1.5; new double film 0.5 to 1.0; old glass 1 to 4.',
      }),
      input({
        name: 'perimeter_heat_loss_factor',
        label: 'Perimeter heat loss factor',
        quantity: 'linear-conductance',
        value: 0.8,
        limits: { min: 0, max: 10 },
        source: 'ASABE EP406; NRAES-33, from memory',
        note: '0.8 Btu/(h·ft·°F) with a bare edge, 0.4 with edge insulation.',
      }),
      input({
        name: 'screen_resistance',
        label: 'Resistance of the night screen',
        quantity: 'thermal-resistance',
        value: 0,
        limits: { min: 0, max: 1000 },
        source: 'estimator’s choice',
        note: '0 without a screen; Surfaces says which ones it covers. From published U-values: a blanket adds 0.4 to 0.5 under a single layer, 1.1 under double film.',
      }),
      input({
        name: 'heater_allowance',
        label: 'Heater allowance',
        quantity: 'ratio',
        value: 0.25,
        limits: { min: 0, max: 1 },
        source: 'common practice, no source',
      }),
      constant({
        name: 'air_heat_capacity',
        label: 'Heat capacity of air by volume',
        quantity: 'volumetric-heat-capacity',
        value: 0.018,
        digits: 4,
        source: '0.075 lb/ft³ × 0.24 Btu/(lb·°F)',
      }),
      heading('Design heat loss'),
      computed({
        name: 'design_temperature_difference',
        label: 'Inside above outside',
        quantity: 'temperature-difference',
        formula: '=MAX(0,inside_night_temperature-outside_design_temperature)',
        source: method,
      }),
      computed({
        name: 'conduction_loss',
        label: 'Conduction',
        quantity: 'heat-rate',
        formula: '=envelope_conductance*design_temperature_difference',
        source: method,
      }),
      computed({
        name: 'infiltration_loss',
        label: 'Infiltration',
        quantity: 'heat-rate',
        formula: '=air_heat_capacity*enclosed_volume*air_changes_per_hour*design_temperature_difference',
        source: method,
      }),
      computed({
        name: 'perimeter_loss',
        label: 'Perimeter',
        quantity: 'heat-rate',
        formula: '=perimeter_heat_loss_factor*perimeter_length*design_temperature_difference',
        source: method,
      }),
      computed({
        name: 'design_heat_loss',
        label: 'Design heat loss',
        quantity: 'heat-rate',
        formula: '=conduction_loss+infiltration_loss+perimeter_loss',
        source: method,
        total: true,
      }),
      computed({
        name: 'heater_output',
        label: 'Heater output',
        quantity: 'heat-rate',
        formula: '=design_heat_loss*(1+heater_allowance)',
        source: 'common practice, no source',
      }),
      computed({
        name: 'heater_count',
        label: 'Heaters',
        quantity: 'count',
        formula: '=MAX(1,ROUNDUP(ROUND(heater_output/MAX(heater_outputs),9),0))',
        source: 'Heaters: as few as the largest allows',
      }),
      computed({
        name: 'heater_size',
        label: 'Size of each',
        quantity: 'heat-rate',
        // The least of the sizes that is not under what each has to give, whatever the order of the table.
        formula:
          '=SMALL(heater_outputs,1+COUNTIF(heater_outputs,"<"&ROUND(heater_output/heater_count*(1-0.000000001),6)))',
        source: 'Heaters: the smallest size that is enough',
        total: true,
      }),
      heading('Fuel'),
      input({
        name: 'fuel',
        label: 'Fuel',
        quantity: 'text',
        value: 'NATURAL-GAS',
        choices: 'fuels',
        source: 'estimator’s choice',
      }),
      input({
        name: 'fuel_price',
        label: 'Fuel price',
        quantity: 'money',
        value: `=${lookUp('fuels', 'fuel', 'price')}`,
        limits: { min: 0, max: 1e6 },
        unit: `=currency&"/"&${lookUp('fuels', 'fuel', 'unit')}`,
        source: 'Fuels, unless typed here',
      }),
      input({
        name: 'heater_efficiency',
        label: 'Heater efficiency',
        quantity: 'ratio',
        value: `=${lookUp('fuels', 'fuel', 'efficiency')}`,
        limits: { above: 0, max: 1 },
        source: 'Fuels, unless typed here',
      }),
      computed({
        name: 'fuel_heating_value',
        label: 'Heat in one unit of fuel',
        quantity: 'energy',
        formula: `=${lookUp('fuels', 'fuel', 'heating value')}`,
        ground: 'table',
        digits: 3,
        source: 'Fuels',
      }),
      ...yearLines,
    ),
    grid({ columns: heatMonthColumns, rows: heatMonthRows }),
  ],
}
