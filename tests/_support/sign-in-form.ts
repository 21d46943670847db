/** The sign-in form as a browser without scripts would send it. */

export interface FormAnswer {
  readonly status: number
  readonly location: string | null
  /** `name=value` of the session cookie, when one was set. */
  readonly cookie: string | undefined
  readonly setCookies: readonly string[]
  readonly text: string
}

export async function sendSignInForm(
  address: string,
  fields: { readonly email: string; readonly password: string; readonly next?: string },
  headers: Record<string, string> = {},
): Promise<FormAnswer> {
  const page = await (await fetch(`${address}/sign-in`, { headers: { cookie: '' } })).text()
  const form = new FormData()
  for (const [tag] of page.matchAll(/<input[^>]*type="hidden"[^>]*>/g)) {
    const name = /name="([^"]*)"/.exec(tag)?.[1]
    const value = /value="([^"]*)"/.exec(tag)?.[1] ?? ''
    if (name) form.append(name, unescaped(value))
  }
  if (![...form.keys()].some((key) => key.startsWith('$ACTION'))) throw new Error('the form names no action')
  form.set('email', fields.email)
  form.set('password', fields.password)
  if (fields.next !== undefined) form.set('next', fields.next)
  const response = await fetch(`${address}/sign-in`, {
    method: 'POST',
    body: form,
    redirect: 'manual',
    headers: { origin: address, ...headers },
  })
  const setCookies = response.headers.getSetCookie()
  return {
    status: response.status,
    location: response.headers.get('location'),
    cookie: setCookies.find((cookie) => /panewright-session=[^;]/.test(cookie))?.split(';')[0],
    setCookies,
    text: await response.text(),
  }
}

function unescaped(text: string): string {
  return text
    .replaceAll('&quot;', '"')
    .replaceAll('&#x27;', "'")
    .replaceAll('&lt;', '<')
    .replaceAll('&gt;', '>')
    .replaceAll('&amp;', '&')
}
