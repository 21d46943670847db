import { type GridRow, grid, type SheetDeclaration, tableLock } from '../declare'

const demo = 'invented (demo)'

const zone = (code: string, description: string, charge: number, rate: number): GridRow => ({
  code,
  description,
  charge,
  rate,
  source: demo,
})

export const freight: SheetDeclaration = {
  id: 'freight',
  name: 'Freight',
  kind: 'table',
  about: 'Carriage by zone: a charge an order, and a rate by weight.',
  lock: tableLock,
  blocks: [
    grid({
      columns: [
        { title: 'code', quantity: 'text', width: 140 },
        { title: 'description', quantity: 'text', width: 280, absent: 'added for this job' },
        { title: 'charge', quantity: 'money', absent: 0, limits: { min: 0, max: 1e9 } },
        { title: 'rate', quantity: 'money-per-mass', absent: 0, limits: { min: 0, max: 1e6 } },
        { title: 'source', quantity: 'text', width: 260, absent: 'typed for this job' },
      ],
      rows: [
        zone('COLLECTED', 'Collected by us', 0, 0),
        zone('NEAR', 'The same county', 95, 0.2),
        zone('REGION', 'A day’s drive', 180, 0.35),
        zone('FAR', 'Further', 290, 0.6),
      ],
      table: { name: 'freight', label: 'Freight' },
    }),
  ],
}

const long = (code: string, over: number, adds: number): GridRow => ({
  code,
  over,
  adds,
  source: 'steps: common practice, no source; charges: invented (demo)',
})

/** P5 A sheet that is longer than a step pays that step’s charge on top of those of the shorter steps. */
export const longLoads: SheetDeclaration = {
  id: 'long-loads',
  name: 'Long loads',
  kind: 'table',
  about: 'What long sheets add to the carriage of an order, step by step.',
  lock: tableLock,
  blocks: [
    grid({
      columns: [
        { title: 'code', quantity: 'text', width: 140 },
        {
          title: 'over',
          quantity: 'length',
          required: true,
          limits: { above: 0, max: 1000, in: 'si' },
          named: { name: 'long_load_over', role: 'table', label: 'lengths that long loads start above' },
        },
        {
          title: 'adds',
          quantity: 'money',
          required: true,
          limits: { min: 0, max: 1e9 },
          named: { name: 'long_load_adds', role: 'table', label: 'what each step adds to the carriage' },
        },
        { title: 'source', quantity: 'text', width: 360, absent: 'typed for this job' },
      ],
      rows: [long('OVER-12', 12, 60), long('OVER-16', 16, 60), long('OVER-20', 20, 90)],
      table: { name: 'long_loads', label: 'Long loads' },
    }),
  ],
}
