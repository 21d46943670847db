/** Runs once as the server starts. Starts nothing: it only makes the end orderly. */
export async function register(): Promise<void> {
  if (process.env.NEXT_RUNTIME !== 'nodejs') return
  const { closeOnTerminate } = await import('./app/_server/closing')
  closeOnTerminate()
}

/** What a page throws is logged under the digest that the error page shows. */
export async function onRequestError(error: unknown, request: { readonly path: string }): Promise<void> {
  if (process.env.NEXT_RUNTIME !== 'nodejs') return
  const { log } = await import('./app/_server/log')
  const digest =
    error instanceof Error && 'digest' in error && typeof error.digest === 'string' ? error.digest : undefined
  const detail = error instanceof Error ? (error.stack ?? error.message) : String(error)
  log('error', { event: 'page failed', reference: digest, path: request.path.split('?')[0], detail })
}
