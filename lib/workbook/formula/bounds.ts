import type { Failure } from '../../failures'
import { limits } from '../limits'
import { scan } from './scan'

/**
 * Checks a formula before anything parses it, so that no parser can run out of stack or time:
 * length, nesting, arguments of one function, operators. Undefined when it is within bounds.
 */
export function formulaBounds(text: string): Failure | undefined {
  if (text.length > limits.formulaLength) {
    return over(
      `This formula has ${text.length} characters; at most ${limits.formulaLength} are possible. Split it over several cells.`,
    )
  }
  const separators: number[] = []
  let deepest = 0
  let most = 0
  let operators = 0
  scan(text, (kind, start) => {
    if (kind === 'open') {
      separators.push(0)
      deepest = Math.max(deepest, separators.length)
    } else if (kind === 'close') {
      separators.pop()
    } else if (kind === 'separator' && separators.length > 0) {
      const last = separators.length - 1
      const count = (separators[last] ?? 0) + 1
      separators[last] = count
      most = Math.max(most, count)
    } else if (kind === 'operator' && text[start] !== ':' && text[start] !== '!') {
      operators += 1
    }
  })
  if (deepest > limits.formulaDepth) {
    return over(
      `This formula has brackets ${deepest} deep; at most ${limits.formulaDepth} are possible. Move an inner part to a cell of its own.`,
    )
  }
  if (most + 1 > limits.formulaArguments) {
    return over(
      `A function here has ${most + 1} arguments; at most ${limits.formulaArguments} are possible. Put the values in cells and give their range.`,
    )
  }
  if (operators > limits.formulaOperators) {
    return over(
      `This formula has ${operators} operators; at most ${limits.formulaOperators} are possible. Use SUM over a range, or split it over several cells.`,
    )
  }
  return undefined
}

function over(text: string): Failure {
  return { code: 'limit', text }
}
