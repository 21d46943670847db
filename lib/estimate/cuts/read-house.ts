import { fail, type Result, succeed } from '../../failures'
import {
  type Covering,
  type HouseInput,
  type HouseOpening,
  type Joining,
  type ProfileStock,
  type SurfaceKind,
  surfaceKinds,
} from '../../glazing'
import { convert, type Quantity, type UnitSystem } from '../../units'
import type { Engine, Workbook } from '../../workbook'
import { nearest, quoted } from '../nearest'
import { type FrameType, frameTypes } from '../sheets/frame'
import { asNumber, asText, readTable, rowOf, type TableRow, texts } from './table'

/** °C; used where the workbook has no such input. */
const temperatures = {
  /** Trade data sheets: fit sheets at 55 to 70 °F. */
  fitting_temperature: 16,
  /** Of a clear sheet in summer sun; from memory. */
  highest_sheet_temperature: 60,
  lowest_sheet_temperature: -20,
} as const

/**
 * The house of a computed workbook, in its units, ready to lay out.
 * Errors: `invalid` with the input that is not what was expected (a cell that a person has edited since).
 */
export function readHouse(workbook: Workbook, engine: Engine): Result<HouseInput> {
  const { system } = workbook
  const wrong: { name: string; expected: string }[] = []
  const number = (name: string): number => {
    const value = asNumber(engine.named(name)?.[0])
    if (value === undefined) wrong.push({ name, expected: 'a number' })
    return value ?? 1
  }
  const kind = asText(engine.named('frame_type')?.[0])
  const frameKind = frameTypes.find((type) => type === kind)
  if (!frameKind) wrong.push({ name: 'frame_type', expected: frameTypes.join(', ') })
  const frame = {
    kind: frameKind ?? ('gable' satisfies FrameType),
    width: number('frame_width'),
    length: number('frame_length'),
    eave: number('eave_height'),
    ridge: number('ridge_height'),
    kneeWall: number('knee_wall_height'),
    frontTilt: number('front_wall_tilt'),
    overhang: number('overhang'),
    bays: number('bay_count'),
  }
  const purlinSpacing = number('purlin_spacing')
  const rafterSpacing = number('rafter_spacing')
  if (!(purlinSpacing > 0)) wrong.push({ name: 'purlin_spacing', expected: 'a spacing above 0' })
  if (!(rafterSpacing > 0)) wrong.push({ name: 'rafter_spacing', expected: 'a spacing above 0' })
  const [first] = wrong
  if (first) return fail('invalid', `${first.name}: expected ${first.expected}.`, { name: first.name })
  const names = texts(engine.named('surface_name'))
  const chosen = texts(engine.named('surface_covering'))
  const coveringOf = Object.fromEntries(
    surfaceKinds.map((surface) => [surface, chosen[names.indexOf(surface)] ?? '']),
  ) as Record<SurfaceKind, string>
  const coverings = readCoverings(engine, system, new Set(Object.values(coveringOf)))
  if (!coverings.ok) return coverings
  const openings = readOpenings(workbook, engine)
  if (!openings.ok) return openings
  const temperature = (name: keyof typeof temperatures): number =>
    asNumber(engine.named(name)?.[0]) ?? convert(temperatures[name], 'temperature', 'si', system)
  return succeed({
    lengthUnit: system === 'us' ? 'ft' : 'm',
    frame,
    purlinSpacing,
    rafterSpacing,
    openings: openings.value,
    coverings: coverings.value,
    coveringOf,
    trims: readTable(engine, 'profiles').rows.map(profileOf),
    temperatures: {
      fitting: temperature('fitting_temperature'),
      lowest: temperature('lowest_sheet_temperature'),
      highest: temperature('highest_sheet_temperature'),
    },
  })
}

function profileOf(row: TableRow): ProfileStock {
  return {
    code: row.text('code'),
    kind: row.text('kind'),
    length: row.number('stock length'),
    price: row.number('price'),
  }
}

/** T20 A covering is cut from every sheet of it in stock; from the one its row names where it has none of its own. */
function readCoverings(engine: Engine, system: UnitSystem, used: ReadonlySet<string>): Result<Covering[]> {
  const sheets = readTable(engine, 'sheets_in_stock').rows
  const profiles = readTable(engine, 'profiles').rows.map(profileOf)
  const rows = readTable(engine, 'coverings').rows
  const inLength = (value: number, quantity: Quantity): number =>
    convert(convert(value, quantity, system, 'si') / 1000, 'length', 'si', system)
  const made: Covering[] = []
  for (const code of used) {
    const row = rows.find((one) => one.text('code') === code)
    if (!row) {
      const known = rows.map((one) => one.text('code'))
      return fail(
        'invalid',
        `Expected a covering of the Coverings table; the nearest to ${quoted(code)} is ${nearest(code, known)}.`,
      )
    }
    const own = sheets.filter((sheet) => sheet.text('covering') === code)
    const named = sheets.filter((sheet) => sheet.text('code') === row.text('stock sheet'))
    const bendings = ['freely', 'cold', 'flat only'] as const
    const profile = (title: string): ProfileStock | undefined =>
      profiles.find((one) => one.code === row.text(title) && one.kind !== 'none')
    const [joint, end] = [profile('joint profile'), profile('end profile')]
    made.push({
      code,
      family: row.text('family'),
      layers: Math.max(1, row.number('layers')),
      thickness: inLength(row.number('thickness'), 'small-length'),
      joining: joiningOf(row, joint),
      expansion: row.number('expansion coefficient'),
      bending: bendings.find((bending) => bending === row.text('bending')) ?? 'flat only',
      smallestRadius: inLength(row.number('minimum bend radius'), 'small-length'),
      stock: (own.length > 0 ? own : named)
        .map((sheet) => ({
          width: sheet.number('width'),
          length: sheet.number('length'),
          price: sheet.number('price'),
        }))
        .filter((sheet) => sheet.width > 0 && sheet.length > 0),
      areaPrice: row.number('price'),
      ...(joint ? { jointProfile: joint } : {}),
      ...(end ? { endProfile: end } : {}),
    })
  }
  return succeed(made)
}

function joiningOf(row: TableRow, joint: ProfileStock | undefined): Joining {
  if (row.text('family') === 'film') return 'channel'
  if (row.text('family') === 'glass' || row.text('joint') === 'bar') return 'bar'
  if (row.text('joint') === 'tongue and groove') return 'butt'
  return joint ? 'profile' : 'lap'
}

/** Rows of the Openings sheet by its headings; rows without an area are blank. */
function readOpenings(workbook: Workbook, engine: Engine): Result<HouseOpening[]> {
  const area = workbook.names.get('opening_surface')?.area
  if (!area) throw new Error('no openings')
  const at = (row: number, column: number) => engine.value({ sheet: area.sheet, row, column })
  const titles = Array.from({ length: 20 }, (_, column) => asText(at(area.row - 1, column)))
  const openings: HouseOpening[] = []
  for (let row = area.row; row < area.row + area.rowCount; row += 1) {
    const cell = rowOf((title) => at(row, titles.indexOf(title)))
    const optional = (title: string) => asNumber(at(row, titles.indexOf(title)))
    const [width, height, count] = [cell.number('Width'), cell.number('Height'), cell.number('Count')]
    if (!(width * height * count > 0)) continue
    const name = cell.text('Opening')
    const surface = surfaceKinds.find((kind) => kind === cell.text('Surface'))
    if (!surface || !Number.isInteger(count))
      return fail('invalid', `${name || 'An opening'}: expected a surface of the house and a whole count.`)
    const [along, up] = [optional('Along'), optional('Up')]
    openings.push({
      name,
      kind: cell.text('Kind'),
      surface,
      width,
      height,
      count,
      ...(along === undefined ? {} : { along }),
      ...(up === undefined ? {} : { up }),
    })
  }
  return succeed(openings)
}
