import { computed, heading, input, type Limits, lines, type SheetDeclaration } from '../declare'
import { frameChecks } from './frame-checks'

export const frameTypes = ['gable', 'lean-to', 'single-slope', 'hoop', 'gothic'] as const
export type FrameType = (typeof frameTypes)[number]

const size: Limits = { above: 0, max: 1000, in: 'si' }
const orNone: Limits = { min: 0, max: 1000, in: 'si' }
const drawing = 'drawing or site measurement'
const geometry = 'geometry'

/**
 * G1 `ridge_height` is the top of the frame above grade, for every type; heat areas stop at the eave, without overhang.
 * G2 A hoop is a circular arc of any rise, below, at or beyond a half circle; a gothic arch is upright at its eaves.
 * G3 A lean-to leans on a heated wall: no back wall and no perimeter along it. A single slope has a back wall.
 */
export const frame: SheetDeclaration = {
  id: 'frame',
  name: 'Frame',
  kind: 'step',
  about: 'Type and size of the frame; everything on Surfaces follows.',
  blocks: [
    lines(
      input({
        name: 'frame_type',
        label: 'Frame type',
        quantity: 'text',
        value: 'gable',
        choices: frameTypes,
        source: drawing,
      }),
      input({
        name: 'frame_width',
        label: 'Width of a bay',
        quantity: 'length',
        value: 24,
        limits: size,
        source: drawing,
        note: 'For a lean-to or single slope, the run of the slope.',
      }),
      input({
        name: 'frame_length',
        label: 'Length',
        quantity: 'length',
        value: 48,
        limits: size,
        source: drawing,
      }),
      input({
        name: 'eave_height',
        label: 'Eave height',
        quantity: 'length',
        value: 8,
        limits: orNone,
        source: drawing,
        note: 'Above grade; 0 for a hoop that stands on the ground.',
      }),
      input({
        name: 'ridge_height',
        label: 'Ridge height',
        quantity: 'length',
        value: 14,
        limits: size,
        source: drawing,
        note: 'Top of the frame above grade; for a lean-to or single slope the high edge.',
      }),
      input({
        name: 'knee_wall_height',
        label: 'Knee wall height',
        quantity: 'length',
        value: 0,
        limits: orNone,
        source: drawing,
        note: 'Opaque base wall all round, below the covering.',
      }),
      input({
        name: 'front_wall_tilt',
        label: 'Tilt of the front wall',
        quantity: 'angle',
        value: 90,
        limits: { min: 45, max: 90 },
        source: drawing,
        note: '90 is upright; only a lean-to or single slope may have less.',
      }),
      input({
        name: 'overhang',
        label: 'Overhang at the eaves',
        quantity: 'length',
        value: 0,
        limits: orNone,
        source: drawing,
        note: 'Along the slope; bought and cut, but no heat area.',
      }),
      input({
        name: 'bay_count',
        label: 'Bays',
        quantity: 'count',
        value: 1,
        limits: { min: 1, max: 200, whole: true },
        source: drawing,
        note: 'Gutter-connected, each of the width above.',
      }),
      input({
        name: 'purlin_spacing',
        label: 'Purlin spacing',
        quantity: 'length',
        value: 4,
        limits: size,
        source: drawing,
      }),
      input({
        name: 'rafter_spacing',
        label: 'Rafter spacing',
        quantity: 'length',
        value: 4,
        limits: size,
        source: drawing,
      }),
      heading('Covering'),
      input({
        name: 'roof_covering',
        label: 'Roof covering',
        quantity: 'text',
        value: 'PC-TRIPLE-16',
        choices: 'coverings',
        source: 'estimator’s choice',
      }),
      input({
        name: 'side_covering',
        label: 'Side covering',
        quantity: 'text',
        value: 'PC-TWIN-8',
        choices: 'coverings',
        source: 'estimator’s choice',
      }),
      input({
        name: 'end_covering',
        label: 'End covering',
        quantity: 'text',
        value: 'PC-TWIN-8',
        choices: 'coverings',
        source: 'estimator’s choice',
      }),
      input({
        name: 'knee_wall_resistance',
        label: 'Knee wall resistance',
        quantity: 'thermal-resistance',
        value: 10,
        limits: { above: 0, max: 1000 },
        source: 'common practice, no source',
      }),
      heading('Shape'),
      computed({
        name: 'roof_rise',
        label: 'Rise from eave to top',
        quantity: 'length',
        formula: '=ridge_height-eave_height',
        source: geometry,
      }),
      computed({
        name: 'slope_run',
        label: 'Run of one slope',
        quantity: 'length',
        formula: '=IF(OR(frame_type="lean-to",frame_type="single-slope"),frame_width,frame_width/2)',
        source: geometry,
      }),
      computed({
        name: 'arch_radius',
        label: 'Radius of the arch',
        quantity: 'length',
        formula:
          '=IF(frame_type="hoop",(frame_width^2/4+roof_rise^2)/(2*roof_rise),IF(frame_type="gothic",(roof_rise^2+frame_width^2/4)/frame_width,0))',
        source: geometry,
        note: '0 where the roof is flat. Hoop: circle through both eaves and the crown. Gothic: centres at eave level.',
      }),
      computed({
        name: 'arch_angle',
        label: 'Angle of half the arch',
        quantity: 'angle',
        formula:
          '=IF(frame_type="hoop",DEGREES(2*ATAN(roof_rise/slope_run)),IF(frame_type="gothic",DEGREES(2*ATAN(slope_run/roof_rise)),0))',
        source: geometry,
        note: 'The tangent of half the angle is rise over run; it holds beyond a half circle too.',
      }),
      computed({
        name: 'half_roof_length',
        label: 'Eave to top along the roof',
        quantity: 'length',
        formula:
          '=IF(OR(frame_type="hoop",frame_type="gothic"),arch_radius*RADIANS(arch_angle),SQRT(slope_run^2+roof_rise^2))',
        source: geometry,
      }),
      computed({
        name: 'roof_slope_length',
        label: 'Roof length along the flutes',
        quantity: 'length',
        formula: '=IF(frame_type="hoop",2*half_roof_length,half_roof_length)',
        source: geometry,
        note: 'A hoop’s sheets run over the whole arch.',
      }),
      computed({
        name: 'roof_pitch_angle',
        label: 'Roof pitch',
        quantity: 'angle',
        formula: '=DEGREES(ATAN(roof_rise/slope_run))',
        source: geometry,
        note: 'For an arch, the straight line from eave to crown.',
      }),
      computed({
        name: 'front_wall_length',
        label: 'Front wall along its slope',
        quantity: 'length',
        formula: '=IF(front_wall_tilt=90,eave_height,eave_height/SIN(RADIANS(front_wall_tilt)))',
        source: geometry,
      }),
      computed({
        name: 'front_setback',
        label: 'Front eave behind the front base',
        quantity: 'length',
        formula:
          '=IF(front_wall_tilt=90,0,eave_height*COS(RADIANS(front_wall_tilt))/SIN(RADIANS(front_wall_tilt)))',
        source: geometry,
      }),
      computed({
        name: 'gable_area',
        label: 'End of one bay above the eave',
        quantity: 'area',
        formula:
          '=IF(frame_type="hoop",arch_radius^2*(2*RADIANS(arch_angle)-SIN(2*RADIANS(arch_angle)))/2,IF(frame_type="gothic",arch_radius^2*RADIANS(arch_angle)-roof_rise*(arch_radius-frame_width/2),frame_width*roof_rise/2))',
        source: geometry,
        note: 'Hoop: circular segment. Gothic: two sectors less the triangles beyond the middle.',
      }),
      computed({
        name: 'end_section_area',
        label: 'End of one bay',
        quantity: 'area',
        formula: '=frame_width*eave_height+front_setback*eave_height/2+gable_area',
        source: geometry,
      }),
      computed({
        name: 'floor_area',
        label: 'Floor area',
        quantity: 'area',
        formula: '=(frame_width*bay_count+front_setback)*frame_length',
        source: geometry,
      }),
      computed({
        name: 'enclosed_volume',
        label: 'Enclosed volume',
        quantity: 'volume',
        formula: '=end_section_area*bay_count*frame_length',
        source: geometry,
      }),
      computed({
        name: 'perimeter_length',
        label: 'Exposed perimeter',
        quantity: 'length',
        formula: '=2*(frame_width*bay_count+front_setback)+IF(frame_type="lean-to",1,2)*frame_length',
        source: geometry,
        note: 'A lean-to loses nothing along the wall that it leans on.',
      }),
      heading('Check'),
      ...frameChecks.map(({ line }) => line),
    ),
  ],
}
