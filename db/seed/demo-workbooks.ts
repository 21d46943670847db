import type { NewWorkbook } from '../access/workbooks'

/** Sites, clients and sizes are invented; Underfell is a county that does not exist. */
const underfell = {
  latitude: 44.1,
  site_elevation: 640,
  outside_design_temperature: -4,
  site_address: 'Underfell County (made up)',
}

export const demoWorkbooks: readonly (NewWorkbook & { readonly id: string })[] = [
  {
    id: '5f1d7a52-3c64-4b8e-9a0d-1e2f60a7c201',
    title: 'Four-season growing house, Pennywhistle Cottage',
    frame: 'lean-to',
    system: 'us',
    inputs: {
      ...underfell,
      job_title: 'Four-season growing house',
      client_name: 'Pennywhistle Cottage (demo)',
      frame_width: 14,
      frame_length: 32,
      eave_height: 7,
      ridge_height: 12.5,
      knee_wall_height: 2,
      roof_covering: 'PC-TRIPLE-16',
      side_covering: 'PC-TRIPLE-16',
      end_covering: 'PC-TWIN-10',
    },
  },
  {
    id: '5f1d7a52-3c64-4b8e-9a0d-1e2f60a7c202',
    title: 'Three-season hoop house, Thistledown School',
    frame: 'hoop',
    system: 'us',
    inputs: {
      ...underfell,
      job_title: 'Three-season hoop house',
      client_name: 'Thistledown School (demo)',
      outside_design_temperature: 25,
      inside_night_temperature: 45,
      frame_width: 30,
      frame_length: 72,
      eave_height: 4,
      ridge_height: 15,
      roof_covering: 'FILM-2-IR',
      side_covering: 'FILM-2-IR',
      end_covering: 'PC-TWIN-8',
      air_changes_per_hour: 0.75,
    },
  },
  {
    id: '5f1d7a52-3c64-4b8e-9a0d-1e2f60a7c203',
    title: 'Glass lean-to, Mossgate Row',
    frame: 'lean-to',
    system: 'si',
    inputs: {
      ...underfell,
      job_title: 'Glass lean-to',
      client_name: 'Mossgate Row (demo)',
      site_elevation: 195,
      outside_design_temperature: -20,
      frame_width: 3.2,
      frame_length: 6.4,
      eave_height: 2.1,
      ridge_height: 3.4,
      knee_wall_height: 0.6,
      roof_covering: 'GLASS-2',
      side_covering: 'GLASS-2',
      end_covering: 'GLASS-1',
      air_changes_per_hour: 1.5,
    },
  },
]
