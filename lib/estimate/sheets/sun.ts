import {
  area,
  computed,
  constant,
  type GridColumn,
  grid,
  heading,
  lines,
  type SheetDeclaration,
  si,
} from '../declare'
import { months } from './site'
import { facetColumns, facetRows } from './sun-facets'
import { sunColumns, sunRows } from './sun-rows'

const klein = 'Klein 1977, mean days of the months'
const cooper = 'Cooper 1969; Duffie and Beckman, Solar Engineering of Thermal Processes'
const erbs = 'Erbs, Klein and Duffie 1982, monthly means, for a clearness of 0.3 to 0.8'

/** Klein's mean day of each month, and how many days the month has. */
const meanDays = [17, 47, 75, 105, 135, 162, 198, 228, 258, 288, 318, 344]
const lengths = [31, 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31]

const monthColumns: readonly GridColumn[] = [
  { title: 'Month', quantity: 'text', ground: 'label', width: 170 },
  {
    title: 'Mean day',
    quantity: 'count',
    source: klein,
    named: area('mean_day', 'mean day of the month, of the year'),
  },
  { title: 'Days', quantity: 'count', named: area('month_days', 'days of the month') },
  {
    title: 'Declination',
    source: cooper,
    quantity: 'angle',
    digits: 2,
    formula: '=23.45*SIN(RADIANS(360*(284+[Mean day])/365))',
    named: area('declination', 'declination of the sun'),
  },
  {
    title: 'Sunset hour angle',
    source: cooper,
    quantity: 'angle',
    digits: 2,
    formula: '=DEGREES(ACOS(MAX(-1,MIN(1,-TAN(RADIANS(latitude))*TAN(RADIANS([Declination]))))))',
    named: area('sunset_hour_angle', 'hour angle of sunset'),
  },
  {
    title: 'Day length',
    quantity: 'hours',
    digits: 2,
    formula: '=[Sunset hour angle]/7.5',
    named: area('day_length', 'hours from sunrise to sunset'),
  },
  {
    title: 'Height of the day',
    quantity: 'number',
    digits: 4,
    formula:
      '=COS(RADIANS(latitude))*COS(RADIANS([Declination]))*SIN(RADIANS([Sunset hour angle]))+RADIANS([Sunset hour angle])*SIN(RADIANS(latitude))*SIN(RADIANS([Declination]))',
    named: area('sun_height', 'cosine of the zenith, over half the day'),
  },
  {
    title: 'Outside the air',
    source: cooper,
    quantity: 'irradiation',
    formula: '=24/PI()*solar_constant*(1+0.033*COS(RADIANS(360*[Mean day]/365)))*[Height of the day]',
    named: area('extraterrestrial_irradiation', 'irradiation outside the atmosphere, a day'),
  },
  {
    title: 'Clearness',
    quantity: 'ratio',
    digits: 3,
    formula: '=IF([Outside the air]<=0,0,{monthly_irradiation}/[Outside the air])',
    named: area('clearness', 'clearness index'),
  },
  { title: 'Within range', quantity: 'ratio', digits: 3, formula: '=MAX(0.3,MIN(0.8,[Clearness]))' },
  {
    title: 'Diffuse fraction',
    source: erbs,
    quantity: 'ratio',
    digits: 3,
    formula:
      '=IF([Sunset hour angle]<=81.4,1.391-3.56*[Within range]+4.189*[Within range]^2-2.137*[Within range]^3,1.311-3.022*[Within range]+3.427*[Within range]^2-1.821*[Within range]^3)',
    named: area('diffuse_fraction', 'diffuse part of the irradiation'),
  },
]

export const sun: SheetDeclaration = {
  id: 'sun',
  name: 'Sun',
  kind: 'step',
  about: 'What the sun sends to every surface, month by month.',
  blocks: [
    grid({
      columns: monthColumns,
      rows: months.map((month, index) => ({
        Month: month,
        'Mean day': meanDays[index] ?? 0,
        Days: lengths[index] ?? 0,
      })),
    }),
    lines(
      heading('Constants'),
      constant({
        name: 'solar_constant',
        label: 'Solar constant, in an hour',
        quantity: 'irradiation',
        value: si(1.367),
        source: 'World Radiation Center; Duffie and Beckman',
        note: '1367 W/m².',
      }),
      computed({
        name: 'yearly_irradiation',
        label: 'Irradiation on the horizontal, a year',
        quantity: 'irradiation',
        formula: '=SUMPRODUCT(monthly_irradiation,month_days)',
        source: 'Site',
      }),
    ),
    grid({ columns: facetColumns, rows: facetRows }),
    grid({
      columns: sunColumns,
      rows: sunRows,
    }),
  ],
}
