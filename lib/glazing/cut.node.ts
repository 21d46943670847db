import { readFile, stat } from 'node:fs/promises'
import { resolve } from 'node:path'
import { parseArgs } from 'node:util'
import { fail, type Result } from '../failures'
import { loadIntegerProgram } from './cutting/highs.node'
import type { CuttingPlan } from './cutting/problem'
import { parseSawList } from './cutting/saw-list'
import { solveCutting } from './cutting/solve'

/** `cut -- --input FILE.json`: the plan as JSON on standard output; what is wrong as one line and exit code 2. */
const usage = 'Expected: npm run --silent cut -- --input FILE.json'
const largestFile = 5_000_000

/** Under `npm run` the working folder is the project's; file names are meant from where the command was given. */
const from = process.env.npm_lifecycle_event === 'cut' ? (process.env.INIT_CWD ?? '') : ''

async function cut(words: readonly string[]): Promise<Result<CuttingPlan>> {
  let input: string | undefined
  try {
    input = parseArgs({ args: [...words], options: { input: { type: 'string' } } }).values.input
  } catch {
    return fail('invalid', usage)
  }
  if (input === undefined || input === '') return fail('invalid', usage)
  let text: string
  try {
    const path = resolve(from, input)
    const { size } = await stat(path)
    if (size > largestFile) return fail('limit', `Expected a file of at most ${largestFile / 1e6} MB.`)
    text = new TextDecoder('utf-8', { fatal: true }).decode(await readFile(path))
  } catch {
    return fail('invalid', `Expected a JSON file in UTF-8 that can be read: ${JSON.stringify(input)}.`)
  }
  const problem = parseSawList(text)
  return problem.ok ? solveCutting(problem.value, await loadIntegerProgram()) : problem
}

cut(process.argv.slice(2)).then(
  (answer) => {
    if (answer.ok) process.stdout.write(`${JSON.stringify(answer.value)}\n`)
    else {
      process.stderr.write(`${answer.failure.text.replace(/\s+/g, ' ')}\n`)
      process.exitCode = 2
    }
  },
  (fault: unknown) => {
    process.stderr.write(`This is a fault of the program: ${String(fault).replace(/\s+/g, ' ')}\n`)
    process.exitCode = 1
  },
)
