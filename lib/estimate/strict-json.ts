import { fail, type Result, succeed } from '../failures'
import { quoted } from './nearest'

const deepest = 40

/** JSON whose objects say nothing twice: of two values for one name, nobody could tell which was meant. */
export function parseStrictJson(text: string): Result<unknown> {
  const depth = depthFault(text)
  if (depth) return depth
  let value: unknown
  try {
    value = JSON.parse(text)
  } catch {
    return fail('invalid', 'Expected a JSON file: an object with inputs, openings and overrides.')
  }
  const twice = repeatedKey(text)
  if (twice !== undefined)
    return fail('invalid', `Expected every name once in an object: ${quoted(twice)} is there twice.`)
  return succeed(value)
}

/** Strings, and the marks that give JSON its shape. */
const token = /"(?:[^"\\]|\\.)*"|[{}[\],:]/gs

function depthFault(text: string) {
  let depth = 0
  for (const [mark] of text.matchAll(token)) {
    if (mark === '{' || mark === '[') depth++
    if (mark === '}' || mark === ']') depth--
    if (depth > deepest) return fail('invalid', `Expected JSON at most ${deepest} levels deep.`)
  }
  return undefined
}

/** Of well-formed JSON: the first name that an object has twice. */
function repeatedKey(text: string): string | undefined {
  const open: (Set<string> | undefined)[] = []
  let last = ''
  for (const [mark] of text.matchAll(token)) {
    if (mark === '{') open.push(new Set())
    else if (mark === '[') open.push(undefined)
    else if (mark === '}' || mark === ']') open.pop()
    else if (mark === ':') {
      const key: unknown = JSON.parse(last)
      const names = open.at(-1)
      if (typeof key === 'string' && names) {
        if (names.has(key)) return key
        names.add(key)
      }
    }
    last = mark
  }
  return undefined
}
