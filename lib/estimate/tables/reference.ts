import { type GridRow, grid, type SheetDeclaration, tableLock } from '../declare'

const crop = (code: string, description: string, target: number, range: string): GridRow => ({
  code,
  description,
  'daily light': target,
  range,
  source: 'Purdue HO-238-W; Cornell CEA handbook; from memory',
})

export const crops: SheetDeclaration = {
  id: 'crops',
  name: 'Crops',
  kind: 'table',
  about: 'The light that crops ask for, a day.',
  lock: tableLock,
  blocks: [
    grid({
      columns: [
        { title: 'code', quantity: 'text', width: 140 },
        { title: 'description', quantity: 'text', width: 260, absent: 'added for this job' },
        { title: 'daily light', quantity: 'daily-light', required: true, limits: { min: 0, max: 100 } },
        { title: 'range', quantity: 'text', absent: '' },
        { title: 'source', quantity: 'text', width: 360, absent: 'typed for this job' },
      ],
      rows: [
        crop('FOLIAGE', 'Shade foliage, African violet', 7, '5 to 10'),
        crop('BEDDING', 'Begonia, impatiens, poinsettia', 12, '10 to 15'),
        crop('GERANIUM', 'Geranium, petunia, snapdragon', 16, '12 to 20'),
        crop('LETTUCE', 'Lettuce and leaf greens', 14, '12 to 17'),
        crop('TOMATO', 'Tomato, pepper, cucumber', 22, '20 to 30'),
      ],
      table: { name: 'crops', label: 'Crops' },
    }),
  ],
}

const tight = (
  code: string,
  description: string,
  changes: number,
  range: string,
  source: string,
): GridRow => ({
  code,
  description,
  'air changes': changes,
  range,
  source,
})

export const tightness: SheetDeclaration = {
  id: 'tightness',
  name: 'Tightness',
  kind: 'table',
  about: 'Air changes an hour by construction and age, in still air.',
  lock: tableLock,
  blocks: [
    grid({
      columns: [
        { title: 'code', quantity: 'text', width: 140 },
        { title: 'description', quantity: 'text', width: 300, absent: 'added for this job' },
        { title: 'air changes', quantity: 'air-changes', required: true, limits: { min: 0, max: 100 } },
        { title: 'range', quantity: 'text', absent: '' },
        { title: 'source', quantity: 'text', width: 360, absent: 'typed for this job' },
      ],
      rows: [
        tight(
          'NEW-SHEET',
          'New, glass or rigid sheet',
          1,
          '0.75 to 1.5',
          'ASABE EP406; extension bulletin 792',
        ),
        tight('NEW-FILM', 'New, double film', 0.75, '0.5 to 1.0', 'extension bulletin 792'),
        tight('SEALED', 'Multiwall, every joint gasketed', 0.5, '0.3 to 0.7', 'common practice, no source'),
        tight('OLD-GOOD', 'Old glass in good repair', 1.5, '1 to 2', 'ASABE EP406, from memory'),
        tight('OLD-POOR', 'Old glass in poor repair', 3, '2 to 4', 'ASABE EP406, from memory'),
      ],
      table: { name: 'tightness_table', label: 'Tightness' },
    }),
  ],
}
