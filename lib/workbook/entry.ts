import { fail, type Result, succeed } from '../failures'
import { formatQuantity, parseQuantity, parseValue, type UnitSystem, editText as unitText } from '../units'
import { formulaBounds } from './formula/bounds'
import { limits } from './limits'
import { type CellFormat, type CellInput, type CellValue, isCellError } from './model'

/**
 * What typing into a cell means, and the reverse.
 *
 * W21 `=` begins a formula, `'` begins a text that is kept as it stands, nothing clears.
 * W22 A cell of a quantity takes what reads as that quantity; a cell with choices takes one of them.
 * W23 A cell of no quantity takes numbers, percentages, true and false; everything else is text, dates and part numbers too.
 * W24 What the editor opens with reads back to exactly the input.
 */
export function parseEntry(
  text: string,
  format: CellFormat | undefined,
  system: UnitSystem,
  currency?: string,
  /** The values of the table that `format.choices` names, where the caller has looked them up. */
  choices: readonly string[] | undefined = listed(format),
): Result<CellInput | null> {
  const typed = text.trim()
  if (typed === '') return succeed(null)
  if (text.length > limits.textLength) {
    return fail(
      'limit',
      `This text has ${text.length} characters; at most ${limits.textLength} are possible.`,
    )
  }
  if (typed.startsWith('=')) return parseFormula(typed)
  if (typed.startsWith("'")) return succeed(marked(typed.slice(1)))
  if (choices && choices.length > 0) return parseChoice(typed, choices)
  const quantity = format?.quantity
  if (quantity === undefined) return succeed(plainInput(text, typed, system))
  if (quantity === 'text') return succeed(text)
  return parseValue(typed, quantity, system, currency === undefined ? {} : { currency })
}

function listed(format: CellFormat | undefined): readonly string[] | undefined {
  return typeof format?.choices === 'object' ? format.choices : undefined
}

function parseFormula(typed: string): Result<CellInput> {
  if (typed === '=')
    return fail('invalid', "Expected a formula after =. For the sign itself, type '= instead.")
  const bounds = formulaBounds(typed)
  return bounds ? { ok: false, failure: bounds } : succeed(typed)
}

/** A text as a cell's input: with the mark where it would else be a formula or lose a mark of its own. */
function marked(text: string): string | null {
  if (text === '') return null
  return text.startsWith('=') || text.startsWith("'") ? `'${text}` : text
}

function parseChoice(typed: string, choices: readonly string[]): Result<CellInput> {
  const wanted = typed.toLowerCase()
  const found =
    choices.find((choice) => choice === typed) ?? choices.find((choice) => choice.toLowerCase() === wanted)
  if (found !== undefined) return succeed(found)
  const shown = choices.slice(0, 8).join(', ')
  const more = choices.length > 8 ? ` or one of ${choices.length - 8} more` : ''
  return fail('invalid', `Expected one of ${shown}${more}; found ${typed.slice(0, 60)}.`)
}

function plainInput(text: string, typed: string, system: UnitSystem): CellInput {
  const lower = typed.toLowerCase()
  if (lower === 'true' || lower === 'false') return lower === 'true'
  return plainNumber(typed, system) ?? text
}

/** A number or a percentage; leading zeros mean a code, not a number. */
function plainNumber(typed: string, system: UnitSystem): number | undefined {
  if (!/^[+-]?(\d[\d.,\s]*|\.\d+)(e[+-]?\d+)?%?$/i.test(typed) || /^[+-]?0\d/.test(typed)) return undefined
  const percent = typed.endsWith('%')
  const digits = percent ? typed.slice(0, -1) : typed
  const exact = /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i.test(digits) ? Number(digits) : undefined
  const read = exact === undefined ? parseQuantity(digits, 'number', system) : succeed(exact)
  if (!read.ok || !Number.isFinite(read.value)) return undefined
  const value = percent ? Number((read.value / 100).toPrecision(15)) : read.value
  return value === 0 ? 0 : value
}

/** The text that the editor opens with: reads back to exactly the input. [W24] */
export function editText(
  input: CellInput | undefined,
  format: CellFormat | undefined,
  system: UnitSystem,
): string {
  if (input === undefined) return ''
  if (typeof input === 'string' && input.startsWith('=')) return input
  if (typeof input === 'boolean') return String(input)
  if (typeof input === 'number') return numberText(input, format, system)
  if (input.startsWith("'")) return input
  const read = parseEntry(input, format, system)
  return read.ok && read.value === input ? input : `'${input}`
}

function numberText(value: number, format: CellFormat | undefined, system: UnitSystem): string {
  const quantity = format?.quantity
  const text =
    quantity === undefined || quantity === 'text' ? String(value) : unitText(value, quantity, system)
  const read = parseEntry(text, format, system)
  return read.ok && read.value === value ? text : String(value)
}

/** A computed value as the cell shows it; an error shows its code. */
export function displayText(
  value: CellValue,
  format: CellFormat | undefined,
  system: UnitSystem,
  currency?: string,
): string {
  if (value === null) return ''
  if (isCellError(value)) return value.error
  const quantity = format?.quantity
  if (typeof value === 'boolean') {
    return quantity === 'boolean' ? (value ? 'yes' : 'no') : value ? 'TRUE' : 'FALSE'
  }
  if (typeof value === 'string') return value
  const text = formatQuantity(
    value,
    quantity === undefined || quantity === 'text' ? 'number' : quantity,
    system,
    {
      ...(format?.digits === undefined ? {} : { digits: format.digits }),
      ...(currency === undefined ? {} : { currency }),
    },
  )
  return format?.unit === undefined || format.unit === '' ? text : `${text} ${format.unit}`
}
