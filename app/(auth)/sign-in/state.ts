/** What the form shows after a try: the e-mail that was typed, and what was wrong with which field. */
export interface SignInState {
  readonly email: string
  readonly field?: 'email' | 'password' | 'form'
  readonly text?: string
}
