import {
  area,
  check,
  computed,
  constant,
  type GridColumn,
  type GridRow,
  heading,
  input,
  type Line,
  lookUp,
} from '../declare'
import { loadPoints } from '../tables/allowable-loads'

const screen = 'A preliminary screen: the local code and a licensed engineer decide.'
const beam = 'beam tables: 5wL⁴/384EI on one span, wL⁴/185EI on two equal ones'
const roof = (column: string): string => lookUp('coverings', 'roof_covering', column)
const pressure = 'MAX(roof_design_pressure,reference_pressure/1000)'

/**
 * P6 The maker's table of loads counts where there is one, interpolated between its points and
 * never beyond its longest span; stiffness and strength count always. The smallest governs.
 */
export const purlinLines: readonly Line[] = [
  heading('Purlins'),
  input({
    name: 'purlin_spans',
    label: 'Spans that a sheet runs over',
    quantity: 'text',
    value: 'one',
    choices: ['one', 'two'],
    source: 'drawing or site measurement',
    note: 'Two or more bend less; they are no stronger over the purlin between.',
  }),
  input({
    name: 'deflection_limit',
    label: 'Bend that is allowed, of the span',
    quantity: 'ratio',
    value: 0.05,
    limits: { min: 0.001, max: 1 },
    source: 'common practice, no source',
  }),
  constant({
    name: 'table_deflection',
    label: 'Bend that “span by stiffness” is for',
    quantity: 'ratio',
    value: 0.05,
    source: 'Coverings: a twentieth of the span',
  }),
  computed({
    name: 'span_bend_factor',
    label: 'Bend against that of one span',
    quantity: 'ratio',
    digits: 3,
    formula: '=IF(purlin_spans="two",(1/185)/(5/384),1)',
    source: beam,
  }),
  computed({
    name: 'roof_design_pressure',
    label: 'Pressure on the roof sheets',
    quantity: 'pressure',
    formula: '=MAX(sloped_roof_snow_load,velocity_pressure*roof_wind_coefficient)',
    source: 'the greater of snow and wind',
    note: screen,
  }),
  computed({
    name: 'table_spacing',
    label: 'Spacing by the table of loads',
    quantity: 'length',
    formula: `=IF(INDEX(load_span,1)=0,0,IF(INDEX(span_load,1)<${pressure},INDEX(load_span,1)*INDEX(span_load,1)/${pressure},MAX(span_reach)))`,
    source: 'Allowable loads, interpolated; 0 where the covering has none',
    note: 'Above the first load the span shrinks as the load grows.',
  }),
  computed({
    name: 'stiffness_spacing',
    label: 'Spacing by stiffness',
    quantity: 'length',
    formula: `=${roof('span by stiffness')}*(reference_pressure/${pressure}*deflection_limit/table_deflection/span_bend_factor)^(1/3)`,
    source: beam,
    note: screen,
  }),
  computed({
    name: 'strength_spacing',
    label: 'Spacing by strength',
    quantity: 'length',
    formula: `=${roof('span by strength')}*(reference_pressure/${pressure})^(1/2)`,
    source: 'beam tables: wL²/8, on one span and on two',
    note: screen,
  }),
  computed({
    name: 'allowable_purlin_spacing',
    label: 'Allowable purlin spacing',
    quantity: 'length',
    formula: '=MIN(stiffness_spacing,strength_spacing,IF(table_spacing=0,stiffness_spacing,table_spacing))',
    source: 'the smallest governs',
    note: screen,
    total: true,
  }),
  computed({
    name: 'spacing_governed_by',
    label: 'Governed by',
    quantity: 'text',
    formula:
      '=IF(AND(table_spacing>0,table_spacing<=MIN(stiffness_spacing,strength_spacing)),"table of loads",IF(stiffness_spacing<=strength_spacing,"stiffness","strength"))',
    source: 'the smallest governs',
  }),
  computed({
    name: 'roof_sheet_bend',
    label: 'Bend of the sheets between purlins',
    quantity: 'small-length',
    formula: `=IF(${roof('span by stiffness')}=0,0,purlin_spacing*small_lengths*table_deflection*span_bend_factor*(purlin_spacing/${roof('span by stiffness')})^3*roof_design_pressure/reference_pressure)`,
    source: beam,
    note: 'At the pressure above.',
  }),
  check({
    name: 'purlin_check',
    label: 'Purlin spacing',
    about: 'purlin_spacing',
    severity: 'error',
    formula:
      '=IF(allowable_purlin_spacing=0,"The roof covering has no span in its table",IF(purlin_spacing>allowable_purlin_spacing*1.000001,"The purlins stand wider than the screen allows for the roof covering","in order"))',
    source: 'above',
    note: screen,
  }),
]

/** Points of the roof covering's table of loads, and how far each reaches at the pressure on the roof. */
export const loadColumns: readonly GridColumn[] = [
  { title: 'Table of loads', quantity: 'text', ground: 'label', width: 230 },
  {
    title: 'Span',
    quantity: 'length',
    ground: 'table',
    named: area('load_span', 'spans of the table of loads'),
  },
  { title: 'Load', quantity: 'pressure', ground: 'table', named: area('span_load', 'loads of those spans') },
  {
    title: 'Reaches',
    quantity: 'length',
    source: 'the span itself, or between it and the next; 0 where it carries less',
    named: area('span_reach', 'spans that carry the pressure on the roof'),
  },
]

export const loadRows: readonly GridRow[] = Array.from({ length: loadPoints }, (_, at) => {
  const of = (column: string): string =>
    `=IFERROR(${lookUp('allowable_loads', 'roof_covering', `${column} ${at + 1}`)},0)`
  const [span, load] = [`{load_span:${at + 1}}`, `{span_load:${at + 1}}`]
  const further = `IF(OR(${span}=0,${load}>=${pressure}),[Span],[Span]+([Load]-${pressure})/([Load]-${load})*(${span}-[Span]))`
  return {
    'Table of loads': `Point ${at + 1}`,
    Span: of('span'),
    Load: of('load'),
    Reaches: `=IF([Load]<${pressure},0,${at + 1 === loadPoints ? '[Span]' : further})`,
  }
})
