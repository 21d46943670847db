import { type GridRow, grid, lookUp, type SheetDeclaration, tableLock } from '../declare'

type Stock = readonly [covering: string, width: number, lengths: readonly number[]]

/** Widths and lengths in feet. Each sheet's code is its covering's and its length. */
const stock: readonly Stock[] = [
  ['FILM-1', 24, [100]],
  ['FILM-1-IR', 24, [100]],
  ['FILM-2', 24, [100]],
  ['FILM-2-IR', 24, [100]],
  ['GLASS-1', 2, [6]],
  ['GLASS-2', 2, [6]],
  ['ACRYL-1', 4, [8]],
  ['ACRYL-TWIN-16', 4, [12, 16]],
  ['PC-CORR', 4, [8, 10, 12]],
  ['PC-TWIN-3', 4, [8]],
  ['PC-TWIN-4', 4, [8, 12]],
  ['PC-TWIN-6', 4, [8, 12, 16, 24]],
  ['PC-TWIN-8', 4, [8, 12, 16, 24]],
  ['PC-TWIN-10', 4, [8, 12, 16, 24]],
  ['PC-TRIPLE-8', 4, [12, 16, 24]],
  ['PC-TRIPLE-10', 4, [12, 16, 24]],
  ['PC-TRIPLE-16', 4, [12, 16, 24]],
  ['PC-FIVE-25', 4, [16, 24]],
  ['PANEL-50', 3.28083989501312, [20]],
]

const cut: GridRow = {
  code: 'CUT',
  covering: { value: '' },
  width: 0,
  length: 0,
  price: { value: 0 },
  source: 'cut to size: bought by its area with waste',
}

export const stockRows: readonly GridRow[] = [
  cut,
  ...stock.flatMap(([covering, width, lengths]) =>
    lengths.map((length): GridRow => ({ code: `${covering}-${length}`, covering, width, length })),
  ),
]

export const sheetsInStock: SheetDeclaration = {
  id: 'sheets-in-stock',
  name: 'Sheets in stock',
  kind: 'table',
  about: 'Sheets, panes and rolls that can be bought, by covering.',
  lock: tableLock,
  blocks: [
    grid({
      columns: [
        { title: 'code', quantity: 'text', width: 160 },
        { title: 'covering', quantity: 'text', width: 140, absent: '', choices: 'coverings' },
        { title: 'width', quantity: 'length', absent: 0, limits: { min: 0, max: 1000, in: 'si' } },
        { title: 'length', quantity: 'length', absent: 0, limits: { min: 0, max: 1000, in: 'si' } },
        {
          title: 'price',
          quantity: 'money',
          formula: `=ROUND([width]*[length]*${lookUp('coverings', '[covering]', 'price')},2)`,
          absent: 0,
          limits: { min: 0, max: 1e9 },
        },
        { title: 'source', quantity: 'text', width: 300, absent: 'typed for this job' },
      ],
      rows: stockRows.map((row) => ({ source: 'invented (demo)', ...row })),
      table: { name: 'sheets_in_stock', label: 'Sheets in stock' },
    }),
  ],
}
