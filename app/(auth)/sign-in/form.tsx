'use client'

import { useActionState, useEffect, useRef } from 'react'
import { Button } from '@/app/_ui/button'
import { TextField } from '@/app/_ui/text-field'
import { signInWithPassword } from './actions'
import type { SignInState } from './state'

/** Posts without scripts too: the action's address is in the form. */
export function SignInForm({ next }: { readonly next: string }) {
  const [state, submit, pending] = useActionState<SignInState, FormData>(signInWithPassword, { email: '' })
  const form = useRef<HTMLFormElement>(null)

  // After a refused try the hand goes to the field that wants another answer.
  useEffect(() => {
    if (state.field === undefined) return
    const field = form.current?.elements.namedItem(state.field === 'email' ? 'email' : 'password')
    if (field instanceof HTMLInputElement) field.focus()
  }, [state])

  const errorOf = (field: SignInState['field']) => (state.field === field ? state.text : undefined)
  return (
    <form ref={form} action={submit} noValidate className="grid gap-5">
      <input type="hidden" name="next" value={next} />
      {state.field === 'form' ? (
        <p role="alert" className="rounded-soft border border-ember bg-raised px-4 py-3">
          <span className="font-semibold text-ember">Not signed in. </span>
          {state.text}
        </p>
      ) : null}
      <TextField
        label="E-mail"
        name="email"
        type="email"
        inputMode="email"
        autoComplete="username"
        autoCapitalize="none"
        spellCheck={false}
        maxLength={320}
        example="The address your firm's owner invited, such as name@firm.example"
        defaultValue={state.email}
        error={errorOf('email')}
        autoFocus
        required
      />
      <TextField
        label="Password"
        name="password"
        type="password"
        autoComplete="current-password"
        maxLength={1024}
        error={errorOf('password')}
        required
      />
      <Button type="submit" tone="action" disabled={pending} className="w-full">
        {pending ? 'Signing in' : 'Sign in'}
      </Button>
    </form>
  )
}
