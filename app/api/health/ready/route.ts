import { json, route } from '@/app/_server/respond'
import { actorOf } from '@/db/access/members'

/**
 * 200 when the database answers and holds what sign-in needs, 503 otherwise; a stranger learns no more than that.
 * A session that cannot exist is looked up: "no such session" is the answer of a database in order.
 */
export const GET = route(async () => {
  const answer = await actorOf('probe').catch(() => undefined)
  const ready = answer !== undefined && !answer.ok && answer.failure.code === 'unauthenticated'
  return json({ ready }, ready ? 200 : 503)
})
