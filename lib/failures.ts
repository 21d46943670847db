/**
 * Expected failures are values of one closed union; only bugs are thrown.
 * `message` is for the log, `text` is for the person (what was expected, in plain words).
 */
export const failureCodes = [
  'invalid', // the request or input is not what was expected
  'unauthenticated', // nobody is signed in, or the session has ended
  'forbidden', // signed in, but the role or a lock does not allow it
  'not-found', // no such thing for this firm
  'behind', // based on an older state: fetch what came in between and try again
  'limit', // a stated limit would be passed
  'too-many', // too many tries; wait
  'unavailable', // a part the product needs does not answer
] as const

export type FailureCode = (typeof failureCodes)[number]

export interface Failure {
  readonly code: FailureCode
  readonly text: string
  readonly message?: string
  /** The input or named value that the failure is about. */
  readonly name?: string
}

export type Result<T> =
  | { readonly ok: true; readonly value: T }
  | { readonly ok: false; readonly failure: Failure }

/** HTTP status of each failure, the one table of it. */
export const httpStatus: Record<FailureCode, number> = {
  invalid: 400,
  unauthenticated: 401,
  forbidden: 403,
  'not-found': 404,
  behind: 409,
  limit: 422,
  'too-many': 429,
  unavailable: 503,
}

export function succeed<T>(value: T): Result<T> {
  return { ok: true, value }
}

export function fail(
  code: FailureCode,
  text: string,
  extra: { readonly name?: string; readonly message?: string } = {},
): { readonly ok: false; readonly failure: Failure } {
  return { ok: false, failure: { code, text, ...extra } }
}

/** Makes a switch over a closed union exhaustive at compile time. */
export function assertNever(value: never): never {
  throw new Error(`unexpected value: ${JSON.stringify(value)}`)
}
