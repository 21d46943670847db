import { fail, type Result } from '../../lib/failures'

/** SQLSTATE classes and codes that say the server is away, full or too slow, rather than that we asked wrongly. */
const awayStates = ['08', '53', '57P', '57014', '25P03', '58']
const awayErrors = new Set(['ECONNREFUSED', 'ECONNRESET', 'EPIPE', 'ETIMEDOUT', 'ENOTFOUND', 'EHOSTUNREACH'])
/** The driver gives these no code. */
const awayMessages =
  /timeout exceeded when trying to connect|Connection terminated|Client has encountered a connection error/

/** Turns a database that does not answer into the failure `unavailable`; anything else is a bug and is thrown on. */
export async function attempt<T>(work: () => Promise<Result<T>>): Promise<Result<T>> {
  try {
    return await work()
  } catch (error) {
    if (!isAway(error)) throw error
    return fail(
      'unavailable',
      'The database does not answer. Your changes are kept here; try again in a moment.',
      {
        message: error instanceof Error ? error.message : String(error),
      },
    )
  }
}

export function isAway(error: unknown): boolean {
  if (!(error instanceof Error)) return false
  const code = 'code' in error && typeof error.code === 'string' ? error.code : ''
  return (
    awayErrors.has(code) ||
    awayStates.some((state) => code.startsWith(state)) ||
    awayMessages.test(error.message)
  )
}
