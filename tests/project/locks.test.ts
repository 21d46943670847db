import { spawn } from 'node:child_process'
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { createServer } from 'node:net'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, describe, expect, test } from 'vitest'
import {
  joinUsers,
  leaveUsers,
  lockHolder,
  markIsAlive,
  processMark,
  takeLock,
  withLock,
} from '@/db/server/lock.mjs'
import { freePort, portIsFree } from '@/db/server/ports.mjs'

const folder = mkdtempSync(join(tmpdir(), 'panewright-locks-'))
afterAll(() => rmSync(folder, { recursive: true, force: true }))

/** The mark of a process that has ended. */
async function deadMark(): Promise<string> {
  const child = spawn(process.execPath, ['-e', 'setTimeout(() => {}, 60000)'], { stdio: 'ignore' })
  const mark = processMark(child.pid)
  expect(markIsAlive(mark)).toBe(true)
  const ended = new Promise((resolve) => child.once('exit', resolve))
  child.kill('SIGKILL')
  await ended
  return mark
}

describe('a lock', () => {
  test('is held by one, and given back', async () => {
    const path = join(folder, 'one')
    const release = await takeLock(path)
    expect(release).toBeTypeOf('function')
    expect(lockHolder(path)).toBe(processMark())
    expect(await takeLock(path)).toBeUndefined()
    release?.()
    expect(await takeLock(path)).toBeTypeOf('function')
  })

  test('of a process that was killed is taken over', async () => {
    const path = join(folder, 'dead')
    writeFileSync(path, await deadMark())
    expect(await takeLock(path)).toBeTypeOf('function')
  })

  test('of a later process with the same number is told from it', () => {
    expect(markIsAlive(processMark())).toBe(true)
    expect(markIsAlive(`${process.pid}-1`)).toBe(false)
    expect(markIsAlive('nonsense')).toBe(false)
    expect(markIsAlive('-1-0')).toBe(false)
  })

  test('lets twenty waiting pieces of work in one after another', async () => {
    const path = join(folder, 'turns')
    let inside = 0
    let most = 0
    const work = async () => {
      inside += 1
      most = Math.max(most, inside)
      await new Promise((resolve) => setTimeout(resolve, 1))
      inside -= 1
    }
    await Promise.all(Array.from({ length: 20 }, () => withLock(path, work)))
    expect(most).toBe(1)
  })

  test('counts users, without those that were killed', async () => {
    const users = join(folder, 'users')
    joinUsers(users)
    writeFileSync(join(users, await deadMark()), '')
    writeFileSync(join(users, processMark(process.ppid)), '')
    expect(leaveUsers(users)).toBe(1)
  })
})

describe('a port', () => {
  test.each(['127.0.0.1', '::1', undefined])(
    'taken on %s is not free, and the next is given',
    async (host) => {
      const server = createServer()
      await new Promise<void>((resolve) => server.listen({ port: 0, host }, resolve))
      const address = server.address()
      const port = typeof address === 'object' && address ? address.port : 0
      try {
        expect(await portIsFree(port)).toBe(false)
        expect(await freePort(port)).toBeGreaterThan(port)
      } finally {
        await new Promise((resolve) => server.close(resolve))
      }
      expect(await portIsFree(port)).toBe(true)
    },
  )

  test('5432 is never given', async () => {
    expect(await freePort(5432)).toBeGreaterThan(5432)
  })
})
