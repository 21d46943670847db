import type { BrowserContext } from 'playwright-core'
import type { AppendAccepted, Operation, WorkbookOpened } from '@/lib/workbook'
import type { BenchApp } from './bench-app'

/** The product's own routes, as the signed-in person of a browser context. */
export interface Api {
  readonly headers: Readonly<Record<string, string>>
  get<T>(path: string): Promise<T>
  post<T>(path: string, body: unknown): Promise<T>
}

export async function apiOf(context: BrowserContext, app: BenchApp): Promise<Api> {
  const cookies = await context.cookies(app.address)
  const headers = {
    cookie: cookies.map(({ name, value }) => `${name}=${value}`).join('; '),
    origin: app.address,
    'content-type': 'application/json',
  }
  const ask = async <T>(path: string, init: RequestInit): Promise<T> => {
    const response = await fetch(app.address + path, { ...init, headers })
    if (!response.ok) throw new Error(`${path} answered ${response.status}: ${await response.text()}`)
    return (await response.json()) as T
  }
  return {
    headers,
    get: (path) => ask(path, { method: 'GET' }),
    post: (path, body) => ask(path, { method: 'POST', body: JSON.stringify(body) }),
  }
}

export function newWorkbook(api: Api, title: string): Promise<{ readonly id: string }> {
  return api.post('/api/workbooks', { title, frame: 'gable', system: 'us' })
}

/** Sends operations as one batch each; gives the sequence after them. */
export async function send(
  api: Api,
  workbook: string,
  base: number,
  operations: readonly Operation[],
): Promise<number> {
  const batch = crypto.randomUUID()
  const sent = operations.map((op) => ({ id: crypto.randomUUID(), batch, op }))
  const path = `/api/workbooks/${workbook}/operations`
  return (await api.post<AppendAccepted>(path, { base, operations: sent })).seq
}

/** Waits until the newest state is stored with its values, as it is some seconds after the last change. */
export async function untilValuesKept(api: Api, workbook: string): Promise<void> {
  for (let tries = 0; tries < 120; tries++) {
    const { snapshot, seq } = await api.get<WorkbookOpened>(`/api/workbooks/${workbook}`)
    if (snapshot.values && snapshot.seq === seq) return
    await new Promise((resolve) => setTimeout(resolve, 1_000))
  }
  throw new Error('the values of a workbook were not kept within two minutes')
}
