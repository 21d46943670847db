import { area, type GridColumn, type GridRow } from '../declare'
import { months } from './site'

const iso = 'ISO 13790, monthly method'
const erbs = 'Erbs, Klein and Beckman 1983'

/** H4 Gains count as far as they can be used; what cannot be used is surplus, and nothing is lost between the two. */
export const heatMonthColumns: readonly GridColumn[] = [
  { title: 'Month', quantity: 'text', ground: 'label' },
  { title: 'Days', quantity: 'count', formula: '={month_days}' },
  { title: 'Outside', quantity: 'temperature', formula: '={monthly_mean_temperature}' },
  {
    title: 'By day',
    quantity: 'number',
    digits: 0,
    formula: '=MAX(0,inside_day_temperature-[Outside])*{day_length}*[Days]',
    source: 'degree-hours: day set point, from sunrise to sunset',
    named: area('day_degree_hours', 'degree-hours by day'),
  },
  {
    title: 'By night',
    quantity: 'number',
    digits: 0,
    formula: '=MAX(0,inside_night_temperature-[Outside])*(24-{day_length})*[Days]',
    source: 'degree-hours: night set point, from sunset to sunrise',
    named: area('night_degree_hours', 'degree-hours by night'),
  },
  {
    title: 'Loss',
    quantity: 'energy',
    formula: '=([By day]*day_loss_coefficient+[By night]*night_loss_coefficient)*energy_per_heat',
    source: iso,
    named: area('month_loss', 'monthly heat loss'),
  },
  {
    title: 'Solar gain',
    quantity: 'energy',
    formula:
      '=SUMIFS(sun_through,sun_month,[Month])*[Days]*frame_light_factor*dirt_light_factor*solar_heat_ratio*energy_per_irradiation',
    source: iso,
    named: area('month_gain', 'monthly solar gain'),
  },
  {
    title: 'Gain to loss',
    quantity: 'ratio',
    digits: 3,
    formula: '=IF([Loss]<0.000000001,0,[Solar gain]/[Loss])',
    source: iso,
  },
  {
    title: 'Utilisation',
    quantity: 'ratio',
    digits: 3,
    formula: utilisation('[Loss]', '[Gain to loss]'),
    source: iso,
  },
  {
    title: 'Heat needed',
    quantity: 'energy',
    formula: '=MAX(0,[Loss]-[Utilisation]*[Solar gain])',
    source: iso,
    named: area('month_heat', 'monthly heat needed'),
  },
  {
    title: 'Surplus',
    quantity: 'energy',
    formula: '=[Solar gain]-([Loss]-[Heat needed])',
    source: iso,
    named: area('month_surplus', 'monthly surplus heat'),
  },
  {
    title: 'For a dwelling',
    quantity: 'energy',
    formula: '=IF([Outside]<degree_day_base,[Surplus],0)',
    source: 'surplus of months in which a dwelling is heated',
    named: area('month_dwelling_surplus', 'monthly surplus that a dwelling could use'),
  },
  {
    title: 'Coasts',
    quantity: 'count',
    formula: '=IF([Heat needed]<=0.01*annual_heat_demand/12,1,0)',
    source: 'a hundredth of the mean month counts as none',
    named: area('month_coasts', 'months without heating'),
  },
  {
    title: 'Spread',
    quantity: 'temperature-difference',
    digits: 2,
    formula:
      '=MAX(least_spread,spread_at_freezing-spread_by_mean*([Outside]-freezing_point)+spread_by_year*STDEV(monthly_mean_temperature))',
    source: erbs,
  },
  {
    title: 'Below base',
    quantity: 'number',
    digits: 3,
    formula: '=(degree_day_base-[Outside])/([Spread]*SQRT([Days]))',
    source: erbs,
  },
  {
    title: 'Degree-days',
    quantity: 'degree-days',
    digits: 0,
    formula:
      '=[Spread]*[Days]^1.5*([Below base]/2+(ABS(spread_shape*SQRT([Days])*[Below base])+LN(1+EXP(-2*ABS(spread_shape*SQRT([Days])*[Below base]))))/(2*spread_shape*SQRT([Days])))',
    source: erbs,
    named: area('month_degree_days', 'monthly degree-days'),
  },
  {
    title: 'By Hitchin',
    quantity: 'degree-days',
    digits: 0,
    formula:
      '=[Days]*IF(ABS(degree_day_base-[Outside])<0.000001,hitchin_spread,(degree_day_base-[Outside])/(1-EXP(-(degree_day_base-[Outside])/hitchin_spread)))',
    source: 'CIBSE TM41, from memory',
    named: area('month_hitchin_degree_days', 'monthly degree-days by Hitchin'),
  },
]

export const heatMonthRows: readonly GridRow[] = months.map((month) => ({ Month: month }))

/** How much of the gains counts: by gain over loss, and the exponent that the time constant gives. */
export function utilisation(loss: string, ratio: string, a = 'utilisation_exponent'): string {
  const near = `${a}/(${a}+1)`
  const less = `(1-${ratio}^${a})/(1-${ratio}^(${a}+1))`
  const more = `(${ratio}^-${a}-1)/(${ratio}^-${a}-${ratio})`
  return `=IF(${loss}<0.000000001,0,IF(ABS(${ratio}-1)<0.000000001,${near},IF(${ratio}<1,${less},${more})))`
}
