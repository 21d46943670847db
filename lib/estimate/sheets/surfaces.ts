import { area, grid, lines, lookUp, type SheetDeclaration } from '../declare'
import { surfaceTotals } from './surface-totals'

/** Rows that a frame type does not have keep their place with no width, so that formulas hold for every type. */
export const surfaceNames = [
  'Front roof',
  'Back roof',
  'Arch roof',
  'Front wall',
  'Back wall',
  'Left end',
  'Right end',
] as const
export const kneeWall = 'Knee wall'

const azimuth = (turn: number) => `=MOD(ridge_azimuth+${turn},360)`
const end = {
  Part: 'end',
  Tilt: 90,
  Width: '=frame_width+front_setback',
  'Flute length': '=ridge_height',
  Count: '=bay_count',
  'Gross area': '=end_section_area*[Count]',
  'Knee wall':
    '=IF(eave_height=0,0,knee_wall_height*frame_width+front_setback*(knee_wall_height-knee_wall_height^2/(2*eave_height)))*[Count]',
  Covering: '=end_covering',
}

/** H1 Conductance is net area over resistance, the screen's added where it is drawn; openings and knee wall have their own. */
export const surfaces: SheetDeclaration = {
  id: 'surfaces',
  name: 'Surfaces',
  kind: 'step',
  about: 'One row a surface. Areas follow the frame; pick a covering for each.',
  blocks: [
    grid({
      columns: [
        {
          title: 'Surface',
          quantity: 'text',
          ground: 'label',
          width: 230,
          named: area('surface_name', 'surfaces'),
        },
        {
          title: 'Part',
          quantity: 'text',
          ground: 'label',
          choices: ['roof', 'side', 'end', 'knee wall'],
          named: area('surface_part', 'parts of the house'),
        },
        {
          title: 'Faces',
          quantity: 'angle',
          digits: 0,
          named: area('surface_azimuth', 'azimuths of the surfaces'),
        },
        { title: 'Tilt', quantity: 'angle', digits: 1, named: area('surface_tilt', 'tilts of the surfaces') },
        { title: 'Width', quantity: 'length', named: area('surface_width', 'widths along the eave') },
        {
          title: 'Flute length',
          quantity: 'length',
          named: area('surface_flute_length', 'lengths along the flutes'),
        },
        {
          title: 'Count',
          quantity: 'count',
          formula: '=1',
          named: area('surface_count', 'how many there are'),
        },
        {
          title: 'Gross area',
          quantity: 'area',
          formula: '=[Width]*[Flute length]*[Count]',
          named: area('surface_gross_area', 'gross areas'),
        },
        {
          title: 'Knee wall',
          quantity: 'area',
          formula: '=0',
          named: area('surface_knee_wall_area', 'knee wall in each surface'),
        },
        {
          title: 'Openings',
          quantity: 'area',
          formula: '=SUMIFS(opening_areas,opening_surface,[Surface])',
          named: area('surface_opening_area', 'openings in each surface'),
        },
        {
          title: 'Net area',
          quantity: 'area',
          formula: '=[Gross area]-[Knee wall]-[Openings]',
          named: area('surface_net_area', 'net areas'),
        },
        {
          title: 'Covering',
          quantity: 'text',
          ground: 'input',
          choices: 'coverings',
          width: 140,
          named: area('surface_covering', 'coverings of the surfaces'),
        },
        {
          title: 'Resistance',
          quantity: 'thermal-resistance',
          ground: 'table',
          formula: `=${lookUp('coverings', '[Covering]', 'resistance')}`,
          named: area('surface_resistance', 'resistances of the coverings'),
        },
        {
          title: 'Screened',
          quantity: 'text',
          ground: 'input',
          choices: ['yes', 'no'],
          named: area('surface_screened', 'whether the night screen covers them'),
        },
        {
          title: 'U-value',
          quantity: 'u-value',
          formula: '=1/([Resistance]+IF([Screened]="yes",screen_resistance,0))',
          named: area('surface_u_value', 'U-values of the surfaces'),
        },
        {
          title: 'Conductance',
          quantity: 'conductance',
          formula: '=[Net area]*[U-value]',
          named: area('surface_conductance', 'conductances of the surfaces'),
        },
        {
          title: 'Without screen',
          quantity: 'conductance',
          formula: '=[Net area]/[Resistance]',
          named: area('surface_day_conductance', 'conductances with the screen drawn back'),
        },
      ],
      rows: [
        {
          Surface: 'Front roof',
          Part: 'roof',
          Faces: azimuth(90),
          Tilt: '=roof_pitch_angle',
          Width: '=IF(frame_type="hoop",0,frame_length)',
          'Flute length': '=half_roof_length',
          Count: '=bay_count',
          Covering: '=roof_covering',
          Screened: 'yes',
        },
        {
          Surface: 'Back roof',
          Part: 'roof',
          Faces: azimuth(270),
          Tilt: '=roof_pitch_angle',
          Width: '=IF(OR(frame_type="gable",frame_type="gothic"),frame_length,0)',
          'Flute length': '=half_roof_length',
          Count: '=bay_count',
          Covering: '=roof_covering',
          Screened: 'yes',
        },
        {
          Surface: 'Arch roof',
          Part: 'roof',
          Faces: azimuth(90),
          Tilt: {
            value: '=roof_pitch_angle',
            note: 'From eave to crown; the arch itself turns through every tilt.',
          },
          Width: '=IF(frame_type="hoop",frame_length,0)',
          'Flute length': '=roof_slope_length',
          Count: '=bay_count',
          Covering: '=roof_covering',
          Screened: 'yes',
        },
        {
          Surface: 'Front wall',
          Part: 'side',
          Faces: azimuth(90),
          Tilt: '=front_wall_tilt',
          Width: '=frame_length',
          'Flute length': '=front_wall_length',
          'Knee wall': '=IF(eave_height=0,0,[Gross area]*knee_wall_height/eave_height)',
          Covering: '=side_covering',
          Screened: 'yes',
        },
        {
          Surface: 'Back wall',
          Part: 'side',
          Faces: azimuth(270),
          Tilt: 90,
          Width: '=IF(frame_type="lean-to",0,frame_length)',
          'Flute length': '=IF(frame_type="single-slope",ridge_height,eave_height)',
          'Knee wall': '=[Width]*knee_wall_height',
          Covering: '=side_covering',
          Screened: 'yes',
        },
        { Surface: 'Left end', Faces: azimuth(180), ...end, Screened: 'yes' },
        { Surface: 'Right end', Faces: azimuth(0), ...end, Screened: 'yes' },
        {
          Surface: kneeWall,
          Part: 'knee wall',
          Tilt: 90,
          Width: '=perimeter_length',
          'Flute length': '=knee_wall_height',
          'Gross area': '=SUM(surface_knee_wall_area)',
          Covering: { ground: 'label' },
          Resistance: { value: '=knee_wall_resistance', ground: 'label' },
          Screened: { value: 'no' },
        },
      ],
      closing: 'Rows for more surfaces go above this line',
    }),
    lines(...surfaceTotals),
  ],
}
