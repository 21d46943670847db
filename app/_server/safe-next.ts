const here = 'http://here.invalid'

/** Where to go after signing in: a path on this site, or the workbooks. Never another site, however it is spelled. */
export function safeNext(next: unknown): string {
  if (typeof next !== 'string' || !/^\/(?![/\\])/.test(next) || !URL.canParse(next, here)) return '/workbooks'
  const url = new URL(next, here)
  return url.origin === here && !url.pathname.startsWith('//')
    ? url.pathname + url.search + url.hash
    : '/workbooks'
}
