import { CellError, ErrorType, HyperFormula, type ImplementedFunctions } from 'hyperformula'
import { limits } from '../limits'

/**
 * E3 No formula makes a text longer than a cell may hold. The check stands where texts are joined, because a text that doubles
 *    from cell to cell takes the machine's memory long before its value is read.
 */
const methods = {
  CONCATENATE: 'concatenate',
  TEXTJOIN: 'textjoin',
  SUBSTITUTE: 'substitute',
  REPLACE: 'replace',
} as const

function tooLong(): CellError {
  return new CellError(ErrorType.VALUE, 'Result exceeds the maximum allowed length.')
}

/** What the operator `&` does. The engine passes texts and takes an error as well, though it declares texts only. */
export function joinBounded(left: string, right: string): string {
  if (left.length + right.length <= limits.textLength) return left + right
  return tooLong() as unknown as string
}

type Method = (this: unknown, ast: unknown, state: unknown) => unknown

/** Registers bounded forms of the text functions that can lengthen texts, each calling the built-in one. */
export function registerTextBounds(): void {
  for (const [name, method] of Object.entries(methods)) {
    const BuiltIn = HyperFormula.getFunctionPlugin(name)
    const metadata = BuiltIn?.implementedFunctions[name]
    if (!BuiltIn || !metadata) continue
    const original = (BuiltIn.prototype as Record<string, Method | undefined>)[method]
    if (!original) continue
    const implementedFunctions: ImplementedFunctions = { [name]: metadata }
    class Bounded extends BuiltIn {
      static override implementedFunctions = implementedFunctions
    }
    Object.defineProperty(Bounded.prototype, method, {
      value(this: unknown, ast: unknown, state: unknown): unknown {
        const result = original.call(this, ast, state)
        return typeof result === 'string' && result.length > limits.textLength ? tooLong() : result
      },
    })
    HyperFormula.registerFunction(name, Bounded)
  }
}
