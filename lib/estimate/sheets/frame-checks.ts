import { type CheckLine, check, inOrder } from '../declare'

/** The inputs that decide whether a house can stand, in the workbook's units. */
export interface House {
  readonly frame_type: string
  readonly frame_width: number
  readonly eave_height: number
  readonly ridge_height: number
  readonly knee_wall_height: number
  readonly front_wall_tilt: number
  readonly bay_count: number
}

interface HouseRule {
  /** What is wrong, with what was expected. */
  readonly says: string
  /** The same condition twice: in the workbook, and before a workbook is made. */
  readonly when: string
  readonly wrong: (house: House) => boolean
}

const oneSlope = (type: string): boolean => type === 'lean-to' || type === 'single-slope'

/** G4 An impossible house is refused before it is made, and its check says why once it is edited into being. */
function rule(name: string, label: string, about: keyof House, rules: readonly HouseRule[]) {
  const formula = rules.reduceRight((rest, { when, says }) => `IF(${when},"${says}",${rest})`, `"${inOrder}"`)
  const line: CheckLine = check({
    name,
    label,
    about,
    severity: 'impossible',
    formula: `=${formula}`,
    source: 'geometry',
  })
  return { line, about, rules }
}

export const frameChecks = [
  rule('frame_type_check', 'Frame type', 'frame_type', [
    {
      says: 'Expected a frame type of gable, lean-to, single-slope, hoop or gothic',
      when: 'ISNA(MATCH(frame_type,{"gable","lean-to","single-slope","hoop","gothic"},0))',
      wrong: ({ frame_type }) => !['gable', 'lean-to', 'single-slope', 'hoop', 'gothic'].includes(frame_type),
    },
  ]),
  rule('ridge_check', 'Ridge above eave', 'ridge_height', [
    {
      says: 'Expected a ridge height above the eave height',
      when: 'ridge_height<=eave_height',
      wrong: ({ ridge_height, eave_height }) => ridge_height <= eave_height,
    },
    {
      says: 'Expected a gothic arch that rises at least half its width above the eave',
      when: 'AND(frame_type="gothic",ridge_height-eave_height<frame_width/2*(1-0.000000001))',
      wrong: ({ frame_type, ridge_height, eave_height, frame_width }) =>
        frame_type === 'gothic' && ridge_height - eave_height < (frame_width / 2) * (1 - 1e-9),
    },
  ]),
  rule('knee_wall_check', 'Knee wall below eave', 'knee_wall_height', [
    {
      says: 'Expected a knee wall no higher than the eave',
      when: 'knee_wall_height>eave_height',
      wrong: ({ knee_wall_height, eave_height }) => knee_wall_height > eave_height,
    },
  ]),
  rule('front_wall_check', 'Front wall', 'front_wall_tilt', [
    {
      says: 'Expected an upright front wall (90°): only a lean-to or single slope may lean',
      when: 'AND(front_wall_tilt<>90,frame_type<>"lean-to",frame_type<>"single-slope")',
      wrong: ({ front_wall_tilt, frame_type }) => front_wall_tilt !== 90 && !oneSlope(frame_type),
    },
  ]),
  rule('bay_check', 'Bays', 'bay_count', [
    {
      says: 'Expected one bay: a lean-to or single slope is not gutter-connected',
      when: 'AND(bay_count>1,OR(frame_type="lean-to",frame_type="single-slope"))',
      wrong: ({ bay_count, frame_type }) => bay_count > 1 && oneSlope(frame_type),
    },
  ]),
] as const
