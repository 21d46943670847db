import { check, computed, constant, heading, type Line } from '../declare'

/** Areas of heat, without overhang, and the conductance of all that is around the house. */
export const surfaceTotals: readonly Line[] = [
  heading('All surfaces'),
  computed({
    name: 'roof_area',
    label: 'Roof area',
    quantity: 'area',
    formula: '=SUMIFS(surface_gross_area,surface_part,"roof")',
    source: 'geometry',
    note: 'Without overhang.',
  }),
  computed({
    name: 'side_wall_area',
    label: 'Side wall area',
    quantity: 'area',
    formula: '=SUMIFS(surface_gross_area,surface_part,"side")',
    source: 'geometry',
    note: 'Knee wall and openings included.',
  }),
  computed({
    name: 'end_wall_area',
    label: 'End wall area',
    quantity: 'area',
    formula: '=SUMIFS(surface_gross_area,surface_part,"end")',
    source: 'geometry',
    note: 'Knee wall and openings included.',
  }),
  computed({
    name: 'knee_wall_area',
    label: 'Knee wall area',
    quantity: 'area',
    formula: '=SUM(surface_knee_wall_area)',
    source: 'geometry',
  }),
  computed({
    name: 'opening_area',
    label: 'Opening area',
    quantity: 'area',
    formula: '=SUM(opening_areas)',
    source: 'Openings',
  }),
  computed({
    name: 'covering_area',
    label: 'Covering area',
    quantity: 'area',
    formula: '=roof_area+side_wall_area+end_wall_area-knee_wall_area-opening_area',
    source: 'geometry',
    note: 'Net of openings and knee wall.',
    total: true,
  }),
  computed({
    name: 'envelope_conductance',
    label: 'Conductance of the envelope',
    quantity: 'conductance',
    formula: '=SUM(surface_conductance)+SUM(opening_conductance)',
    source: 'ASABE EP406',
    total: true,
  }),
  computed({
    name: 'day_conductance',
    label: 'Conductance with the screen drawn back',
    quantity: 'conductance',
    formula: '=SUM(surface_day_conductance)+SUM(opening_conductance)',
    source: 'ASABE EP406',
  }),
  computed({
    name: 'average_u_value',
    label: 'Average U-value',
    quantity: 'u-value',
    formula: '=envelope_conductance/(roof_area+side_wall_area+end_wall_area)',
    source: 'definition',
  }),
  check({
    name: 'opening_fit_check',
    label: 'Openings fit their surface',
    about: 'opening_area',
    severity: 'impossible',
    formula:
      '=IF(MIN(surface_net_area)<-0.000001,"Expected openings no larger than the surface that they are in","in order")',
    source: 'geometry',
  }),
  check({
    name: 'opening_surface_check',
    label: 'Openings name a surface',
    about: 'opening_area',
    severity: 'impossible',
    formula:
      '=IF(ABS(opening_area-SUM(surface_opening_area))>0.000001,"Expected every opening to name a surface of this sheet","in order")',
    source: 'the workbook’s own',
  }),
  constant({
    name: 'u_value_tolerance',
    label: 'U-value that counts as far from the table',
    quantity: 'ratio',
    value: 0.2,
    source: 'common practice, no source',
  }),
  check({
    name: 'u_value_check',
    label: 'U-values near the table',
    about: 'surface_u_value',
    severity: 'warning',
    formula:
      '=IF(MAX(surface_u_off_table)>u_value_tolerance,"The U-value of a surface is far from its covering’s in the table","in order")',
    source: 'Coverings',
  }),
]
