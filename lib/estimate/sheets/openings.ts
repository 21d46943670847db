import { area, type GridRow, grid, lookUp, type SheetDeclaration } from '../declare'
import { surfaceNames } from './surfaces'

export const openingKinds = ['door', 'vent', 'window', 'fan'] as const
const spareRows = 12

/** Rows for the given openings and at least a dozen, blank ones to fill in. */
export function openings(given: readonly GridRow[]): SheetDeclaration {
  const blank = Array.from({ length: Math.max(0, spareRows - given.length) }, (): GridRow => ({}))
  return {
    id: 'openings',
    name: 'Openings',
    kind: 'step',
    about: 'Doors, vents, windows and fans; each takes its area out of the surface that it is in.',
    blocks: [
      grid({
        columns: [
          { title: 'Opening', quantity: 'text', ground: 'input', width: 200 },
          { title: 'Kind', quantity: 'text', ground: 'input', choices: openingKinds },
          {
            title: 'Surface',
            quantity: 'text',
            ground: 'input',
            choices: surfaceNames,
            named: area('opening_surface', 'surfaces of the openings'),
          },
          { title: 'Along', quantity: 'length', ground: 'input' },
          { title: 'Up', quantity: 'length', ground: 'input' },
          { title: 'Width', quantity: 'length', ground: 'input' },
          { title: 'Height', quantity: 'length', ground: 'input' },
          {
            title: 'Count',
            quantity: 'count',
            ground: 'input',
            named: area('opening_count', 'how many of each opening'),
          },
          {
            title: 'Area',
            quantity: 'area',
            formula: '=[Width]*[Height]*[Count]',
            named: area('opening_areas', 'areas of the openings'),
          },
          { title: 'Covering', quantity: 'text', ground: 'input', choices: 'coverings' },
          { title: 'Own U-value', quantity: 'u-value', ground: 'input' },
          {
            title: 'U-value',
            quantity: 'u-value',
            formula: `=IF([Area]=0,0,IF([Own U-value]>0,[Own U-value],1/${lookUp('coverings', 'IF([Covering]="",INDEX(surface_covering,MATCH([Surface],surface_name,0)),[Covering])', 'resistance')}))`,
          },
          {
            title: 'Conductance',
            quantity: 'conductance',
            formula: '=[Area]*[U-value]',
            named: area('opening_conductance', 'conductances of the openings'),
          },
        ],
        rows: [...given, ...blank],
        closing: 'Rows for more openings go above this line',
      }),
    ],
  }
}
