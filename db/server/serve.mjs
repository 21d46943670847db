import { spawn } from 'node:child_process'
import { setTimeout as sleep } from 'node:timers/promises'
import { nextProgram } from './build.mjs'
import { track } from './children.mjs'
import { Obstacle, root } from './project.mjs'

/**
 * Starts the web server on a port of the loopback address and waits until it answers.
 * @param {{ port: number, dev?: boolean, env: Record<string, string>, output?: 'inherit' | 'ignore' | number }} options
 */
export async function serve({ port, dev = false, env, output = 'inherit' }) {
  const args = [nextProgram(), dev ? 'dev' : 'start', '-H', '127.0.0.1', '-p', String(port)]
  const child = spawn(process.execPath, args, {
    cwd: root,
    stdio: ['ignore', output, output],
    env: serverEnvironment(dev, env),
  })
  track(child)
  const ended = new Promise((resolve) => child.once('exit', resolve))
  const address = `http://localhost:${port}`
  const givingUp = new AbortController()
  const ready = await Promise.race([untilAnswers(port, givingUp.signal), ended.then(() => false)])
  givingUp.abort()
  if (!ready) {
    child.kill('SIGKILL')
    throw new Obstacle(`The web server did not start on ${address}.`)
  }
  return {
    address,
    child,
    ended,
    /** Ends it; after five seconds by force. */
    async stop() {
      if (child.exitCode !== null || child.signalCode !== null) return
      child.kill('SIGTERM')
      const timer = setTimeout(() => child.kill('SIGKILL'), 5000)
      await ended
      clearTimeout(timer)
    },
  }
}

/** The owner's address is kept from the web server: it works as the application's role only. */
function serverEnvironment(/** @type {boolean} */ dev, /** @type {Record<string, string>} */ given) {
  const environment = { ...process.env, ...given }
  if (given.APP_DATABASE_URL) delete environment.DATABASE_URL
  return /** @type {NodeJS.ProcessEnv} */ ({
    ...environment,
    NODE_ENV: dev ? 'development' : 'production',
    AUTH_TRUST_HOST: 'true',
    NEXT_TELEMETRY_DISABLED: '1',
  })
}

async function untilAnswers(/** @type {number} */ port, /** @type {AbortSignal} */ givenUp) {
  const deadline = Date.now() + 120_000
  while (Date.now() < deadline && !givenUp.aborted) {
    try {
      const signal = AbortSignal.timeout(60_000)
      await fetch(`http://127.0.0.1:${port}/sign-in`, { redirect: 'manual', signal })
      return true
    } catch {
      await sleep(150)
    }
  }
  return false
}
