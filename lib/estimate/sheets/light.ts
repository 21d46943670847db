import {
  check,
  computed,
  constant,
  type GridColumn,
  grid,
  heading,
  input,
  lines,
  lookUp,
  type SheetDeclaration,
} from '../declare'
import { months } from './site'

const mccree = 'McCree 1972; Thimijan and Heins 1983, from memory'

const columns: readonly GridColumn[] = [
  { title: 'Month', quantity: 'text', ground: 'label', width: 230 },
  {
    title: 'Outside',
    quantity: 'daily-light',
    digits: 1,
    formula: '={monthly_irradiation}*light_per_irradiation',
    source: mccree,
    named: { name: 'outside_daily_light', role: 'result', label: 'Daily light outside' },
  },
  {
    title: 'Inside',
    quantity: 'daily-light',
    digits: 1,
    formula: '=[Outside]*covering_light_transmittance*frame_light_factor*dirt_light_factor',
    source: 'definition',
    named: { name: 'daily_light_integral', role: 'result', label: 'Daily light integral inside' },
  },
  {
    title: 'Of the target',
    quantity: 'ratio',
    digits: 2,
    formula: '=IF(daily_light_target=0,0,[Inside]/daily_light_target)',
    named: { name: 'light_against_target', role: 'table', label: 'light inside over the target' },
  },
  { title: 'On the front roof', quantity: 'irradiation', source: 'mean of its thirds' },
  {
    title: 'On the back roof',
    quantity: 'irradiation',
    source: 'mean of its thirds; none where there is no back roof',
  },
  {
    title: 'Sunniest roof',
    quantity: 'irradiation',
    formula: '=MAX([On the front roof],[On the back roof])',
    named: {
      name: 'roof_irradiation',
      role: 'result',
      label: 'Irradiation on the sunniest roof slope, a day',
    },
  },
]

/** Mean of the three thirds of a slope in one month; `first` is the order of its lower third. */
function roofMean(first: number, month: number): string {
  const thirds = [first, first + 1, first + 2]
  const ground = thirds.map((facet) => `{facet_area:${facet}}`).join('+')
  return `=IF(${ground}<=0,0,(${thirds.map((facet) => `{sun_irradiation:${facet * 12 + month}}`).join('+')})/3)`
}

const monthRow = (month: string, index: number) => ({
  Month: month,
  'On the front roof': roofMean(0, index),
  'On the back roof': roofMean(3, index),
})

/** L1 Light inside is light outside times what covering, frame and dirt let through. */
export const light: SheetDeclaration = {
  id: 'light',
  name: 'Light',
  kind: 'step',
  about: 'Light inside, a day, month by month, against what the crop asks for.',
  blocks: [
    lines(
      heading('Given'),
      input({
        name: 'crop',
        label: 'Crop',
        quantity: 'text',
        value: 'LETTUCE',
        choices: 'crops',
        source: 'estimator’s choice',
      }),
      input({
        name: 'daily_light_target',
        label: 'Daily light target',
        quantity: 'daily-light',
        value: `=${lookUp('crops', 'crop', 'daily light')}`,
        limits: { min: 0, max: 100 },
        source: 'Crops, unless typed here',
      }),
      input({
        name: 'frame_light_factor',
        label: 'Left by the frame',
        quantity: 'ratio',
        value: 0.9,
        limits: { min: 0, max: 1 },
        source: 'common practice, no source',
      }),
      input({
        name: 'dirt_light_factor',
        label: 'Left by dirt',
        quantity: 'ratio',
        value: 0.95,
        limits: { min: 0, max: 1 },
        source: 'common practice, no source',
      }),
      constant({
        name: 'par_fraction',
        label: 'Part of sunlight that plants use',
        quantity: 'ratio',
        digits: 3,
        value: 0.45,
        source: mccree,
      }),
      constant({
        name: 'photon_efficacy',
        label: 'Photons in a megajoule of it',
        quantity: 'number',
        digits: 2,
        value: 4.57,
        unit: 'mol/MJ',
        source: mccree,
      }),
      constant({
        name: 'megajoules_per_irradiation',
        label: 'Irradiation in MJ/m²',
        quantity: 'number',
        digits: 6,
        value: '=IF(unit_system="us",1055.05585262/0.3048^2/1000000,3.6)',
        unit: '=IF(unit_system="us","MJ/m² in Btu/ft²","MJ/m² in kWh/m²")',
        source: 'NIST SP 811: Btu(IT), foot, kilowatt-hour',
      }),
      computed({
        name: 'light_per_irradiation',
        label: 'Light in irradiation',
        quantity: 'number',
        digits: 4,
        unit: '=IF(unit_system="us","mol/m² in Btu/ft²","mol/m² in kWh/m²")',
        formula: '=par_fraction*photon_efficacy*megajoules_per_irradiation',
        source: mccree,
        note: 'About 2.06 mol in a megajoule of sunlight.',
      }),
      heading('Light'),
      computed({
        name: 'covering_light_transmittance',
        label: 'Light through the roof covering',
        quantity: 'ratio',
        formula: `=${lookUp('coverings', 'roof_covering', 'light transmittance')}`,
        ground: 'table',
        source: 'Coverings',
      }),
      computed({
        name: 'light_quality',
        label: 'Light under the roof covering',
        quantity: 'text',
        formula: `=${lookUp('coverings', 'roof_covering', 'light')}`,
        ground: 'table',
        source: 'Coverings',
      }),
      computed({
        name: 'darkest_month_light',
        label: 'Light in the darkest month',
        quantity: 'daily-light',
        digits: 1,
        formula: '=MIN(daily_light_integral)',
        source: 'below',
        total: true,
      }),
      heading('Lamps, where the sun falls short'),
      input({
        name: 'lamp_hours',
        label: 'Hours of lamps, a day',
        quantity: 'hours',
        value: 16,
        limits: { above: 0, max: 24 },
        source: 'estimator’s choice',
      }),
      constant({
        name: 'photon_seconds',
        label: 'Moles in an hour of a micromole a second',
        quantity: 'number',
        digits: 4,
        value: 0.0036,
        source: '3600 s and 10⁻⁶',
      }),
      computed({
        name: 'light_shortfall',
        label: 'Light wanting in the darkest month',
        quantity: 'daily-light',
        digits: 1,
        formula: '=MAX(0,daily_light_target-darkest_month_light)',
        source: 'target less light',
      }),
      computed({
        name: 'lamp_photon_flux',
        label: 'Lamps at the crop that make it up',
        quantity: 'number',
        digits: 0,
        unit: 'µmol/(m²·s)',
        formula: '=light_shortfall/(lamp_hours*photon_seconds)',
        source: 'definition; Purdue HO-238-W',
      }),
      heading('Check'),
      check({
        name: 'light_check',
        label: 'Light for the crop',
        about: 'daily_light_target',
        severity: 'warning',
        formula:
          '=IF(darkest_month_light<daily_light_target,"In the darkest month there is less light than the crop asks for","in order")',
        source: 'Crops',
      }),
      check({
        name: 'clear_covering_check',
        label: 'Clear covering over crops',
        about: 'roof_covering',
        severity: 'note',
        formula:
          '=IF(light_quality="clear","The roof covering is clear: light is direct and casts hard shade; most crops do better under a diffusing one","in order")',
        source: 'common practice, no source',
      }),
      check({
        name: 'scorch_check',
        label: 'Scorch under clear covering',
        about: 'roof_covering',
        severity: 'warning',
        formula:
          '=IF(AND(light_quality="clear",MAX(daily_light_integral)>2*daily_light_target),"A clear covering lets direct sun scorch a crop that asks for little light: shade it, or choose a diffusing one","in order")',
        source: 'common practice, no source',
      }),
    ),
    grid({ columns, rows: months.map(monthRow) }),
  ],
}
