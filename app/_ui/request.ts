import { type Failure, fail, failureCodes, type Result, succeed } from '@/lib/failures'

/** Asks one of our own routes. A lost network and an answer that is not ours become worded failures too. */
export async function ask<T>(
  method: 'GET' | 'POST' | 'PATCH' | 'DELETE',
  path: string,
  body?: unknown,
): Promise<Result<T>> {
  let response: Response
  try {
    response = await fetch(path, {
      method,
      ...(body === undefined
        ? {}
        : { headers: { 'content-type': 'application/json' }, body: JSON.stringify(body) }),
    })
  } catch {
    return fail('unavailable', 'The server cannot be reached. Check the network and try again.')
  }
  const answer: unknown = await response.json().catch(() => null)
  return response.ok ? succeed(answer as T) : { ok: false, failure: failureIn(answer) }
}

function failureIn(answer: unknown): Failure {
  const { code, text, name } = (answer ?? {}) as Partial<Record<'code' | 'text' | 'name', unknown>>
  return {
    code: failureCodes.find((known) => known === code) ?? 'unavailable',
    text:
      typeof text === 'string' ? text : 'The server gave no answer that makes sense. Try again in a minute.',
    ...(typeof name === 'string' ? { name } : {}),
  }
}
