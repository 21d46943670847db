import { area, type GridColumn, type GridRow } from '../declare'
import { months } from './site'
import { facets } from './sun-facets'

/**
 * S1 The cosine of incidence over a day is a + b·cos ω + c·sin ω; it is positive between two hour angles, met with
 * sunrise and sunset, and once more a turn away. Its integral over that of the zenith's cosine is the beam ratio.
 * S2 Sky and ground are isotropic (Liu and Jordan 1960); the diffuse part is Erbs's monthly correlation.
 */
export const sunColumns: readonly GridColumn[] = [
  { title: 'Facet', quantity: 'text', ground: 'label' },
  {
    title: 'Part',
    quantity: 'text',
    ground: 'label',
    named: area('sun_part', 'whether the row is of the roof'),
  },
  { title: 'Month', quantity: 'text', ground: 'label', named: area('sun_month', 'month of the row') },
  {
    title: 'Always',
    quantity: 'number',
    digits: 4,
    named: area('sun_always', 'cosine of incidence, the part without the hour'),
  },
  {
    title: 'With noon',
    quantity: 'number',
    digits: 4,
    named: area('sun_noon', 'the part with the cosine of the hour angle'),
  },
  {
    title: 'With evening',
    quantity: 'number',
    digits: 4,
    named: area('sun_evening', 'the part with its sine'),
  },
  { title: 'Swing', quantity: 'number', digits: 4, formula: '=SQRT([With noon]^2+[With evening]^2)' },
  {
    title: 'Best hour',
    quantity: 'number',
    digits: 4,
    formula: '=IF([Swing]<0.000000000001,0,ATAN2([With noon],[With evening]))',
  },
  {
    title: 'Half stay',
    quantity: 'number',
    digits: 4,
    formula: '=ACOS(MAX(-1,MIN(1,-[Always]/MAX([Swing],0.000000000001))))',
  },
  { title: 'Sun from', quantity: 'number', digits: 4 },
  { title: 'Sun to', quantity: 'number', digits: 4 },
  { title: 'Again from', quantity: 'number', digits: 4 },
  { title: 'Again to', quantity: 'number', digits: 4 },
  {
    title: 'Beam ratio',
    quantity: 'ratio',
    digits: 3,
    named: area('beam_ratio', 'beam on the facet over beam on the horizontal'),
  },
  { title: 'Beam', quantity: 'irradiation', named: area('sun_beam', 'beam on each facet, a day') },
  {
    title: 'Sky and ground',
    quantity: 'irradiation',
    named: area('sun_diffuse', 'diffuse light on each facet, a day'),
  },
  {
    title: 'Irradiation',
    quantity: 'irradiation',
    formula: '=[Beam]+[Sky and ground]',
    named: area('sun_irradiation', 'irradiation on each facet, a day'),
  },
  {
    title: 'Beam on area',
    quantity: 'number',
    named: area('sun_beam_on_area', 'beam on the whole facet, a day'),
  },
  {
    title: 'Diffuse on area',
    quantity: 'number',
    named: area('sun_diffuse_on_area', 'diffuse light on the whole facet, a day'),
  },
  {
    title: 'Through',
    quantity: 'number',
    named: area('sun_through', 'what comes through the covering, a day'),
  },
]

function sunRow(facet: number, month: number): GridRow {
  const of = (name: string) => `{${name}:${name.startsWith('facet') ? facet : month}}`
  const cos = (name: string) => `COS(RADIANS(${of(name)}))`
  const sin = (name: string) => `SIN(RADIANS(${of(name)}))`
  const [north, equator] = ['SIN(RADIANS(latitude))', 'COS(RADIANS(latitude))']
  const sunset = `RADIANS(${of('sunset_hour_angle')})`
  const turn = 'IF([Best hour]>0,-2,2)*PI()'
  const part = (from: string, to: string): string =>
    `[Always]*([${to}]-[${from}])+[With noon]*(SIN([${to}])-SIN([${from}]))-[With evening]*(COS([${to}])-COS([${from}]))`
  return {
    Facet: facets[facet]?.name ?? '',
    Part: facets[facet]?.part ?? '',
    Month: months[month] ?? '',
    Always: `=${sin('declination')}*(${north}*${cos('facet_tilt')}-${equator}*${sin('facet_tilt')}*${cos('facet_from_south')})`,
    'With noon': `=${cos('declination')}*(${equator}*${cos('facet_tilt')}+${north}*${sin('facet_tilt')}*${cos('facet_from_south')})`,
    'With evening': `=${cos('declination')}*${sin('facet_tilt')}*${sin('facet_from_south')}`,
    'Sun from': `=MIN(${sunset},MAX(-${sunset},[Best hour]-[Half stay]))`,
    'Sun to': `=MAX([Sun from],MIN(${sunset},[Best hour]+[Half stay]))`,
    'Again from': `=MIN(${sunset},MAX(-${sunset},[Best hour]-[Half stay]+${turn}))`,
    'Again to': `=MAX([Again from],MIN(${sunset},[Best hour]+[Half stay]+${turn}))`,
    'Beam ratio': `=IF(${of('sun_height')}<=0,0,(${part('Sun from', 'Sun to')}+${part('Again from', 'Again to')})/(2*${of('sun_height')}))`,
    Beam: `=${of('monthly_irradiation')}*(1-${of('diffuse_fraction')})*MAX(0,[Beam ratio])`,
    'Sky and ground': `=${of('monthly_irradiation')}*(${of('diffuse_fraction')}*(1+${cos('facet_tilt')})/2+${of('monthly_ground_reflectance')}*(1-${cos('facet_tilt')})/2)`,
    'Beam on area': `=[Beam]*${of('facet_area')}`,
    'Diffuse on area': `=[Sky and ground]*${of('facet_area')}`,
    Through: `=[Beam on area]*${of('facet_direct')}+[Diffuse on area]*${of('facet_diffuse')}`,
  }
}

/** Facet by facet, the months of each. */
export const sunRows: readonly GridRow[] = facets.flatMap((_, facet) =>
  months.map((__, month) => sunRow(facet, month)),
)
