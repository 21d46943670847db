import { spawn } from 'node:child_process'
import { root } from './project.mjs'

/** @type {Set<import('node:child_process').ChildProcess>} */
const running = new Set()

/**
 * Runs a program to its end; all it says goes to standard error. Meanwhile this process still hears signals.
 * @param {string} program
 * @param {string[]} args
 * @param {Record<string, string | undefined>} [env] besides this process's own
 * @returns {Promise<number>} its status; 1 when a signal ended it
 */
export function runChild(program, args, env = {}) {
  return new Promise((resolve, reject) => {
    const environment = /** @type {NodeJS.ProcessEnv} */ ({ ...process.env, ...env })
    const child = spawn(program, args, { cwd: root, stdio: ['ignore', 2, 2], env: environment })
    child.once('error', reject)
    child.once('exit', (status) => resolve(status ?? 1))
    track(child)
  })
}

/** Has `endChildren` end this one too, as long as it runs. */
export function track(/** @type {import('node:child_process').ChildProcess} */ child) {
  running.add(child)
  child.once('exit', () => running.delete(child))
}

/** Ends what is under way. */
export function endChildren() {
  for (const child of running) child.kill('SIGTERM')
}
