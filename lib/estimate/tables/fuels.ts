import { type GridRow, grid, type SheetDeclaration, tableLock } from '../declare'

const extension = 'heating value and efficiency: extension tables of fuel costs; price: invented (demo)'

/** Heating value of one fuel unit in therms of 10⁵ Btu; carbon dioxide of burning one unit in pounds. */
const fuel = (
  code: string,
  description: string,
  unit: string,
  therms: number,
  efficiency: number,
  price: number,
  pounds: number,
  source = extension,
): GridRow => ({
  code,
  description,
  unit,
  'heating value': therms,
  efficiency,
  price,
  'carbon dioxide': pounds,
  source: `${source}; carbon dioxide: national emission factors, from memory`,
})

export const fuels: SheetDeclaration = {
  id: 'fuels',
  name: 'Fuels',
  kind: 'table',
  about: 'Fuels by the unit that they are sold in, in either unit system.',
  lock: tableLock,
  blocks: [
    grid({
      columns: [
        { title: 'code', quantity: 'text', width: 140 },
        { title: 'description', quantity: 'text', width: 220, absent: 'added for this job' },
        { title: 'unit', quantity: 'text', absent: 'unit' },
        { title: 'heating value', quantity: 'energy', required: true, limits: { above: 0, max: 1e6 } },
        { title: 'efficiency', quantity: 'ratio', absent: 1, limits: { above: 0, max: 1 } },
        { title: 'price', quantity: 'money', absent: 0, limits: { min: 0, max: 1e6 } },
        { title: 'carbon dioxide', quantity: 'mass', absent: 0, limits: { min: 0, max: 1e6 } },
        { title: 'source', quantity: 'text', width: 420, absent: 'typed for this job' },
      ],
      rows: [
        fuel('NATURAL-GAS', 'Natural gas', 'therm', 1, 0.8, 1.3, 11.7),
        fuel('PROPANE', 'Propane', 'gal', 0.915, 0.8, 2.6, 12.7),
        fuel('OIL', 'Heating oil, No. 2', 'gal', 1.385, 0.75, 3.7, 22.5),
        fuel('ELECTRICITY', 'Electricity, resistance', 'kWh', 0.0341214163, 1, 0.17, 0.85),
        fuel('HARDWOOD', 'Hardwood, seasoned', 'cord', 200, 0.6, 320, 0),
        fuel('PELLETS', 'Wood pellets', 'ton', 164, 0.8, 340, 0),
      ],
      table: { name: 'fuels', label: 'Fuels' },
    }),
  ],
}
