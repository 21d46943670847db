import { check, computed, constant, heading, input, type Line, lookUp, si } from '../declare'

const screen = 'A preliminary screen: the local code and a licensed engineer decide.'
const roofFixing = lookUp('coverings', 'roof_covering', 'fixing')

/** P7 A fixing holds the uplift on its share of a purlin: net pressure × purlin spacing × its own spacing. */
export const fixingLines: readonly Line[] = [
  heading('Fixings of the roof'),
  input({
    name: 'fixing_holding',
    label: 'Weight that one fixing may hold',
    quantity: 'mass',
    value: 120,
    limits: { above: 0, max: 1e6 },
    source: 'invented (demo)',
    note: 'The least of what pulls the screw out and the washer through, by their makers’ tables.',
  }),
  constant({
    name: 'pressure_of_mass',
    label: 'Pressure of a mass on an area',
    quantity: 'number',
    digits: 6,
    value: '=IF(unit_system="us",1,9.80665/1000)',
    unit: '=IF(unit_system="us","psf in lb/ft²","kPa in kg/m²")',
    source: 'NIST SP 811: standard fall',
  }),
  computed({
    name: 'roof_uplift',
    label: 'Uplift on the roof sheets',
    quantity: 'pressure',
    formula: '=velocity_pressure*roof_wind_coefficient',
    source: 'velocity pressure × net coefficient; the sheets’ own weight left out',
    note: screen,
  }),
  computed({
    name: 'allowable_fixing_spacing',
    label: 'Allowable spacing along a purlin',
    quantity: 'length',
    formula: '=fixing_holding*pressure_of_mass/(MAX(roof_uplift,reference_pressure/1000)*purlin_spacing)',
    source: 'definition',
    note: screen,
    total: true,
  }),
  computed({
    name: 'edge_fixing_spacing',
    label: 'Spacing along edges and corners',
    quantity: 'length',
    formula: '=fixing_spacing/2',
    source: 'common practice, no source: half of that in the field',
  }),
  check({
    name: 'fixing_check',
    label: 'Fixing spacing',
    about: 'fixing_spacing',
    severity: 'error',
    formula: `=IF(AND(${roofFixing}<>"NONE",fixing_spacing>allowable_fixing_spacing*1.000001),"The fixings stand wider than the screen allows for the uplift on the roof","in order")`,
    source: 'above',
    note: screen,
  }),
]

/** Room to move: each end takes half of what a sheet that is held in its middle does. */
export const gapLines: readonly Line[] = [
  computed({
    name: 'sheet_end_gap',
    label: 'Gap at each end of it',
    quantity: 'small-length',
    formula: '=expansion_allowance/2',
    source: 'half of the growth at either end',
    note: 'A joint between two ends needs twice this.',
  }),
  constant({
    name: 'least_hole_oversize',
    label: 'Least oversize of a hole',
    quantity: 'small-length',
    value: si(3),
    source: 'common practice: shank and 3 mm, from memory',
  }),
  computed({
    name: 'hole_oversize',
    label: 'Oversize of its holes',
    quantity: 'small-length',
    formula: '=MAX(least_hole_oversize,expansion_movement/2)',
    source: 'movement of an end, either way',
  }),
]
