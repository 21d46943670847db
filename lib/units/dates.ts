import { type Result, succeed } from '../failures'

/** Days are counted as spreadsheets count them: 1 is 1899-12-31, so that every date after February 1900 agrees. */
const dayZero = Date.UTC(1899, 11, 30)
const dayLength = 86_400_000

/** `2030-04-15` as a day number; undefined when it is no date. */
export function parseDate(text: string): Result<number> | undefined {
  const match = /^(\d{4})-(\d{1,2})-(\d{1,2})$/.exec(text)
  if (!match) return undefined
  const [year, month, day] = [Number(match[1]), Number(match[2]), Number(match[3])]
  const at = Date.UTC(year, month - 1, day)
  const read = new Date(at)
  if (year < 1900 || read.getUTCMonth() !== month - 1 || read.getUTCDate() !== day) return undefined
  return succeed((at - dayZero) / dayLength)
}

/** A day number as `2030-04-15`; a part of a day is left off. Empty outside years 1900 to 9999. */
export function formatDate(serial: number): string {
  const at = new Date(dayZero + Math.floor(serial) * dayLength)
  const year = at.getUTCFullYear()
  return year >= 1900 && year <= 9999 ? at.toISOString().slice(0, 10) : ''
}
