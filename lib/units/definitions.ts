import { exact, type Fraction, one, product, quotient, reciprocal } from './fraction'
import type { Quantity, UnitSystem } from './quantities'

/**
 * Units by kind of quantity, with their exact factors. Source of every factor: NIST SP 811 (2008) appendix B,
 * built from the exact definitions (foot, pound, pound-force, International Table Btu), never from rounded values.
 */
export interface Unit {
  readonly symbol: string
  readonly title: string
  /** Which system the unit belongs to; a unit of both has none. */
  readonly system: UnitSystem | undefined
  /** Value in the kind's base unit = (value - zero) * factor. */
  readonly factor: Fraction
  readonly zero: number
  /** Other spellings that people type. */
  readonly names: readonly string[]
}

const foot = exact('0.3048')
const inch = exact('0.0254')
const yard = exact('0.9144')
const mile = exact('1609.344')
const pound = exact('0.45359237')
const poundForce = exact('4.4482216152605')
const btu = exact('1055.05585262')
const fahrenheit = quotient(exact('5'), exact('9'))
const hour = exact('3600')
const kilo = exact('1000')
const mega = exact('1000000')
const milli = exact('0.001')
const centi = exact('0.01')
const kilowattHour = exact('3600000')
/** 10^5 Btu(IT), not the US therm of the natural gas trade, which uses the 59 °F Btu. */
const therm = product(btu, exact('100000'))

const foot2 = product(foot, foot)
const foot3 = product(foot, foot2)
const inch2 = product(inch, inch)
const inch3 = product(inch, inch2)
const btuPerHour = quotient(btu, hour)

const us = (symbol: string, title: string, factor: Fraction, names: string, zero = 0): Unit => ({
  symbol,
  title,
  system: 'us',
  factor,
  zero,
  names: names.split('|').filter(Boolean),
})
const si: typeof us = (...args) => ({ ...us(...args), system: 'si' })
const both = (symbol: string, title: string, names: string, factor = one): Unit => ({
  ...us(symbol, title, factor, names),
  system: undefined,
})

/** Kinds that share their units with another kind. */
export type UnitKind = Exclude<Quantity, 'small-length'>

export function kindOf(quantity: Quantity): UnitKind {
  return quantity === 'small-length' ? 'length' : quantity
}

/** The first unit of a system is its usual one, small lengths aside. Money is per unit of the same kind. */
export const definitions: Readonly<Record<UnitKind, readonly Unit[]>> = {
  length: [
    us('ft', 'feet', foot, 'foot|feet|lf'),
    us('in', 'inches', inch, 'inch|inches'),
    us('yd', 'yards', yard, 'yard|yards'),
    us('mi', 'miles', mile, 'mile|miles'),
    si('m', 'metres', one, 'metre|metres|meter|meters'),
    si('mm', 'millimetres', milli, 'millimetre|millimetres|millimeter|millimeters'),
    si('cm', 'centimetres', centi, 'centimetre|centimetres|centimeter|centimeters'),
    si('km', 'kilometres', kilo, 'kilometre|kilometres|kilometer|kilometers'),
  ],
  area: [
    us('ft²', 'square feet', foot2, 'sq ft|sqft|sf|square foot|square feet'),
    us('in²', 'square inches', inch2, 'sq in|sqin|square inch|square inches'),
    us('yd²', 'square yards', product(yard, yard), 'sq yd|sqyd|square yard|square yards'),
    si('m²', 'square metres', one, 'sq m|sqm|square metre|square metres|square meter|square meters'),
    si('cm²', 'square centimetres', product(centi, centi), 'sq cm'),
    si('mm²', 'square millimetres', product(milli, milli), 'sq mm'),
  ],
  volume: [
    us('ft³', 'cubic feet', foot3, 'cu ft|cuft|cf|cubic foot|cubic feet'),
    us('in³', 'cubic inches', inch3, 'cu in|cubic inches'),
    us('yd³', 'cubic yards', product(yard, yard, yard), 'cu yd|cubic yards'),
    us('gal', 'US gallons', product(inch3, exact('231')), 'gallon|gallons|us gal'),
    si('m³', 'cubic metres', one, 'cu m|cubic metre|cubic metres|cubic meter|cubic meters'),
    si('L', 'litres', milli, 'litre|litres|liter|liters'),
  ],
  angle: [
    both('°', 'degrees', 'deg|degree|degrees'),
    both('rad', 'radians', 'radian|radians', exact('57.29577951308232')),
  ],
  temperature: [
    us('°F', 'degrees Fahrenheit', fahrenheit, 'f|deg f|degf|fahrenheit', 32),
    si('°C', 'degrees Celsius', one, 'c|deg c|degc|celsius'),
    si('K', 'kelvins', one, 'kelvin|kelvins', 273.15),
  ],
  'temperature-difference': [
    us('°F', 'Fahrenheit degrees', fahrenheit, 'f|deg f|degf|fahrenheit'),
    si('K', 'kelvins', one, 'kelvin|kelvins|°c|c|deg c|degc|celsius'),
  ],
  'thermal-resistance': [
    us(
      'h·ft²·°F/Btu',
      'hour square foot degrees Fahrenheit per Btu',
      quotient(product(foot2, fahrenheit), btuPerHour),
      'hft2f/btu|ft2hf/btu|ft2fh/btu',
    ),
    si('m²·K/W', 'square metre kelvins per watt', one, 'm2k/w|m²·°c/w|m2c/w|km2/w'),
  ],
  'u-value': [
    us(
      'Btu/(h·ft²·°F)',
      'Btu per hour, square foot and degree Fahrenheit',
      quotient(btuPerHour, product(foot2, fahrenheit)),
      'btu/hft2f|btu/hrft2f|btu/ft2hf',
    ),
    si('W/(m²·K)', 'watts per square metre and kelvin', one, 'w/m2k|w/m²·°c|w/m2c'),
  ],
  conductance: [
    us(
      'Btu/(h·°F)',
      'Btu per hour and degree Fahrenheit',
      quotient(btuPerHour, fahrenheit),
      'btu/hf|btu/hrf',
    ),
    si('W/K', 'watts per kelvin', one, 'w/°c'),
  ],
  'linear-conductance': [
    us(
      'Btu/(h·ft·°F)',
      'Btu per hour, foot and degree Fahrenheit',
      quotient(btuPerHour, product(foot, fahrenheit)),
      'btu/hftf|btu/hrftf',
    ),
    si('W/(m·K)', 'watts per metre and kelvin', one, 'w/mk|w/m·°c'),
  ],
  'volumetric-heat-capacity': [
    us(
      'Btu/(ft³·°F)',
      'Btu per cubic foot and degree Fahrenheit',
      quotient(btu, product(foot3, fahrenheit)),
      'btu/ft3f',
    ),
    si('Wh/(m³·K)', 'watt-hours per cubic metre and kelvin', hour, 'wh/m3k|wh/m³·°c'),
    si('kJ/(m³·K)', 'kilojoules per cubic metre and kelvin', kilo, 'kj/m3k'),
  ],
  'heat-capacity': [
    us('Btu/°F', 'Btu per degree Fahrenheit', quotient(btu, fahrenheit), ''),
    si('kWh/K', 'kilowatt-hours per kelvin', kilowattHour, 'kwh/°c'),
    si('MJ/K', 'megajoules per kelvin', mega, 'mj/°c'),
    si('kJ/K', 'kilojoules per kelvin', kilo, 'kj/°c'),
  ],
  'heat-rate': [
    us('Btu/h', 'Btu per hour', btuPerHour, 'btuh'),
    us('kBtu/h', 'thousand Btu per hour', product(btuPerHour, kilo), 'mbh|kbtuh'),
    si('W', 'watts', one, 'watt|watts'),
    si('kW', 'kilowatts', kilo, 'kilowatt|kilowatts'),
  ],
  energy: [
    us('therm', 'therms of 100,000 Btu', therm, 'therms|thm'),
    us('Btu', 'Btu', btu, 'btus'),
    us('kBtu', 'thousand Btu', product(btu, kilo), ''),
    us('MMBtu', 'million Btu', product(btu, mega), ''),
    si('kWh', 'kilowatt-hours', kilowattHour, 'kw·h|kilowatt-hour|kilowatt-hours'),
    si('Wh', 'watt-hours', hour, ''),
    si('MWh', 'megawatt-hours', product(kilowattHour, kilo), ''),
    si('kJ', 'kilojoules', kilo, ''),
    si('MJ', 'megajoules', mega, ''),
    si('GJ', 'gigajoules', product(mega, kilo), ''),
  ],
  irradiation: [
    us('Btu/ft²', 'Btu per square foot', quotient(btu, foot2), 'btu/ft2·day|btu/ft2·d|btu/sq ft'),
    si('kWh/m²', 'kilowatt-hours per square metre', kilowattHour, 'kwh/m2·day|kwh/m2·d'),
    si('Wh/m²', 'watt-hours per square metre', hour, 'wh/m2·day|wh/m2·d'),
    si('MJ/m²', 'megajoules per square metre', mega, 'mj/m2·day|mj/m2·d'),
  ],
  pressure: [
    us('psf', 'pounds per square foot', quotient(poundForce, foot2), 'lb/ft2|lbf/ft2|lb/sq ft|lbs/ft2'),
    us('psi', 'pounds per square inch', quotient(poundForce, inch2), 'lb/in2|lbf/in2'),
    si('kPa', 'kilopascals', kilo, 'kn/m2'),
    si('Pa', 'pascals', one, 'n/m2'),
  ],
  speed: [
    us('mph', 'miles per hour', quotient(mile, hour), 'mi/h|miles/h'),
    us('ft/s', 'feet per second', foot, 'fps'),
    si('m/s', 'metres per second', one, 'mps'),
    si('km/h', 'kilometres per hour', quotient(kilo, hour), 'kph|kmh|kmph'),
  ],
  'mass-per-area': [
    us('lb/ft²', 'pounds per square foot', quotient(pound, foot2), 'lbs/ft2|lb/sq ft'),
    si('kg/m²', 'kilograms per square metre', one, ''),
    si('g/m²', 'grams per square metre', milli, 'gsm'),
  ],
  mass: [
    us('lb', 'pounds', pound, 'lbs|pound|pounds'),
    us('oz', 'ounces', quotient(pound, exact('16')), 'ounce|ounces'),
    si('kg', 'kilograms', one, 'kilogram|kilograms'),
    si('g', 'grams', milli, 'gram|grams'),
  ],
  'degree-days': [
    us('°F·day', 'Fahrenheit degree-days', fahrenheit, 'f·d|f·days|°f days'),
    si('K·day', 'kelvin-days', one, 'k·d|k·days|c·day|c·days|c·d'),
  ],
  money: [both('', 'money', '')],
  'money-per-area': [
    us('/ft²', 'money per square foot', reciprocal(foot2), '/sq ft|/sqft|/sf|/square foot'),
    si('/m²', 'money per square metre', one, '/sq m|/sqm|/square metre|/square meter'),
  ],
  'money-per-length': [
    us('/ft', 'money per foot', reciprocal(foot), '/foot|/lf'),
    us('/in', 'money per inch', reciprocal(inch), '/inch'),
    si('/m', 'money per metre', one, '/metre|/meter'),
    si('/mm', 'money per millimetre', kilo, ''),
  ],
  'money-per-mass': [
    us('/lb', 'money per pound', reciprocal(pound), '/pound'),
    si('/kg', 'money per kilogram', one, '/kilogram'),
  ],
  'money-per-hour': [both('/h', 'money per hour', '/hour')],
  ratio: [both('', 'ratio', '1'), both('%', 'per cent', 'percent|per cent|pct', centi)],
  count: [both('', 'count', 'pcs|pieces|ea|each')],
  'air-changes': [both('1/h', 'air changes per hour', 'ach|air changes/h')],
  expansion: [
    us('1/°F', 'per degree Fahrenheit', reciprocal(fahrenheit), 'in/in·f|ft/ft·f'),
    si('1/K', 'per kelvin', one, '1/°c|m/m·k|mm/mm·k'),
  ],
  'daily-light': [both('mol/(m²·day)', 'moles of photons per square metre and day', 'mol/m2·d|mol/m2d|mol')],
  years: [
    both('years', 'years', 'year|y|yr|yrs|a'),
    both('months', 'months', 'month', quotient(one, exact('12'))),
  ],
  hours: [
    both('h', 'hours', 'hours|hrs'),
    both('min', 'minutes', 'minute|minutes', quotient(one, exact('60'))),
  ],
  number: [both('', 'number', '')],
  text: [both('', 'text', '')],
  boolean: [both('', 'true or false', '')],
  date: [both('', 'date', '')],
}
