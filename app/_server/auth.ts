import { cookies } from 'next/headers'
import NextAuth, { CredentialsSignin, type NextAuthConfig } from 'next-auth'
import Credentials from 'next-auth/providers/credentials'
import { signIn as openSession } from '@/db/access/members'
import { type Failure, type Result, succeed } from '@/lib/failures'
import { logBug } from './log'
import { sessionCookie, sessionSeconds, sessionSecret } from './session'

/** Carries the worded refusal through the sign-in library. */
class Refused extends CredentialsSignin {
  constructor(readonly failure: Failure) {
    super(failure.text)
  }
}

/** The library keeps an address to return to in this; the sign-in form has its own, so it is taken away again. */
const returnCookie = 'panewright-return'

/**
 * The cookie is an encrypted token that holds the session row's token and nothing else. The library's own routes are
 * not mounted: signing in is a server action, so that token is never handed to a page's scripts.
 */
const auth = NextAuth((): NextAuthConfig => {
  const { name, secure } = sessionCookie()
  return {
    secret: sessionSecret(),
    trustHost: true,
    session: { strategy: 'jwt', maxAge: sessionSeconds },
    cookies: {
      sessionToken: { name, options: { httpOnly: true, sameSite: 'lax', path: '/', secure } },
      callbackUrl: { name: returnCookie, options: { httpOnly: true, sameSite: 'lax', path: '/', secure } },
    },
    pages: { signIn: '/sign-in', error: '/sign-in' },
    providers: [
      Credentials({
        credentials: { email: {}, password: {} },
        async authorize({ email, password }, request) {
          const opened = await openSession({
            email: String(email),
            password: String(password),
            address: addressOf(request.headers),
          })
          if (!opened.ok) throw new Refused(opened.failure)
          return { id: opened.value.sessionToken }
        },
      }),
    ],
    callbacks: {
      jwt: ({ token, user }) => (user?.id ? { session: user.id } : token),
    },
    logger: {
      error(error) {
        if (!(error instanceof Refused)) logBug('sign-in failed', error)
      },
    },
  }
})

/** Checks the password and sets the session cookie on the response under way. For server actions only. */
export async function signInWith(email: string, password: string): Promise<Result<void>> {
  try {
    await auth.signIn('credentials', { email, password, redirect: false })
    ;(await cookies()).delete(returnCookie)
    return succeed(undefined)
  } catch (error) {
    if (error instanceof Refused) return { ok: false, failure: error.failure }
    throw error
  }
}

/** The nearest address that a proxy or the server itself wrote; anything before it is the caller's own claim. */
function addressOf(headers: Headers): string {
  return headers.get('x-forwarded-for')?.split(',').at(-1)?.trim() || 'unknown'
}
