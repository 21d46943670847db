import { headers } from 'next/headers'
import { redirect } from 'next/navigation'
import type { Actor } from '@/db/access/members'
import { requireActor } from './session'

/** Who is looking at a page. Nobody signed in: to the sign-in page, and back to `path` afterwards. */
export async function requirePageActor(path: string): Promise<Actor> {
  const actor = await requireActor({ headers: await headers() })
  if (actor.ok) return actor.value
  if (actor.failure.code !== 'unauthenticated') throw new Error(actor.failure.message ?? actor.failure.text)
  redirect(`/sign-in?next=${encodeURIComponent(path)}`)
}
