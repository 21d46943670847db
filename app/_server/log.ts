/** What a log line may hold: ids, codes and counts. Never a price, a person's name, an address or a token. */
export interface LogFields {
  readonly event: string
  readonly [field: string]: string | number | boolean | undefined
}

/** One JSON object a line, UTC; JSON escapes line breaks, so a field cannot forge a line. */
export function log(level: 'info' | 'warning' | 'error', fields: LogFields): void {
  process.stdout.write(`${JSON.stringify({ at: new Date().toISOString(), level, ...fields })}\n`)
}

/** Logs a bug in full and returns the reference under which a person can report it. */
export function logBug(event: string, error: unknown): string {
  const reference = crypto.randomUUID().slice(0, 8)
  const detail = error instanceof Error ? (error.stack ?? error.message) : String(error)
  log('error', { event, reference, detail })
  return reference
}
