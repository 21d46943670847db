/** Edits (one letter added, taken away or changed) that lead from one word to the other. Levenshtein 1966. */
export function editDistance(from: string, to: string): number {
  let previous = Array.from({ length: to.length + 1 }, (_, index) => index)
  for (let i = 1; i <= from.length; i++) {
    const row = [i]
    for (let j = 1; j <= to.length; j++) {
      const change = (previous[j - 1] ?? 0) + (from[i - 1] === to[j - 1] ? 0 : 1)
      row.push(Math.min(change, (previous[j] ?? 0) + 1, (row[j - 1] ?? 0) + 1))
    }
    previous = row
  }
  return previous[to.length] ?? 0
}

/** The known word nearest to what was written; the first of equals. Long words are compared by their first 80 letters. */
export function nearest(written: string, known: readonly string[]): string | undefined {
  const short = written.slice(0, 80).toLowerCase()
  let best: string | undefined
  let least = Number.POSITIVE_INFINITY
  for (const word of known) {
    const distance = editDistance(short, word.toLowerCase())
    if (distance < least) {
      least = distance
      best = word
    }
  }
  return best
}

/** What was written, safe on one line: control characters as spaces, cut after 60 letters. */
export function quoted(written: string): string {
  const line = written.replace(/[\p{Cc}\p{Cf}\p{Zl}\p{Zp}\p{Cs}]+/gu, ' ')
  return `"${line.length > 60 ? `${line.slice(0, 60)}…` : line}"`
}
