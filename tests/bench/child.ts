import { spawn } from 'node:child_process'
import { fileURLToPath } from 'node:url'

const mark = 'RESULT '

/**
 * Runs `tests/bench/FILE` in a fresh process, so that neither heap nor compiled code of an earlier measurement
 * helps or hurts; its answer is what it gave to `answer`. Throws with the child's own words when it fails.
 */
export function runFresh<T>(file: string, argument: unknown, flags: readonly string[] = []): Promise<T> {
  const path = fileURLToPath(new URL(file, import.meta.url))
  return new Promise((resolve, reject) => {
    const child = spawn(process.execPath, [...flags, '--import', 'tsx', path, JSON.stringify(argument)], {
      stdio: ['ignore', 'pipe', 'pipe'],
    })
    let out = ''
    let errors = ''
    child.stdout.setEncoding('utf8').on('data', (text: string) => {
      out += text
    })
    child.stderr.setEncoding('utf8').on('data', (text: string) => {
      errors += text
    })
    child.on('error', reject)
    child.on('close', (code) => {
      const line = out.split('\n').find((text) => text.startsWith(mark))
      if (code === 0 && line) resolve(JSON.parse(line.slice(mark.length)) as T)
      else reject(new Error(`${file} ended with ${code}: ${errors || out}`))
    })
  })
}

export function childArgument<T>(): T {
  return JSON.parse(process.argv[2] ?? 'null') as T
}

export function answer(value: unknown): void {
  console.log(mark + JSON.stringify(value))
}
