/** Whatever was started is stopped again, last first, also when a later start fails. */
export async function withCleanup<T>(
  work: (later: (stop: () => Promise<void>) => void) => Promise<T>,
): Promise<T> {
  const stops: (() => Promise<void>)[] = []
  try {
    return await work((stop) => stops.unshift(stop))
  } finally {
    for (const stop of stops)
      await stop().catch((error: unknown) => console.error('could not be stopped:', error))
  }
}
