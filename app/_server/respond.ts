import { type Failure, httpStatus, type Result } from '@/lib/failures'
import { log, logBug } from './log'
import { checkStateChange } from './request'

type Answer = Response | Result<unknown>
type Context<P> = { readonly params: Promise<P> }
type Handler<P> = (request: Request, context: Context<P>) => Promise<Answer>

/**
 * Makes a route handler: refuses a state change from another site, turns a `Result` into a response, and lets nothing
 * of the inside out when something throws.
 */
export function route<P = Record<string, never>>(handler: Handler<P>) {
  return async (request: Request, context: Context<P>): Promise<Response> => {
    try {
      const allowed = checkStateChange(request)
      if (!allowed.ok) return failed(request, allowed.failure)
      const answer = await handler(request, context)
      if (answer instanceof Response) return answer
      return answer.ok ? json(answer.value) : failed(request, answer.failure)
    } catch (error) {
      const reference = logBug('request failed', error)
      return json(
        {
          code: 'internal',
          text: `Something went wrong on our side. If it happens again, report it with the reference ${reference}.`,
          reference,
        },
        500,
      )
    }
  }
}

export function json(body: unknown, status = 200, headers: Record<string, string> = {}): Response {
  return Response.json(body ?? null, { status, headers: { 'cache-control': 'no-store', ...headers } })
}

function failed(request: Request, failure: Failure): Response {
  const { code, text, name, message } = failure
  log('info', {
    event: 'request refused',
    method: request.method,
    path: new URL(request.url).pathname,
    code,
    message,
  })
  return json(name === undefined ? { code, text } : { code, text, name }, httpStatus[code])
}
