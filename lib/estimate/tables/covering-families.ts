import { type GridRow, si } from '../declare'

export interface Family {
  readonly family: string
  readonly ultraviolet: string
  readonly expansion: number
  readonly coldest: number
  readonly hottest: number
  readonly life: number
  readonly snow: string
  readonly joint: string
}

export const film: Family = {
  family: 'film',
  ultraviolet: 'stabilised; ages in the sun',
  expansion: 1.8e-4,
  coldest: -40,
  hottest: 60,
  life: 4,
  snow: 'tears; sheds snow when taut',
  joint: 'locked in a channel',
}
export const glass: Family = {
  family: 'glass',
  ultraviolet: 'stable',
  expansion: 9e-6,
  coldest: -60,
  hottest: 110,
  life: 30,
  snow: 'overhead only as safety glass',
  joint: 'bar',
}
export const acrylic: Family = {
  family: 'acrylic',
  ultraviolet: 'stable',
  expansion: 7e-5,
  coldest: -40,
  hottest: 70,
  life: 20,
  snow: 'brittle under hail',
  joint: 'profile',
}
export const polycarbonate: Family = {
  family: 'polycarbonate',
  ultraviolet: 'protected on the weather side',
  expansion: 6.5e-5,
  coldest: -40,
  hottest: 120,
  life: 15,
  snow: 'tough; never stepped on',
  joint: 'profile',
}
export const panel: Family = {
  family: 'panel',
  ultraviolet: 'opaque facing',
  expansion: 1.2e-5,
  coldest: -40,
  hottest: 80,
  life: 30,
  snow: 'by its own load table',
  joint: 'tongue and groove',
}

export interface Product {
  readonly layers: number
  /** mm */
  readonly thick: number
  /** h·ft²·°F/Btu */
  readonly r: number
  readonly light: number
  readonly diffuse: number
  readonly look: 'clear' | 'diffusing' | 'opaque'
  /** kg/m² */
  readonly weight: number
  readonly bending: 'freely' | 'cold' | 'flat only'
  /** mm */
  readonly bend: number
  readonly stock: string
  readonly profiles: readonly [joint: string, end: string, fixing: string]
  /** $/ft² */
  readonly price: number
  readonly source: string
}

/** Spans in metres at 1 kPa; of film, the spacing of its bows. */
const spans: Readonly<Record<string, number>> = {
  'FILM-1': 1.5,
  'FILM-1-IR': 1.5,
  'FILM-2': 1.5,
  'FILM-2-IR': 1.5,
  'GLASS-1': 0.75,
  'GLASS-2': 0.9,
  'ACRYL-1': 0.4,
  'ACRYL-TWIN-16': 1.3,
  'PC-CORR': 1.05,
  'PC-TWIN-3': 0.55,
  'PC-TWIN-4': 0.65,
  'PC-TWIN-6': 0.9,
  'PC-TWIN-8': 1.1,
  'PC-TWIN-10': 1.25,
  'PC-TRIPLE-8': 1.15,
  'PC-TRIPLE-10': 1.3,
  'PC-TRIPLE-16': 1.7,
  'PC-FIVE-25': 2.2,
  'PANEL-50': 2.4,
}
const strengthOverStiffness = 1.25

export function covering(code: string, description: string, of: Family, it: Product): GridRow {
  return {
    code,
    description,
    family: of.family,
    layers: it.layers,
    thickness: si(it.thick),
    resistance: it.r,
    'light transmittance': it.light,
    'diffuse light transmittance': it.diffuse,
    light: it.look,
    ultraviolet: of.ultraviolet,
    weight: si(it.weight),
    'expansion coefficient': si(of.expansion),
    bending: it.bending,
    'minimum bend radius': si(it.bend),
    'span by stiffness': si(spans[code] ?? 0),
    'span by strength': si((spans[code] ?? 0) * strengthOverStiffness),
    'lowest service temperature': si(of.coldest),
    'highest service temperature': si(of.hottest),
    life: of.life,
    'impact and snow': of.snow,
    'stock sheet': it.stock,
    joint: of.joint,
    'joint profile': it.profiles[0],
    'end profile': it.profiles[1],
    fixing: it.profiles[2],
    price: it.price,
    'source of the properties': it.source,
    'source of the price': 'invented (demo)',
  }
}

export const none = ['NONE', 'LOCK', 'NONE'] as const
export const bars = ['BAR', 'NONE', 'CLIP'] as const
export const size = (mm: number) => [`H-${mm}`, `U-${mm}`, 'SCREW'] as const
export const sheets = 'R and light: trade data sheets (ASTM C976); life: extension texts'
export const ashrae = 'R: ASHRAE table of greenhouse coverings, from memory; light: extension lectures'
export const memory = 'typical of trade data sheets, from memory'

export const fit = 'common practice, no source'
