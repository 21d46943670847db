type Stop = () => Promise<void>

/** What runs now and must be stopped, last started first. */
const running: Stop[] = []

/** Whatever was started is stopped again, last first, also when a later start fails. */
export async function withCleanup<T>(work: (later: (stop: Stop) => void) => Promise<T>): Promise<T> {
  const already = running.length
  try {
    return await work((stop) => running.unshift(stop))
  } finally {
    await stopAll(already)
  }
}

/** Stops all but the first `left`; a second call finds nothing left to do. */
export async function stopAll(left = 0): Promise<void> {
  while (running.length > left) {
    await running
      .shift()?.()
      .catch((error: unknown) => console.error('could not be stopped:', error))
  }
}
