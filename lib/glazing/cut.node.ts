import { readFileSync } from 'node:fs'
import { parseArgs } from 'node:util'
import { fail, type Result } from '../failures'
import { loadIntegerProgram } from './cutting/highs.node'
import type { CuttingPlan } from './cutting/problem'
import { parseSawList } from './cutting/saw-list'
import { solveCutting } from './cutting/solve'

/** `cut --input FILE.json`: the plan as JSON on standard output; what is wrong as one line and exit code 2. */
async function cut(args: readonly string[]): Promise<Result<CuttingPlan>> {
  let input: string | undefined
  try {
    input = parseArgs({ args: [...args], options: { input: { type: 'string' } } }).values.input
  } catch {
    return fail('invalid', 'Expected: cut -- --input FILE.json')
  }
  if (input === undefined) return fail('invalid', 'Expected: cut -- --input FILE.json')
  let text: string
  try {
    text = readFileSync(input, 'utf8')
  } catch {
    return fail('invalid', `Expected a file that can be read at ${input}.`)
  }
  const problem = parseSawList(text)
  return problem.ok ? solveCutting(problem.value, await loadIntegerProgram()) : problem
}

const result = await cut(process.argv.slice(2))
if (result.ok) process.stdout.write(`${JSON.stringify(result.value)}\n`)
else {
  process.stderr.write(`${result.failure.text}\n`)
  process.exitCode = 2
}
