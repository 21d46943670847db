import { type GridColumn, type GridRow, grid, type SheetDeclaration, tableLock } from '../declare'

const months = 'January February March April May June July August September October November December'.split(
  ' ',
)

/** Titles of the columns that hold a month's values; the Site sheet looks them up. */
export const meanOf = (month: string): string => `${month} mean`
export const irradiationOf = (month: string): string => `${month} irradiation`

interface Place {
  readonly code: string
  readonly description: string
  readonly latitude: number
  readonly elevation: number
  /** °F, psf, mph */
  readonly coldest: number
  readonly snow: number
  readonly wind: number
  /** °F */
  readonly means: readonly number[]
  /** Btu/ft² a day on the horizontal */
  readonly irradiation: readonly number[]
}

/** Places of a county that is on no map; each is like somewhere of its latitude. */
const places: readonly Place[] = [
  {
    code: 'MIDDLEFOLD',
    description: 'Middlefold, inland plain',
    latitude: 42,
    elevation: 500,
    coldest: 0,
    snow: 30,
    wind: 105,
    means: [24, 27, 36, 48, 59, 68, 73, 71, 63, 52, 40, 29],
    irradiation: [570, 830, 1140, 1440, 1740, 1900, 1880, 1640, 1300, 910, 600, 480],
  },
  {
    code: 'SALTREACH',
    description: 'Saltreach, on the coast',
    latitude: 41.3,
    elevation: 20,
    coldest: 9,
    snow: 25,
    wind: 125,
    means: [30, 32, 38, 47, 57, 66, 72, 71, 65, 54, 45, 35],
    irradiation: [600, 860, 1180, 1480, 1740, 1900, 1890, 1670, 1350, 970, 640, 510],
  },
  {
    code: 'HIGHBARROW',
    description: 'Highbarrow, in the hills',
    latitude: 42.6,
    elevation: 1900,
    coldest: -14,
    snow: 60,
    wind: 115,
    means: [17, 20, 29, 42, 54, 62, 67, 65, 57, 46, 34, 22],
    irradiation: [540, 800, 1120, 1400, 1680, 1820, 1810, 1580, 1240, 850, 550, 440],
  },
  {
    code: 'LOWWATER',
    description: 'Lowwater, mild river valley',
    latitude: 38.4,
    elevation: 120,
    coldest: 17,
    snow: 15,
    wind: 105,
    means: [35, 38, 46, 56, 65, 74, 78, 76, 69, 58, 48, 39],
    irradiation: [720, 980, 1300, 1620, 1840, 2000, 1960, 1760, 1460, 1120, 790, 640],
  },
]

const temperature = { min: -60, max: 60, in: 'si' } as const
const monthly: readonly GridColumn[] = [
  ...months.map(
    (month): GridColumn => ({
      title: meanOf(month),
      quantity: 'temperature',
      required: true,
      limits: temperature,
    }),
  ),
  ...months.map(
    (month): GridColumn => ({
      title: irradiationOf(month),
      quantity: 'irradiation',
      required: true,
      limits: { min: 0, max: 15, in: 'si' },
    }),
  ),
]

function row(place: Place): GridRow {
  return {
    code: place.code,
    description: place.description,
    latitude: place.latitude,
    elevation: place.elevation,
    'design temperature': place.coldest,
    'ground snow load': place.snow,
    'wind speed': place.wind,
    ...Object.fromEntries(months.map((month, at) => [meanOf(month), place.means[at] ?? 0])),
    ...Object.fromEntries(months.map((month, at) => [irradiationOf(month), place.irradiation[at] ?? 0])),
    source: 'invented (demo); irradiation is on the horizontal, a day',
  }
}

export const sites: SheetDeclaration = {
  id: 'sites',
  name: 'Sites',
  kind: 'table',
  about: 'Climates by place; the places are made up, and a firm adds its own.',
  lock: tableLock,
  blocks: [
    grid({
      columns: [
        { title: 'code', quantity: 'text', width: 140 },
        { title: 'description', quantity: 'text', width: 240, absent: 'added for this job' },
        { title: 'latitude', quantity: 'angle', required: true, limits: { min: -66, max: 66 } },
        { title: 'elevation', quantity: 'length', absent: 0, limits: { min: -500, max: 6000, in: 'si' } },
        {
          title: 'design temperature',
          quantity: 'temperature',
          required: true,
          limits: { min: -60, max: 50, in: 'si' },
        },
        {
          title: 'ground snow load',
          quantity: 'pressure',
          required: true,
          limits: { min: 0, max: 20, in: 'si' },
        },
        { title: 'wind speed', quantity: 'speed', required: true, limits: { min: 0, max: 120, in: 'si' } },
        ...monthly,
        { title: 'source', quantity: 'text', width: 320, absent: 'typed for this job' },
      ],
      rows: places.map(row),
      table: { name: 'sites', label: 'Sites' },
    }),
  ],
}
