import { area, type GridColumn, type GridRow, lookUp } from '../declare'

interface Facet {
  readonly name: string
  readonly part: 'roof' | 'wall'
  /** Rows of Surfaces that it is a part of, by order. */
  readonly rows: readonly number[]
  readonly share: string
  readonly tilt: string
  readonly turn: number
  readonly covering: number
}

const strip = (sixths: number): string =>
  `=IF(frame_type="hoop",arch_angle*${6 - sixths}/6,IF(frame_type="gothic",90-arch_angle*${sixths}/6,roof_pitch_angle))`
const roofFacet = (name: string, row: number, sixths: number, turn: number): Facet => ({
  name,
  part: 'roof',
  rows: [row],
  share: `({surface_net_area:${row}}+{surface_net_area:2}/2)/3`,
  tilt: strip(sixths),
  turn,
  covering: row,
})
const wallFacet = (name: string, row: number, turn: number): Facet => ({
  name,
  part: 'wall',
  rows: [row],
  share: `{surface_net_area:${row}}`,
  tilt: `={surface_tilt:${row}}`,
  turn,
  covering: row,
})

/** A roof slope is three strips of a third of its length each, so that an arch may turn; a flat slope's strips are alike. */
export const facets: readonly Facet[] = [
  roofFacet('Front roof, lower third', 0, 1, 90),
  roofFacet('Front roof, middle third', 0, 3, 90),
  roofFacet('Front roof, upper third', 0, 5, 90),
  roofFacet('Back roof, lower third', 1, 1, 270),
  roofFacet('Back roof, middle third', 1, 3, 270),
  roofFacet('Back roof, upper third', 1, 5, 270),
  wallFacet('Front wall', 3, 90),
  wallFacet('Back wall', 4, 270),
  wallFacet('Left end', 5, 180),
  wallFacet('Right end', 6, 0),
]

const through = (column: string): string => lookUp('coverings', '[Covering]', column)

export const facetColumns: readonly GridColumn[] = [
  { title: 'Facet', quantity: 'text', ground: 'label', named: area('facet_name', 'facets of the house') },
  {
    title: 'Part',
    quantity: 'text',
    ground: 'label',
    named: area('facet_part', 'whether a facet is of the roof'),
  },
  { title: 'Faces', quantity: 'angle', digits: 0, named: area('facet_azimuth', 'azimuths of the facets') },
  {
    title: 'From south',
    quantity: 'angle',
    digits: 0,
    formula: '=[Faces]-180',
    named: area('facet_from_south', 'azimuths from south, west positive'),
  },
  { title: 'Tilt', quantity: 'angle', digits: 1, named: area('facet_tilt', 'tilts of the facets') },
  { title: 'Net area', quantity: 'area', named: area('facet_area', 'net areas of the facets') },
  { title: 'Covering', quantity: 'text', named: area('facet_covering', 'coverings of the facets') },
  {
    title: 'Direct light',
    quantity: 'ratio',
    ground: 'table',
    formula: `=${through('light transmittance')}`,
    named: area('facet_direct', 'direct light that the coverings let through'),
  },
  {
    title: 'Diffuse light',
    quantity: 'ratio',
    ground: 'table',
    formula: `=${through('diffuse light transmittance')}`,
    named: area('facet_diffuse', 'diffuse light that the coverings let through'),
  },
]

export const facetRows: readonly GridRow[] = facets.map(({ name, part, share, tilt, turn, covering }) => ({
  Facet: name,
  Part: part,
  Faces: `=MOD(ridge_azimuth+${turn},360)`,
  Tilt: tilt,
  'Net area': `=${share}`,
  Covering:
    part === 'roof'
      ? `=IF(frame_type="hoop",{surface_covering:2},{surface_covering:${covering}})`
      : `={surface_covering:${covering}}`,
}))
