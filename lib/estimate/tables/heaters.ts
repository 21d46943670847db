import { type GridRow, grid, type SheetDeclaration, tableLock } from '../declare'

const heater = (thousands: number): GridRow => ({
  code: `UNIT-${thousands}`,
  description: `Unit heater, ${thousands},000 Btu/h out`,
  output: thousands * 1000,
  source: 'usual steps of size: common practice, no source',
})

export const heaters: SheetDeclaration = {
  id: 'heaters',
  name: 'Heaters',
  kind: 'table',
  about: 'Sizes of heater that can be bought, by what they give out.',
  lock: tableLock,
  blocks: [
    grid({
      columns: [
        { title: 'code', quantity: 'text', width: 140 },
        { title: 'description', quantity: 'text', width: 260, absent: 'added for this job' },
        {
          title: 'output',
          quantity: 'heat-rate',
          required: true,
          limits: { above: 0, max: 1e9 },
          named: { name: 'heater_outputs', role: 'table', label: 'outputs of the heaters' },
        },
        { title: 'source', quantity: 'text', width: 320, absent: 'typed for this job' },
      ],
      rows: [30, 45, 60, 75, 100, 125, 150, 175, 200, 250, 300, 350, 400].map(heater),
      table: { name: 'heaters', label: 'Heaters' },
    }),
  ],
}
