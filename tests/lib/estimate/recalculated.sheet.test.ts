import { afterAll, expect, test } from 'vitest'
import { buildWorkbook, frameTypes, type WorkbookRequest } from '@/lib/estimate'
import { unitSystems } from '@/lib/units'
import type { CellAddress } from '@/lib/workbook'
import { createEngine } from '@/lib/workbook/engine'
import { compareRecalculated, type Exported } from '../../_support/spreadsheet'
import { xlsxBytes } from '../../_support/xlsx-bytes'

const close: (() => void)[] = []
afterAll(() => {
  for (const one of close) one()
})

const shapes: Readonly<Record<string, WorkbookRequest['inputs']>> = {
  gable: { bay_count: 2, knee_wall_height: `2'`, overhang: `6"` },
  'lean-to': {
    frame_width: `10'`,
    front_wall_tilt: 70,
    roof_covering: 'GLASS-2',
    fuel: 'PROPANE',
    rounding_step: 5,
  },
  'single-slope': {
    front_wall_tilt: 60,
    screen_resistance: 'R 1.2',
    side_covering: 'PANEL-50',
    roof_covering: 'PC-TWIN-10',
    purlin_spans: 'two',
  },
  hoop: {
    eave_height: 0,
    ridge_height: `13'`,
    roof_covering: 'FILM-2-IR',
    latitude: -35,
    heater_allowance: 1,
  },
  gothic: {
    ridge_height: `21'`,
    roof_covering: 'FILM-1',
    end_covering: 'ADDED',
    site_code: 'SALTREACH',
    freight_zone: 'FAR',
  },
}

/** The file's stored values are all wrong, so that agreement shows that they were computed anew. */
async function exported(request: WorkbookRequest, name: string): Promise<Exported> {
  const built = buildWorkbook(request)
  if (!built.ok) throw new Error(built.failure.text)
  const workbook = built.value
  const engine = createEngine(workbook)
  close.push(() => engine.destroy())
  const values = (address: CellAddress) => engine.value(address)
  const wrong = (address: CellAddress) => {
    const value = values(address)
    return typeof value === 'number' ? value + 1 : typeof value === 'string' ? `${value}?` : value
  }
  return { name, bytes: await xlsxBytes(workbook, wrong), workbook, values }
}

test('[D2] every frame type in both systems recalculates elsewhere to the same values, with no error cell', async () => {
  const files: Exported[] = []
  for (const type of frameTypes) {
    for (const system of unitSystems) {
      const request: WorkbookRequest = {
        system,
        inputs: { ...shapes[type], frame_type: type },
        openings: [
          { surface: 'Front roof', width: `2'`, height: `3'`, count: type === 'hoop' ? 1 : 2 },
        ].filter(() => type !== 'hoop'),
        overrides: { Coverings: { ADDED: { resistance: 'R 1.1', price: 1 } } },
      }
      files.push(await exported(request, `${type} ${system}`))
    }
  }
  const { differences, formulas } = await compareRecalculated(files)
  expect(differences.slice(0, 20)).toEqual([])
  expect(formulas).toBeGreaterThan(files.length * 300)
})
