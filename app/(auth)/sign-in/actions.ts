'use server'

import { redirect } from 'next/navigation'
import { z } from 'zod'
import { signInWith } from '@/app/_server/auth'
import { logBug } from '@/app/_server/log'
import { safeNext } from '@/app/_server/safe-next'
import type { SignInState } from './state'

const fields = z.object({
  email: z.string().trim().pipe(z.email()),
  password: z.string().min(1).max(1024),
})

/** Signs in and goes on to where the person was headed; otherwise says what to do and keeps the typed e-mail. */
export async function signInWithPassword(_previous: SignInState, form: FormData): Promise<SignInState> {
  const typed = String(form.get('email') ?? '').slice(0, 320)
  const parsed = fields.safeParse({ email: typed, password: form.get('password') })
  if (!parsed.success) {
    const email = parsed.error.issues.some((issue) => issue.path[0] === 'email')
    return email
      ? { email: typed, field: 'email', text: 'Type your whole e-mail address, such as name@firm.example.' }
      : { email: typed, field: 'password', text: 'Type your password.' }
  }
  try {
    const done = await signInWith(parsed.data.email, parsed.data.password)
    if (!done.ok) return { email: typed, field: 'form', text: done.failure.text }
  } catch (error) {
    const reference = logBug('sign-in failed', error)
    return {
      email: typed,
      field: 'form',
      text: `Signing in does not work at the moment. Try again in a minute (reference ${reference}).`,
    }
  }
  redirect(safeNext(form.get('next')))
}
