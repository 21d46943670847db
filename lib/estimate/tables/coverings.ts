import { type GridRow, grid, type SheetDeclaration, tableLock } from '../declare'
import { coveringColumns } from './covering-columns'
import { clearRows } from './coverings-clear'
import { polycarbonateRows } from './coverings-polycarbonate'

const opaque = clearRows.length - 1

/** Film, glass, acrylic, polycarbonate, and the opaque panel last. */
export const coveringRows: readonly GridRow[] = [
  ...clearRows.slice(0, opaque),
  ...polycarbonateRows,
  ...clearRows.slice(opaque),
]

export const coverings: SheetDeclaration = {
  id: 'coverings',
  name: 'Coverings',
  kind: 'table',
  about: 'What can cover a house, with its properties and where they come from.',
  lock: tableLock,
  blocks: [
    grid({ columns: coveringColumns, rows: coveringRows, table: { name: 'coverings', label: 'Coverings' } }),
  ],
}
