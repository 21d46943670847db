const plain = /^[ -~]*$/

/** Text as it is compared: lower case, without accents, quotes and dashes made plain. */
export function fold(text: string): string {
  // Nearly all text is plain, and 5,000 entries are folded at the first key.
  if (plain.test(text)) return text.toLowerCase().trim()
  return text
    .normalize('NFD')
    .replace(/\p{M}/gu, '')
    .replace(/[’‘′]/g, "'")
    .replace(/[“”″]/g, '"')
    .replace(/[‐‑‒–—]/g, '-')
    .toLowerCase()
    .trim()
}

/** Words of folded text; underscores and hyphens part words, so that `frame_width` is two. */
export function wordsOf(folded: string): string[] {
  const gap = plain.test(folded) ? /[^a-z0-9.%']+/ : /[^\p{L}\p{N}.%']+/u
  return folded.split(gap).filter((word) => word !== '' && word !== '.')
}

/** Words that say nothing about which entry is meant, once others do. */
const fillers = new Set(['the', 'a', 'an', 'of', 'to', 'with', 'in', 'on', 'as', 'and', 'please'])

export function withoutFillers(words: readonly string[]): readonly string[] {
  const kept = words.filter((word) => !fillers.has(word))
  return kept.length === 0 ? words : kept
}

export function lowerFirst(text: string): string {
  const [first = '', second = ''] = text
  // An abbreviation ("U-value", "PAR light") keeps its capitals.
  if (second !== second.toLowerCase() || !/\p{L}/u.test(second)) return text
  return first.toLowerCase() + text.slice(1)
}

export function upperFirst(text: string): string {
  return text.slice(0, 1).toUpperCase() + text.slice(1)
}
