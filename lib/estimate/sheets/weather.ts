import {
  check,
  computed,
  type GridColumn,
  grid,
  heading,
  lines,
  lookUp,
  type SheetDeclaration,
} from '../declare'
import { surfaceNames } from './surfaces'
import { fixingLines, gapLines } from './weather-fixings'
import { weatherInputs } from './weather-inputs'
import { loadColumns, loadRows, purlinLines } from './weather-purlins'

const snow = 'ASCE 7-16, chapter 7'
const wind = 'ASCE 7-16, chapter 26'
const screen = 'A preliminary screen: the local code and a licensed engineer decide.'
const magnus = 'Magnus form; coefficients of Sonntag 1990'
const roof = (column: string): string => lookUp('coverings', 'roof_covering', column)

/** Magnus's exponent at a temperature, over water or, below freezing, over ice. */
const exponent = (temperature: string): string => {
  const above = `(${temperature}-freezing_point)`
  return `IF(${above}<0,magnus_ice*${above}/(magnus_ice_offset+${above}),magnus_water*${above}/(magnus_water_offset+${above}))`
}

const columns: readonly GridColumn[] = [
  { title: 'Surface', quantity: 'text', formula: '={surface_name}', width: 230 },
  { title: 'Covering', quantity: 'text', formula: '={surface_covering}' },
  { title: 'Sheet', quantity: 'length', formula: '=IF({surface_width}=0,0,{sheet_cut_length})' },
  {
    title: 'Expansion',
    quantity: 'expansion',
    ground: 'table',
    formula: `=${lookUp('coverings', '[Covering]', 'expansion coefficient')}`,
  },
  {
    title: 'Grows',
    quantity: 'small-length',
    formula: '=[Sheet]*[Expansion]*MAX(0,highest_sheet_temperature-fitting_temperature)*small_lengths',
    source: 'fitting to highest temperature',
    named: { name: 'sheet_growth', role: 'table', label: 'growth of a sheet of each surface' },
  },
  {
    title: 'Shrinks',
    quantity: 'small-length',
    formula: '=[Sheet]*[Expansion]*MAX(0,fitting_temperature-lowest_sheet_temperature)*small_lengths',
    source: 'fitting to lowest temperature',
    named: { name: 'sheet_shrinkage', role: 'table', label: 'shrinkage of a sheet of each surface' },
  },
]

/**
 * X-rules of this sheet are screens. Snow: flat roof load 0.7·Ce·Ct·Is·pg times the slope factor of the roof.
 * Wind: velocity pressure at mean roof height. Sheets: growth, bend radius, and when the inside surface starts to wet.
 */
export const weather: SheetDeclaration = {
  id: 'weather',
  name: 'Weather',
  kind: 'step',
  about: `Snow, wind, expansion and condensation. ${screen}`,
  blocks: [
    lines(
      ...weatherInputs,
      heading('Snow'),
      computed({
        name: 'flat_roof_snow_load',
        label: 'Flat roof snow load',
        quantity: 'pressure',
        formula: '=0.7*snow_exposure_factor*snow_thermal_factor*importance_factor*ground_snow_load',
        source: `${snow}, eq. 7.3-1`,
        note: screen,
      }),
      computed({
        name: 'snow_slide_start',
        label: 'Slope where snow starts to slide',
        quantity: 'angle',
        digits: 1,
        formula:
          '=IF(roof_is_slippery,IF(snow_thermal_factor<=1,5,IF(snow_thermal_factor<1.2,10,15)),IF(snow_thermal_factor<=1,30,IF(snow_thermal_factor<1.2,37.5,45)))',
        source: `${snow}, fig. 7.4-1`,
        note: 'Slippery, then other surfaces; warm, between and cold roofs.',
      }),
      computed({
        name: 'roof_slope_factor',
        label: 'Slope factor',
        quantity: 'ratio',
        digits: 3,
        formula: '=MAX(0,MIN(1,1-(roof_pitch_angle-snow_slide_start)/(70-snow_slide_start)))',
        source: `${snow}, fig. 7.4-1`,
        note: 'For an arch, by the line from eave to crown.',
      }),
      computed({
        name: 'sloped_roof_snow_load',
        label: 'Sloped roof snow load',
        quantity: 'pressure',
        formula: '=roof_slope_factor*flat_roof_snow_load',
        source: `${snow}, eq. 7.4-1`,
        note: screen,
        total: true,
      }),
      computed({
        name: 'snow_shape_coefficient',
        label: 'Shape coefficient, European form',
        quantity: 'ratio',
        digits: 3,
        formula: '=0.8*MAX(0,MIN(1,(60-roof_pitch_angle)/30))',
        source: 'EN 1991-1-3, 5.3',
      }),
      computed({
        name: 'european_roof_snow_load',
        label: 'Roof snow load, European form',
        quantity: 'pressure',
        formula: '=snow_shape_coefficient*snow_exposure_factor*snow_thermal_factor*ground_snow_load',
        source: 'EN 1991-1-3, 5.2: no importance factor',
        note: 'To hold the other against where that code rules; its map gives another ground load.',
      }),
      heading('Wind'),
      computed({
        name: 'mean_roof_height',
        label: 'Mean roof height',
        quantity: 'length',
        formula: '=eave_height+roof_rise/2',
        source: `${wind}, 26.2`,
      }),
      computed({
        name: 'wind_exposure_factor',
        label: 'Exposure coefficient',
        quantity: 'ratio',
        digits: 3,
        formula: '=2.01*(MAX(mean_roof_height,wind_least_height)/wind_gradient_height)^(2/wind_power)',
        source: `${wind}, table 26.10-1`,
      }),
      computed({
        name: 'ground_elevation_factor',
        label: 'Ground elevation factor',
        quantity: 'ratio',
        digits: 3,
        formula: '=EXP(-site_elevation/air_thinning_height)',
        source: `${wind}, table 26.9-1`,
      }),
      computed({
        name: 'velocity_pressure',
        label: 'Velocity pressure',
        quantity: 'pressure',
        formula:
          '=wind_reference_pressure*wind_exposure_factor*wind_topographic_factor*wind_directionality_factor*ground_elevation_factor*(basic_wind_speed/wind_reference_speed)^2',
        source: `${wind}, eq. 26.10-1`,
        note: screen,
        total: true,
      }),
      ...purlinLines,
      ...fixingLines,
      heading('Sheets'),
      computed({
        name: 'expansion_allowance',
        label: 'Expansion allowance, longest sheet',
        quantity: 'small-length',
        formula: '=MAX(sheet_growth)',
        source: 'coefficient × length × temperature rise after fitting',
        note: 'A fixing sits snug, never tight.',
      }),
      computed({
        name: 'expansion_movement',
        label: 'Whole movement, longest sheet',
        quantity: 'small-length',
        formula: '=MAX(sheet_growth)+MAX(sheet_shrinkage)',
        source: 'from the coldest to the hottest sheet',
      }),
      ...gapLines,
      computed({
        name: 'minimum_bend_radius',
        label: 'Least bend radius of the roof covering',
        quantity: 'length',
        formula: `=IF(${roof('bending')}="freely",0,IF(${roof('minimum bend radius')}>0,${roof('minimum bend radius')},bend_ratio*${roof('thickness')})/small_lengths)`,
        source: 'Coverings; else 150 thicknesses, common practice',
      }),
      check({
        name: 'bend_check',
        label: 'Bend of the arch',
        about: 'roof_covering',
        severity: 'error',
        formula: `=IF(arch_radius=0,"in order",IF(${roof('bending')}="flat only","This covering cannot be bent to an arch",IF(arch_radius<minimum_bend_radius*(1-0.000000001),"The arch is tighter than the covering may be bent","in order")))`,
        source: 'Coverings',
      }),
      heading('Condensation'),
      computed({
        name: 'inside_surface_temperature',
        label: 'Inside surface of the roof covering',
        quantity: 'temperature',
        formula: `=inside_night_temperature-inside_surface_resistance/${roof('resistance')}*(inside_night_temperature-outside_design_temperature)`,
        source: 'as EN ISO 13788',
        note: 'At design temperatures, with the screen drawn back.',
      }),
      computed({
        name: 'vapour_exponent',
        label: 'Vapour in the inside air',
        quantity: 'number',
        digits: 4,
        formula: `=LN(MAX(inside_relative_humidity,0.000001))+${exponent('inside_night_temperature')}`,
        source: magnus,
        note: 'Logarithm of its pressure over that at freezing.',
      }),
      computed({
        name: 'dew_point_temperature',
        label: 'Dew point of the inside air',
        quantity: 'temperature',
        formula:
          '=freezing_point+IF(vapour_exponent<0,magnus_ice_offset*vapour_exponent/(magnus_ice-vapour_exponent),magnus_water_offset*vapour_exponent/(magnus_water-vapour_exponent))',
        source: magnus,
      }),
      computed({
        name: 'condensation_humidity',
        label: 'Humidity that starts to wet it',
        quantity: 'ratio',
        formula: `=MIN(1,EXP(${exponent('inside_surface_temperature')}-(${exponent('inside_night_temperature')})))`,
        source: magnus,
      }),
      check({
        name: 'condensation_check',
        label: 'Condensation at design',
        about: 'inside_relative_humidity',
        severity: 'warning',
        formula:
          '=IF(inside_relative_humidity>condensation_humidity,"The roof covering wets inside on the coldest night","in order")',
        source: 'above',
      }),
    ),
    grid({ columns, rows: surfaceNames.map(() => ({})) }),
    grid({ columns: loadColumns, rows: loadRows }),
  ],
}
