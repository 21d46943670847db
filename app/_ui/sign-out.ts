import type { Result } from '@/lib/failures'
import { ask } from './request'

/** Ends the session on the server, then leaves the page, so that nothing of it stays on the screen. */
export async function signOut(): Promise<Result<void>> {
  const ended = await ask<null>('DELETE', '/api/session')
  if (!ended.ok && ended.failure.code !== 'unauthenticated') return ended
  location.assign('/sign-in')
  return { ok: true, value: undefined }
}
