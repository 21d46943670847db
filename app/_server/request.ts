import { z } from 'zod'
import { fail, type Result, succeed } from '@/lib/failures'

const safeMethods = new Set(['GET', 'HEAD', 'OPTIONS'])

/** Where this server is reached, when it stands behind another one; otherwise the host header says. */
export function publicOrigin(): URL | undefined {
  return process.env.AUTH_URL ? new URL(process.env.AUTH_URL) : undefined
}

/**
 * A state change must come from our own pages: browsers send `Origin` with every POST, PATCH and DELETE, and a JSON
 * content type cannot be sent across sites without asking first.
 */
export function checkStateChange(request: Request): Result<void> {
  if (safeMethods.has(request.method)) return succeed(undefined)
  const host = publicOrigin()?.host ?? request.headers.get('host') ?? new URL(request.url).host
  const origin = request.headers.get('origin')
  if (origin === null || !URL.canParse(origin) || new URL(origin).host !== host) {
    return fail('forbidden', 'A change must be sent from a page of this site.', {
      message: 'origin missing or foreign',
    })
  }
  const type = request.headers.get('content-type')?.split(';')[0]?.trim().toLowerCase()
  if (request.method !== 'DELETE' && type !== 'application/json') {
    return fail('invalid', 'The request must be JSON (content type application/json).')
  }
  return succeed(undefined)
}

/** Reads a JSON body of at most `limit` bytes, counted as they arrive, and checks it. */
export async function readJson<T>(request: Request, schema: z.ZodType<T>, limit: number): Promise<Result<T>> {
  const text = await readText(request, limit)
  if (!text.ok) return text
  let value: unknown
  try {
    value = JSON.parse(text.value)
  } catch {
    return fail('invalid', 'The request body is not JSON.')
  }
  return check(schema, value)
}

export function check<T>(schema: z.ZodType<T>, value: unknown): Result<T> {
  const parsed = schema.safeParse(value)
  if (parsed.success) return succeed(parsed.data)
  const issue = parsed.error.issues[0]
  const where = issue?.path.join('.')
  const what = issue?.message ?? 'not what was expected'
  return fail(
    'invalid',
    where ? `${where}: ${what}.` : `The request is not what was expected: ${what}.`,
    where ? { name: where } : {},
  )
}

const idSchema = z.uuid()

/** The id in the address. A malformed one is answered like one that does not exist. */
export async function workbookId(params: Promise<{ readonly id: string }>): Promise<Result<string>> {
  const { id } = await params
  return idSchema.safeParse(id).success ? succeed(id) : fail('not-found', 'There is no such workbook.')
}

async function readText(request: Request, limit: number): Promise<Result<string>> {
  const refused = fail(
    'limit',
    `The request is larger than ${Math.floor(limit / 1024)} kB, which is the limit.`,
  )
  if (Number(request.headers.get('content-length') ?? 0) > limit) return refused
  if (!request.body) return succeed('')
  const reader = request.body.getReader()
  const decoder = new TextDecoder()
  let size = 0
  let text = ''
  for (;;) {
    const { done, value } = await reader.read()
    if (done) return succeed(text + decoder.decode())
    size += value.byteLength
    if (size > limit) {
      await reader.cancel()
      return refused
    }
    text += decoder.decode(value, { stream: true })
  }
}
