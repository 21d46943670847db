import { grid, input, lines, lookUp, type SheetDeclaration } from '../declare'
import { irradiationOf, meanOf } from '../tables/sites'

const demo = 'invented (demo)'

export const months = [
  'January',
  'February',
  'March',
  'April',
  'May',
  'June',
  'July',
  'August',
  'September',
  'October',
  'November',
  'December',
] as const

const ofSite = (column: string): string => `=${lookUp('sites', 'site_code', column)}`
const fromSites = 'Sites, unless typed here'
const reflectance = [0.4, 0.4, 0.3, 0.2, 0.2, 0.2, 0.2, 0.2, 0.2, 0.2, 0.2, 0.3]

export const site: SheetDeclaration = {
  id: 'site',
  name: 'Site',
  kind: 'step',
  about: 'The climate that the house stands in, and how it is turned.',
  blocks: [
    lines(
      input({
        name: 'site_code',
        label: 'Climate of',
        quantity: 'text',
        value: 'MIDDLEFOLD',
        choices: 'sites',
        source: 'estimator’s choice',
        note: 'Fills latitude, elevation, design temperature, snow, wind and the months, each unless typed over.',
      }),
      input({
        name: 'latitude',
        label: 'Latitude',
        quantity: 'angle',
        value: ofSite('latitude'),
        limits: { min: -66, max: 66 },
        source: fromSites,
        note: 'North is positive.',
      }),
      input({
        name: 'site_elevation',
        label: 'Elevation of the site',
        quantity: 'length',
        value: ofSite('elevation'),
        limits: { min: -500, max: 6000, in: 'si' },
        source: fromSites,
      }),
      input({
        name: 'ridge_azimuth',
        label: 'Ridge azimuth',
        quantity: 'angle',
        value: 90,
        limits: { min: 0, max: 360 },
        source: demo,
        note: 'Clockwise from north; a ridge running east-west is 90. The front faces this plus 90°.',
      }),
      input({
        name: 'outside_design_temperature',
        label: 'Outside design temperature',
        quantity: 'temperature',
        value: ofSite('design temperature'),
        limits: { min: -60, max: 50, in: 'si' },
        source: fromSites,
        note: 'The 99 % value of the nearest weather station is usual.',
      }),
      input({
        name: 'inside_night_temperature',
        label: 'Inside temperature at night',
        quantity: 'temperature',
        value: 55,
        limits: { min: -60, max: 60, in: 'si' },
        source: demo,
      }),
      input({
        name: 'inside_day_temperature',
        label: 'Inside temperature by day',
        quantity: 'temperature',
        value: 65,
        limits: { min: -60, max: 60, in: 'si' },
        source: demo,
      }),
      input({
        name: 'ground_snow_load',
        label: 'Ground snow load',
        quantity: 'pressure',
        value: ofSite('ground snow load'),
        limits: { min: 0, max: 20, in: 'si' },
        source: fromSites,
        note: 'From the map of the local code.',
      }),
      input({
        name: 'basic_wind_speed',
        label: 'Basic wind speed',
        quantity: 'speed',
        value: ofSite('wind speed'),
        limits: { min: 0, max: 120, in: 'si' },
        source: fromSites,
        note: 'Three-second gust, from the map of the local code.',
      }),
    ),
    grid({
      columns: [
        { title: 'Month', quantity: 'text', ground: 'label' },
        {
          title: 'Mean temperature',
          quantity: 'temperature',
          ground: 'input',
          named: {
            name: 'monthly_mean_temperature',
            role: 'input',
            label: 'Monthly mean temperature',
            limits: { min: -60, max: 60, in: 'si' },
          },
        },
        {
          title: 'Irradiation',
          quantity: 'irradiation',
          ground: 'input',
          named: {
            name: 'monthly_irradiation',
            role: 'input',
            label: 'Monthly irradiation on the horizontal, a day',
            limits: { min: 0, max: 15, in: 'si' },
          },
        },
        { title: 'Source', quantity: 'text', ground: 'label' },
        {
          title: 'Ground reflectance',
          quantity: 'ratio',
          ground: 'input',
          named: {
            name: 'monthly_ground_reflectance',
            role: 'input',
            label: 'Monthly ground reflectance',
            limits: { min: 0, max: 1 },
          },
        },
      ],
      rows: months.map((month, index) => ({
        Month: month,
        'Mean temperature': ofSite(meanOf(month)),
        Irradiation: ofSite(irradiationOf(month)),
        Source: fromSites,
        'Ground reflectance': reflectance[index] ?? 0,
      })),
    }),
  ],
}
