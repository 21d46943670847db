import type { UnitKind } from './definitions'
import { kindOf } from './definitions'
import type { Quantity } from './quantities'

const words: Readonly<Record<UnitKind, readonly [kind: string, examples: string]>> = {
  length: ['a length', `12' 6 1/2" or 3.81 m`],
  area: ['an area', '240 ft² or 22.3 m²'],
  volume: ['a volume', '1,800 ft³ or 51 m³'],
  angle: ['an angle', '26.57° or a pitch of 6:12'],
  temperature: ['a temperature', '-10 °F or 5 °C'],
  'temperature-difference': ['a temperature difference', '20 °F or 11 K'],
  'thermal-resistance': ['a thermal resistance', 'R 2.5, 0.44 m²·K/W or U 0.4'],
  'u-value': ['a U-value', 'U 0.4, 2.3 W/(m²·K) or R 2.5'],
  conductance: ['a conductance', '420 Btu/(h·°F) or 221 W/K'],
  'linear-conductance': ['a heat loss per length', '0.8 Btu/(h·ft·°F) or 1.4 W/(m·K)'],
  'volumetric-heat-capacity': ['a heat capacity per volume', '0.018 Btu/(ft³·°F) or 0.335 Wh/(m³·K)'],
  'heat-capacity': ['a heat capacity', '1,200 Btu/°F or 0.63 kWh/K'],
  'heat-rate': ['a heat rate', '40,000 Btu/h or 12 kW'],
  energy: ['an energy', '250 therm or 7,300 kWh'],
  irradiation: ['an irradiation a day', '1,100 Btu/ft² or 3.5 kWh/m²'],
  pressure: ['a pressure', '30 psf or 1.44 kPa'],
  speed: ['a speed', '90 mph or 40 m/s'],
  'mass-per-area': ['a mass per area', '0.35 lb/ft² or 1.7 kg/m²'],
  mass: ['a mass', '15 lb or 6.8 kg'],
  'degree-days': ['degree-days', '4,800 °F·day or 2,670 K·day'],
  money: ['an amount of money', '1,250.50'],
  'money-per-area': ['a price per area', '2.95/ft² or 31.75/m²'],
  'money-per-length': ['a price per length', '1.20/ft or 3.95/m'],
  'money-per-mass': ['a price per mass', '0.80/lb or 1.75/kg'],
  'money-per-hour': ['a price per hour', '42/h'],
  ratio: ['a ratio', '0.3 or 30 %'],
  count: ['a count', '12'],
  'air-changes': ['air changes per hour', '0.75'],
  expansion: ['a thermal expansion', '3.6e-5 1/°F or 6.5e-5 1/K'],
  'daily-light': ['a daily light integral', '17 mol/(m²·day)'],
  years: ['a number of years', '20'],
  hours: ['a number of hours', '2.5'],
  number: ['a number', '1,250.50'],
  text: ['a text', 'North roof'],
  boolean: ['true or false', 'true, false, yes or no'],
  date: ['a date', '2030-04-15'],
}

/** "a length": how a kind of quantity is called in a sentence. */
export function kindWords(quantity: Quantity): string {
  return quantity === 'small-length' ? 'a small length' : words[kindOf(quantity)][0]
}

/** "a length such as 12' 6 1/2" or 3.81 m": what is expected where this kind is typed. */
export function expectationOf(quantity: Quantity): string {
  if (quantity === 'small-length') return 'a small length such as 3/8" or 8 mm'
  const [kind, examples] = words[quantity]
  return quantity === 'boolean' ? examples : `${kind} such as ${examples}`
}
