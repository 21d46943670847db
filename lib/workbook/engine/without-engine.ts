import type { CellError, CellInput } from '../model'
import { stoppedError } from './sentences'

/** Without a working engine, typed values still show and formulas say that they were stopped. */
export function withoutEngine(input: CellInput | undefined): CellInput | CellError | null {
  if (input === undefined) return null
  if (typeof input !== 'string') return input
  if (input.startsWith('=')) return stoppedError
  return input.startsWith("'") ? input.slice(1) : input
}
