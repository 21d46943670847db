import { constant, type Line, si } from '../declare'

const iso = 'ISO 13790, monthly method'
const erbs = 'Erbs, Klein and Beckman 1983, from memory'
const units = 'definition of the units'

/** Coefficients of the monthly balance and of the degree-days; those that depend on the unit system say so. */
export const balanceConstants: readonly Line[] = [
  constant({
    name: 'utilisation_start',
    label: 'Utilisation exponent without mass',
    quantity: 'number',
    value: 1,
    source: iso,
  }),
  constant({
    name: 'utilisation_time',
    label: 'Time constant that adds one to it',
    quantity: 'hours',
    value: 15,
    source: iso,
  }),
  constant({
    name: 'energy_per_heat',
    label: 'Energy in one hour of heat',
    quantity: 'number',
    digits: 5,
    value: '=IF(unit_system="us",0.00001,0.001)',
    unit: '=IF(unit_system="us","therm/Btu","kWh/Wh")',
    source: units,
  }),
  constant({
    name: 'energy_per_irradiation',
    label: 'Energy of irradiation on an area',
    quantity: 'number',
    digits: 5,
    value: '=IF(unit_system="us",0.00001,1)',
    unit: '=IF(unit_system="us","therm/Btu","kWh/kWh")',
    source: units,
  }),
  constant({
    name: 'hours_of_capacity',
    label: 'Hours in capacity over conductance',
    quantity: 'number',
    value: '=IF(unit_system="us",1,1000)',
    unit: '=IF(unit_system="us","h","h·W/kW")',
    source: units,
  }),
  constant({
    name: 'freezing_point',
    label: 'Freezing point of water',
    quantity: 'temperature',
    value: si(0),
    source: 'definition of the Celsius scale',
  }),
  constant({
    name: 'spread_at_freezing',
    label: 'Spread of a month’s days at freezing',
    quantity: 'temperature-difference',
    digits: 3,
    value: si(1.45),
    source: erbs,
  }),
  constant({
    name: 'spread_by_mean',
    label: 'Spread lost with each degree of mean',
    quantity: 'ratio',
    digits: 4,
    value: 0.029,
    source: erbs,
  }),
  constant({
    name: 'spread_by_year',
    label: 'Spread gained with the year’s',
    quantity: 'ratio',
    digits: 4,
    value: 0.0664,
    source: erbs,
  }),
  constant({
    name: 'spread_shape',
    label: 'Shape of the spread',
    quantity: 'number',
    digits: 3,
    value: 1.698,
    source: erbs,
  }),
  constant({
    name: 'least_spread',
    label: 'Least spread',
    quantity: 'temperature-difference',
    digits: 3,
    value: si(0.3),
    source: 'the workbook’s own',
    note: 'Keeps the correlation away from none, in months that are hot.',
  }),
  constant({
    name: 'hitchin_spread',
    label: 'Spread in Hitchin’s formula',
    quantity: 'temperature-difference',
    digits: 3,
    value: si(1 / 0.71),
    source: 'CIBSE TM41, from memory: 1/0.71 K',
  }),
]
