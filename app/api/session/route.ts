import { json, route } from '@/app/_server/respond'
import { clearedSessionCookie, requireActor, sessionToken } from '@/app/_server/session'
import { signOut } from '@/db/access/members'

/** Signs out: the session row ends, so a copy of the cookie is worth nothing; then the cookie goes too. */
export const DELETE = route(async (request) => {
  const actor = await requireActor(request)
  if (!actor.ok) return actor
  const token = await sessionToken(request.headers)
  const ended = token === undefined ? actor : await signOut(token)
  return ended.ok ? json(null, 200, { 'set-cookie': clearedSessionCookie() }) : ended
})
