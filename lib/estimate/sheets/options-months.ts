import { area, type GridColumn, type GridRow } from '../declare'
import { utilisation } from './heat-months'
import { months } from './site'

/** The first is what the others are held against; the last is the roof's own covering. */
export const compared = [
  'FILM-2',
  'FILM-2-IR',
  'GLASS-1',
  'PC-TWIN-8',
  'PC-TWIN-10',
  'PC-TRIPLE-16',
  'PC-FIVE-25',
  'ACRYL-TWIN-16',
]
export const own = compared.length

export const optionName = (row: number): string => (row === own ? 'The roof’s own' : `Option ${row + 1}`)
/** What the sun sends through walls and onto the roof, the same for every option. */
export const gainColumns: readonly GridColumn[] = [
  { title: 'Month', quantity: 'text', ground: 'label', width: 230 },
  {
    title: 'Beam on the roof',
    quantity: 'energy',
    formula: '=SUMIFS(sun_beam_on_area,sun_month,[Month],sun_part,"roof")*{month_days}*gain_factor',
    named: area('roof_beam_energy', 'beam on the roof, a month'),
  },
  {
    title: 'Diffuse on the roof',
    quantity: 'energy',
    formula: '=SUMIFS(sun_diffuse_on_area,sun_month,[Month],sun_part,"roof")*{month_days}*gain_factor',
    named: area('roof_diffuse_energy', 'diffuse light on the roof, a month'),
  },
  {
    title: 'Through the walls',
    quantity: 'energy',
    formula: '=SUMIFS(sun_through,sun_month,[Month],sun_part,"wall")*{month_days}*gain_factor',
    named: area('wall_gain', 'gain through the walls, a month'),
  },
]

export const gainRows: readonly GridRow[] = months.map((month) => ({ Month: month }))

export const balanceColumns: readonly GridColumn[] = [
  {
    title: 'Option',
    quantity: 'text',
    ground: 'label',
    named: area('option_month_option', 'option of the row'),
  },
  { title: 'Month', quantity: 'text', ground: 'label' },
  { title: 'Loss', quantity: 'energy' },
  { title: 'Gain', quantity: 'energy' },
  { title: 'Gain to loss', quantity: 'ratio', digits: 3, formula: '=IF([Loss]<0.000000001,0,[Gain]/[Loss])' },
  { title: 'Utilisation', quantity: 'ratio', digits: 3 },
  {
    title: 'Heat needed',
    quantity: 'energy',
    formula: '=MAX(0,[Loss]-[Utilisation]*[Gain])',
    named: area('option_month_heat', 'heat of each option and month'),
  },
]

export const balanceRows: readonly GridRow[] = [...compared, ''].flatMap((_, row) =>
  months.map((month, index) => ({
    Option: optionName(row),
    Month: month,
    Loss: `=({day_degree_hours:${index}}*{option_day:${row}}+{night_degree_hours:${index}}*{option_night:${row}})*energy_per_heat`,
    Gain: `={roof_beam_energy:${index}}*{option_direct:${row}}+{roof_diffuse_energy:${index}}*{option_diffuse:${row}}+{wall_gain:${index}}`,
    Utilisation: utilisation('[Loss]', '[Gain to loss]', `{option_exponent:${row}}`),
  })),
)
