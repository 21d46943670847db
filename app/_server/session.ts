import { getToken } from 'next-auth/jwt'
import { type Actor, actorOf } from '@/db/access/members'
import { fail, type Result } from '@/lib/failures'
import { publicOrigin } from './request'

/** Longest life of a sign-in whatever happens; the session row ends earlier when it is idle, signed out or removed. */
export const sessionSeconds = 30 * 24 * 60 * 60

/** Behind https the cookie is bound to this host and never sent in the clear. */
export function sessionCookie(): { readonly name: string; readonly secure: boolean } {
  const secure = publicOrigin()?.protocol === 'https:'
  return { name: secure ? '__Host-panewright-session' : 'panewright-session', secure }
}

export function sessionSecret(): string {
  const secret = process.env.AUTH_SECRET ?? ''
  if (secret.length < 32) throw new Error('AUTH_SECRET must hold at least 32 characters; npm start makes one')
  return secret
}

/** The token of the session row that this request's cookie names. The row alone says whether it still counts. */
export async function sessionToken(headers: Headers): Promise<string | undefined> {
  const { name, secure } = sessionCookie()
  const claims = await getToken({
    req: { headers },
    secret: sessionSecret(),
    secureCookie: secure,
    cookieName: name,
    salt: name,
  })
  return typeof claims?.session === 'string' ? claims.session : undefined
}

/** Who is asking, read from the session row on every request, so that an ended session ends at once. */
export async function requireActor(request: { readonly headers: Headers }): Promise<Result<Actor>> {
  const token = await sessionToken(request.headers)
  return token === undefined ? fail('unauthenticated', 'Sign in to go on.') : actorOf(token)
}

/** A `set-cookie` value that takes the session cookie away. */
export function clearedSessionCookie(): string {
  const { name, secure } = sessionCookie()
  return `${name}=; Path=/; Max-Age=0; HttpOnly; SameSite=Lax${secure ? '; Secure' : ''}`
}
