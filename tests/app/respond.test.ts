import { afterEach, beforeEach, describe, expect, test, vi } from 'vitest'
import { route } from '@/app/_server/respond'
import { fail, failureCodes, httpStatus, succeed } from '@/lib/failures'

const lines: string[] = []

beforeEach(() => {
  lines.length = 0
  vi.spyOn(process.stdout, 'write').mockImplementation((text) => {
    lines.push(String(text))
    return true
  })
})
afterEach(() => {
  vi.restoreAllMocks()
})

const get = () => new Request('http://localhost:3100/api/workbooks?search=secret')
const context = { params: Promise.resolve({}) }

test('a value is answered as JSON that is never stored', async () => {
  const response = await route(async () => succeed({ id: 1 }))(get(), context)
  expect(response.status).toBe(200)
  expect(response.headers.get('cache-control')).toBe('no-store')
  expect(await response.json()).toEqual({ id: 1 })
})

test.each(failureCodes)('a failure `%s` has its status, its words, and not the log’s words', async (code) => {
  const response = await route(async () => fail(code, 'What to do.', { message: 'inside', name: 'title' }))(
    get(),
    context,
  )
  expect(response.status).toBe(httpStatus[code])
  expect(await response.json()).toEqual({ code, text: 'What to do.', name: 'title' })
  expect(JSON.parse(lines[0] ?? '')).toMatchObject({ code, message: 'inside', path: '/api/workbooks' })
})

describe('a bug', () => {
  test('shows a reference that is in the log, and nothing of the inside', async () => {
    const response = await route(async () => {
      throw new Error('select secret from member\nat line 2')
    })(get(), context)
    const body = await response.text()
    expect(response.status).toBe(500)
    expect(body).not.toMatch(/select|secret|member|Error|\.ts/)
    const { reference, text } = JSON.parse(body)
    expect(text).toContain(reference)
    expect(lines).toHaveLength(1)
    expect(JSON.parse(lines[0] ?? '')).toMatchObject({ level: 'error', reference })
    expect(lines[0]).toContain('select secret from member')
  })

  test('is one line of the log, whatever line breaks are in it', async () => {
    await route(async () => {
      throw new Error('one\ntwo\r\n{"at":"forged"}')
    })(get(), context)
    expect((lines[0] ?? '').trimEnd().split(/[\r\n]/)).toHaveLength(1)
  })
})
