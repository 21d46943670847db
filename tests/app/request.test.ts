import { afterEach, beforeEach, describe, expect, test } from 'vitest'
import { z } from 'zod'
import { checkStateChange, readJson } from '@/app/_server/request'

const address = 'http://localhost:3100/api/workbooks'
const ours = { origin: 'http://localhost:3100', 'content-type': 'application/json' }

beforeEach(() => {
  delete process.env.AUTH_URL
})
afterEach(() => {
  delete process.env.AUTH_URL
})

function request(method: string, headers: Record<string, string>): Request {
  return new Request(address, { method, headers: { host: 'localhost:3100', ...headers } })
}

describe('a state change', () => {
  test.each([
    ['POST', ours],
    ['PATCH', { ...ours, 'content-type': 'application/json; charset=utf-8' }],
    ['DELETE', { origin: ours.origin }],
    ['GET', {}],
    ['HEAD', {}],
  ])('%s from our own page is let through', (method, headers) => {
    expect(checkStateChange(request(method, headers)).ok).toBe(true)
  })

  test.each([
    ['no origin', 'POST', { 'content-type': 'application/json' }, 'forbidden'],
    ['a foreign origin', 'POST', { ...ours, origin: 'http://evil.example' }, 'forbidden'],
    ['another port', 'DELETE', { origin: 'http://localhost:3101' }, 'forbidden'],
    ['an opaque origin', 'PATCH', { ...ours, origin: 'null' }, 'forbidden'],
    ['a form', 'POST', { ...ours, 'content-type': 'application/x-www-form-urlencoded' }, 'invalid'],
    ['plain text', 'POST', { ...ours, 'content-type': 'text/plain' }, 'invalid'],
    ['no type', 'PATCH', { origin: ours.origin }, 'invalid'],
  ])('with %s is refused', (_what, method, headers, code) => {
    const allowed = checkStateChange(request(method, headers as Record<string, string>))
    expect(allowed.ok ? 'let through' : allowed.failure.code).toBe(code)
  })

  test('behind another server, that one’s address counts and not the host header', () => {
    process.env.AUTH_URL = 'https://panewright.example'
    expect(checkStateChange(request('POST', ours)).ok).toBe(false)
    expect(checkStateChange(request('POST', { ...ours, origin: 'https://panewright.example' })).ok).toBe(true)
  })
})

describe('a JSON body', () => {
  const schema = z.strictObject({ title: z.string() })
  const read = (body: BodyInit) =>
    readJson(new Request(address, { method: 'POST', body, duplex: 'half' } as RequestInit), schema, 64)

  test('is read across chunks, letters of several bytes and all', async () => {
    const bytes = new TextEncoder().encode('{"title":"Gewächshaus ☀"}')
    const body = new ReadableStream({
      start(controller) {
        for (const byte of bytes) controller.enqueue(new Uint8Array([byte]))
        controller.close()
      },
    })
    expect(await read(body)).toEqual({ ok: true, value: { title: 'Gewächshaus ☀' } })
  })

  test.each([
    ['not JSON', '{', 'invalid'],
    ['empty', '', 'invalid'],
    ['with an unknown key', '{"title":"a","role":"owner"}', 'invalid'],
    ['of another kind', '{"title":7}', 'invalid'],
    ['too large by its declared size', `{"title":"${'a'.repeat(80)}"}`, 'limit'],
  ])('%s is refused', async (_what, body, code) => {
    const answer = await read(body)
    expect(answer.ok ? 'read' : answer.failure.code).toBe(code)
  })

  test('an endless one is let go of at the limit', async () => {
    let sent = 0
    let cancelled = false
    const body = new ReadableStream({
      pull(controller) {
        sent += 16
        controller.enqueue(new Uint8Array(16).fill(32))
      },
      cancel() {
        cancelled = true
      },
    })
    const answer = await read(body)
    expect(answer.ok ? 'read' : answer.failure.code).toBe('limit')
    expect(sent).toBeLessThan(200)
    expect(cancelled).toBe(true)
  })
})
