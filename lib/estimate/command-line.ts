import { fail, type Result, succeed } from '../failures'
import { nearest, quoted } from './nearest'

export interface CommandLine {
  readonly input: string
  readonly json: boolean
  readonly xlsx?: string
  readonly cuts?: string
}

export const usage =
  'npm run --silent estimate -- --input FILE.json [--json] [--xlsx OUT.xlsx] [--cuts OUT.json]'
const flags = ['--input', '--json', '--xlsx', '--cuts'] as const

/** The command's arguments; each flag once. */
export function readCommandLine(given: readonly string[]): Result<CommandLine> {
  const files = new Map<string, string>()
  let json = false
  for (let i = 0; i < given.length; i++) {
    const word = given[i] ?? ''
    const flag = flags.find((one) => one === word)
    if (!flag) {
      return fail('invalid', `Expected ${usage}; the nearest to ${quoted(word)} is ${nearest(word, flags)}.`)
    }
    if (flag === '--json' ? json : files.has(flag)) return fail('invalid', `Expected ${flag} once.`)
    if (flag === '--json') {
      json = true
      continue
    }
    const file = given[++i]
    if (file === undefined || file === '' || file.startsWith('--')) {
      return fail('invalid', `Expected a file name after ${flag}.`)
    }
    files.set(flag, file)
  }
  const input = files.get('--input')
  if (input === undefined) return fail('invalid', `Expected ${usage}.`)
  const xlsx = files.get('--xlsx')
  const cuts = files.get('--cuts')
  return succeed({
    input,
    json,
    ...(xlsx === undefined ? {} : { xlsx }),
    ...(cuts === undefined ? {} : { cuts }),
  })
}
