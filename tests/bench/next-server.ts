import { type ChildProcess, spawn } from 'node:child_process'
import { createServer } from 'node:net'
import { nextProgram } from './empty-app'

/** One `next start` that the benchmark owns. `address` is its origin, without a slash at the end. */
export interface Server {
  readonly address: string
  stop(): Promise<void>
}

/** Gives a port of the loopback that nobody listens on at the moment. */
export function freePort(): Promise<number> {
  return new Promise((resolve, reject) => {
    const probe = createServer()
    probe.on('error', reject)
    probe.listen(0, '127.0.0.1', () => {
      const address = probe.address()
      probe.close(() =>
        typeof address === 'object' && address ? resolve(address.port) : reject(new Error('no port')),
      )
    })
  })
}

export async function startNext(folder: string): Promise<Server> {
  const port = await freePort()
  const child = spawn(
    process.execPath,
    [nextProgram(folder), 'start', folder, '-p', String(port), '-H', '127.0.0.1'],
    {
      cwd: folder,
      env: { ...process.env, NODE_ENV: 'production', NEXT_TELEMETRY_DISABLED: '1' },
      stdio: ['ignore', 'pipe', 'pipe'],
    },
  )
  let output = ''
  for (const stream of [child.stdout, child.stderr]) {
    stream.on('data', (data: Buffer) => {
      output = (output + data.toString()).slice(-4_000)
    })
  }
  const address = `http://localhost:${port}`
  for (let tries = 0; tries < 150; tries++) {
    if (child.exitCode !== null) break
    try {
      await fetch(`http://127.0.0.1:${port}/`, { redirect: 'manual' })
      return { address, stop: () => stopProcess(child) }
    } catch {
      await new Promise((resolve) => setTimeout(resolve, 200))
    }
  }
  await stopProcess(child)
  throw new Error(`next start in ${folder} did not answer:\n${output}`)
}

async function stopProcess(child: ChildProcess): Promise<void> {
  if (child.exitCode !== null || child.signalCode !== null) return
  const ended = new Promise<void>((resolve) => child.once('exit', () => resolve()))
  child.kill('SIGTERM')
  const hurry = setTimeout(() => child.kill('SIGKILL'), 3_000)
  await ended
  clearTimeout(hurry)
}
