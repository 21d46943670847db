import type { Failure } from '@/lib/failures'
import type { AppendAccepted, AppendBehind, AppendRequest, LoggedOperation } from '@/lib/workbook'

/** Every way the server can answer a batch, as far as sending goes. */
export type Answer =
  | {
      readonly kind: 'accepted'
      readonly seq: number
      readonly ids: ReadonlySet<string>
      readonly fresh: number
    }
  | { readonly kind: 'behind'; readonly seq: number; readonly missing: readonly LoggedOperation[] }
  | { readonly kind: 'refused'; readonly text: string }
  | { readonly kind: 'signed-out' }
  | { readonly kind: 'gone' }
  | { readonly kind: 'busy'; readonly seconds: number }
  | { readonly kind: 'unreachable' }

export interface Server {
  post(request: AppendRequest): Promise<Answer>
  /** Operations after `base`; undefined when they cannot be had now. */
  missing(base: number): Promise<{ seq: number; operations: readonly LoggedOperation[] } | undefined>
}

export function serverOf(workbook: string): Server {
  const address = `/api/workbooks/${encodeURIComponent(workbook)}`
  return {
    post: async (request) => {
      const response = await reach(`${address}/operations`, {
        method: 'POST',
        headers: { 'content-type': 'application/json' },
        body: JSON.stringify({
          base: request.base,
          operations: request.operations.map(({ id, batch, op }) => ({ id, batch, op })),
        }),
      })
      return response ? answerOf(response, request.base) : { kind: 'unreachable' }
    },
    missing: async (base) => {
      const response = await reach(`${address}/operations?after=${base}`, {
        headers: { accept: 'application/json' },
      })
      if (!response?.ok) return undefined
      const operations = (await response.json()) as readonly LoggedOperation[]
      return { seq: operations.at(-1)?.seq ?? base, operations }
    },
  }
}

/** A request that got no answer at all gives undefined. */
async function reach(address: string, init: RequestInit): Promise<Response | undefined> {
  try {
    return await fetch(address, { ...init, cache: 'no-store', credentials: 'same-origin' })
  } catch {
    return undefined
  }
}

async function answerOf(response: Response, base: number): Promise<Answer> {
  if (response.status === 401) return { kind: 'signed-out' }
  if (response.status === 404) return { kind: 'gone' }
  if (response.status === 429) {
    return { kind: 'busy', seconds: Number(response.headers.get('retry-after')) || 5 }
  }
  if (response.status >= 500) return { kind: 'unreachable' }
  const body = await json(response)
  if (response.ok) {
    const { seq, accepted } = body as AppendAccepted
    const fresh = accepted.filter((operation) => operation.seq > base).length
    return { kind: 'accepted', seq, ids: new Set(accepted.map((operation) => operation.id)), fresh }
  }
  if (response.status === 409) {
    const { seq, missing } = body as AppendBehind
    return { kind: 'behind', seq, missing }
  }
  const text = (body as Partial<Failure> | undefined)?.text
  return { kind: 'refused', text: text ?? 'The server did not accept this change.' }
}

async function json(response: Response): Promise<unknown> {
  try {
    return await response.json()
  } catch {
    return undefined
  }
}
