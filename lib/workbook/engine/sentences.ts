import type { DetailedCellError } from 'hyperformula'
import type { CellAddress } from '../contracts'
import { formulaBounds } from '../formula/bounds'
import { scan } from '../formula/scan'
import { limits } from '../limits'
import { cellAt, sheetByName } from '../lookup'
import { type CellError, isFormula, type Workbook } from '../model'

/** Why a formula was stopped: shown in its cell, with the code that means "not available". */
export const stoppedError: CellError = {
  error: '#N/A',
  text: 'The calculation of this formula was stopped because it could not be finished. Make it simpler or let it read fewer cells.',
}

/** The engine's messages that say more than the code alone. Keys are its words, values are ours. */
const details: Readonly<Record<string, string>> = {
  'Wrong number of arguments.': 'A function here has too few or too many arguments.',
  'Value not found.': 'What is looked up is not in the table.',
  'Value cannot be coerced to number.': 'A text stands where a number is expected.',
  'Number argument expected.': 'A number is expected here.',
  'Cell range not allowed.': 'One cell is expected here, not a range.',
  'Cell range expected.': 'A range is expected here.',
  'Ranges need to be of equal length.': 'The ranges must have the same size.',
  'Range dimensions are not compatible with the window size and the stride.':
    'The ranges must have the same size.',
  'Array dimensions are not compatible.': 'The ranges must have the same size.',
  'Index out of bounds.': 'The row or column asked for is outside the range.',
  'Index too large.': 'The row or column asked for is outside the range.',
  'Value too small.': 'A number here is too small for the function.',
  'Value too large.': 'A number here is too large for the function.',
  'NaN or infinite value encountered.': 'The result is too large, or is no number at all.',
  'Distinct signs.': 'Both numbers must have the same sign.',
  'Result exceeds the maximum allowed length.': 'The text would be too long.',
  'Address is not correct.': 'The formula reads a cell outside the sheet.',
  'Resulting reference is out of the sheet.': 'The formula reads a cell outside the sheet.',
  'Pattern not found.': 'The text looked for is not there.',
  'Incorrect criterion.': 'The condition cannot be read.',
}

const byCode: Readonly<Record<string, string>> = {
  '#DIV/0!': 'Divides by zero or by a blank cell.',
  '#VALUE!': 'A value here is of the wrong kind, such as text where a number is expected.',
  '#NUM!': 'The result is too large, or is no number at all.',
  '#N/A': 'A value is not available.',
  '#REF!': 'Refers to a cell or a sheet that is no longer there.',
  '#NAME?': 'A name here is not known.',
  '#CYCLE!': 'The formula depends on its own result.',
  '#ERROR!': 'This formula cannot be read: check its brackets, commas and quotes.',
}

/** An error in plain words, with the name at fault where the engine knows it. `origin` is the cell that it comes from. */
export function describeError(
  workbook: Workbook,
  address: CellAddress,
  error: DetailedCellError,
  stopped: ReadonlySet<string>,
): CellError {
  const input = cellAt(workbook, address)?.input
  if (isFormula(input)) {
    if (stopped.has(input)) return stoppedError
    const bounds = formulaBounds(input)
    if (bounds) return { error: '#N/A', text: bounds.text }
  }
  const code = error.value
  return {
    error: code,
    text: nameAtFault(workbook, input, code, error.message) ?? byDetail(code, error.message),
  }
}

function byDetail(code: string, message: string): string {
  return details[message] ?? byCode[code] ?? 'The formula gives no value.'
}

function nameAtFault(workbook: Workbook, input: unknown, code: string, message: string): string | undefined {
  const called = /^Function name (.+) not recognized\.$/.exec(message)?.[1]
  if (called !== undefined) return `There is no function called ${called}.`
  const named = /^Named expression (.+) not recognized\.$/.exec(message)?.[1]
  if (named !== undefined) return `There is no named value called ${named}.`
  if (code === '#NAME?' && typeof input === 'string') {
    const far = farReferenceIn(input)
    if (far !== undefined) {
      return `${far} lies outside a sheet, which has at most ${limits.rows} rows and ${limits.columns} columns.`
    }
  }
  if (code === '#REF!' && typeof input === 'string') {
    const sheet = unknownSheetIn(workbook, input)
    if (sheet !== undefined) return `There is no sheet called ${sheet}.`
  }
  return undefined
}

function farReferenceIn(formula: string): string | undefined {
  let far: string | undefined
  scan(formula, (_kind, start, end, reference) => {
    if (!reference) return
    const row = Math.max(reference.first.row, reference.last.row)
    const column = Math.max(reference.first.column, reference.last.column)
    if (row >= limits.rows || column >= limits.columns) far ??= formula.slice(start, end)
  })
  return far
}

function unknownSheetIn(workbook: Workbook, formula: string): string | undefined {
  let unknown: string | undefined
  scan(formula, (_kind, _start, _end, reference) => {
    if (reference?.sheet !== undefined && !sheetByName(workbook, reference.sheet)) unknown ??= reference.sheet
  })
  return unknown
}
