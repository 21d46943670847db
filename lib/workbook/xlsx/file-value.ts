import { type CellValue, isCellError } from '../model'
import { fileText } from './cell-text'

/** Error codes that the file format has; any other (a circle, say) is written as `#VALUE!`. */
const fileErrors = ['#DIV/0!', '#N/A', '#NAME?', '#NULL!', '#NUM!', '#REF!', '#VALUE!'] as const
export type FileError = (typeof fileErrors)[number]

export type FileResult = number | string | boolean | { error: FileError } | undefined

/** The stored result of a formula. A number that is none would damage the file, so it is an error there. */
export function fileResult(value: CellValue): FileResult {
  if (value === null) return undefined
  if (typeof value === 'number') return Number.isFinite(value) ? value + 0 : { error: '#NUM!' }
  if (typeof value === 'string') return fileText(value)
  if (isCellError(value)) return { error: fileErrors.find((code) => code === value.error) ?? '#VALUE!' }
  return value
}
