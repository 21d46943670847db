import { type GridColumn, type GridRow, grid, type SheetDeclaration, si, tableLock } from '../declare'

/** How many points of span and load a row has room for. */
export const loadPoints = 6

const points: readonly GridColumn[] = Array.from({ length: loadPoints }, (_, at): GridColumn[] => [
  { title: `span ${at + 1}`, quantity: 'length', absent: 0, limits: { min: 0, max: 100, in: 'si' } },
  { title: `load ${at + 1}`, quantity: 'pressure', absent: 0, limits: { min: 0, max: 1000, in: 'si' } },
]).flat()

/** Metres and kilopascals, the spans growing. */
function row(
  code: string,
  given: readonly (readonly [span: number, load: number])[],
  source: string,
): GridRow {
  return {
    code,
    ...Object.fromEntries(
      Array.from({ length: loadPoints }, (_, at) => [
        [`span ${at + 1}`, si(given[at]?.[0] ?? 0)],
        [`load ${at + 1}`, si(given[at]?.[1] ?? 0)],
      ]).flat(),
    ),
    source,
  }
}

/** The firm keeps the load tables of the sheets that it sells; a covering without a row goes by the beam formulas. */
export const allowableLoads: SheetDeclaration = {
  id: 'allowable-loads',
  name: 'Allowable loads',
  kind: 'table',
  about: 'What a covering may carry at each span, by its maker’s table: spans growing, loads falling.',
  lock: tableLock,
  blocks: [
    grid({
      columns: [
        { title: 'code', quantity: 'text', width: 140 },
        ...points,
        { title: 'source', quantity: 'text', width: 320, absent: 'typed for this job' },
      ],
      rows: [
        row(
          'PC-TWIN-10',
          [
            [0.6, 4.2],
            [0.9, 2.1],
            [1.2, 1.1],
            [1.5, 0.6],
          ],
          'invented (demo)',
        ),
      ],
      table: { name: 'allowable_loads', label: 'Allowable loads' },
    }),
  ],
}
