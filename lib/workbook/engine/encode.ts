import type { RawCellContent } from 'hyperformula'
import { formulaBounds } from '../formula/bounds'
import { scan } from '../formula/scan'
import type { CellInput } from '../model'
import { oneValue } from './config'

/**
 * What the engine is given for a cell's input.
 *
 * E5  Text goes in with the mark `'`, so that the engine never reads a date, a percentage or money out of it.
 * E6  The engine's formula dialect has no doubled quotes, capital exponents or spaces before brackets: they are written
 *     in its way. The workbook keeps the text as typed.
 * E7  A formula that is out of bounds, or that was stopped before, is `=NA()` to the engine; the cell says why.
 */
export function encode(input: CellInput | undefined, stopped: ReadonlySet<string>): RawCellContent {
  if (input === undefined) return null
  if (typeof input !== 'string') return input
  if (!input.startsWith('=')) return input.startsWith("'") ? input : `'${input}`
  if (stopped.has(input) || formulaBounds(input)) return '=NA()'
  return encodeFormula(input)
}

const needsWork =
  /["\\{}]|\dE|\s\(|\b(?:TRANSPOSE|MMULT|SEQUENCE|SORT|SORTBY|FILTER|UNIQUE|HSTACK|VSTACK|ARRAYFORMULA|ARRAY_CONSTRAIN|MAXPOOL|MEDIANPOOL|XLOOKUP)\s*\(/i
const givesMany =
  /[{}]|\b(?:TRANSPOSE|MMULT|SEQUENCE|SORT|SORTBY|FILTER|UNIQUE|HSTACK|VSTACK|ARRAYFORMULA|ARRAY_CONSTRAIN|MAXPOOL|MEDIANPOOL|XLOOKUP)\s*\(/i

/** The formula in the engine's dialect; a formula that could give many values gives its first. [E4 E6] */
export function encodeFormula(formula: string): string {
  if (!needsWork.test(formula)) return formula
  let written = ''
  let afterFunction = false
  scan(formula, (kind, start, end) => {
    const token = formula.slice(start, end)
    if (kind === 'space' && afterFunction) return
    afterFunction = kind === 'function'
    if (kind === 'text') written += encodeText(token)
    else if (kind === 'number') written += token.toLowerCase()
    else written += token
  })
  return givesMany.test(formula) ? `=${oneValue}(${written})` : `=${written}`
}

/** `"6"""` becomes `("6"&CHAR(34))`: neither a quote nor a backslash can stand inside a text of the engine. */
function encodeText(token: string): string {
  const text = token.slice(1, -1).replaceAll('""', '"')
  if (!/["\\]/.test(text)) return token
  const parts = text.split(/(["\\])/).filter((part) => part !== '')
  const encoded = parts.map((part) => (part === '"' ? 'CHAR(34)' : part === '\\' ? 'CHAR(92)' : `"${part}"`))
  return `(${encoded.join('&')})`
}
