const key = 'panewright.palette.recent'
const most = 8

/** Ids of entries run lately on this device, the last first. Storage may be refused; then nothing is remembered. */
export function readRecent(): readonly string[] {
  try {
    const stored: unknown = JSON.parse(localStorage.getItem(key) ?? '[]')
    return Array.isArray(stored) ? stored.filter((id) => typeof id === 'string').slice(0, most) : []
  } catch {
    return []
  }
}

export function rememberRecent(id: string): void {
  try {
    const others = readRecent().filter((known) => known !== id)
    localStorage.setItem(key, JSON.stringify([id, ...others].slice(0, most)))
  } catch {
    // Private windows refuse storage; the palette works without.
  }
}
