import { fold, withoutFillers, wordsOf } from './words'

/**
 * One order for everything the palette lists.
 * [C1] Exact before prefix, prefix before the start of a later word, that before any other match, typos last.
 * [C2] The title counts a little more than other words for the same thing.
 * [C3] Of equal matches the recently used come first, then the heavier, then the shorter, then by id.
 * [C4] Every word of the query must be found; a word of four letters or more may hold one typo, of seven two.
 */
export interface Rankable {
  readonly id: string
  readonly title: string
  /** Other words for it: synonyms, names, codes. */
  readonly also?: readonly string[]
  /** Between -10 and 10, added to the score of a match (0 to 100). */
  readonly weight?: number
}

export interface Ranked<T> {
  readonly entry: T
  /** How well it matches, 0 to 100, before weight and recency. */
  readonly match: number
  readonly score: number
}

export interface RankOptions {
  readonly limit?: number
  /** Ids, most recent first. */
  readonly recent?: readonly string[]
}

/** The entries that match, best first. An empty query matches all, recent first. Pure; linear in the entries. */
export function rank<T extends Rankable>(
  entries: readonly T[],
  query: string,
  { limit = 50, recent = [] }: RankOptions = {},
): readonly Ranked<T>[] {
  const folded = fold(query)
  const words = wordsOf(folded)
  const asked: Query = {
    text: folded,
    words: withoutFillers(words),
    compact: words.join(''),
    begins: `${folded} `,
    later: ` ${folded}`,
    typos: new Map(),
  }
  const lately = new Map(recent.map((id, index) => [id, Math.max(1, 8 - index)]))
  const found: Ranked<T>[] = []
  const seen = new Set<string>()
  for (const entry of entries) {
    if (seen.has(entry.id)) continue
    seen.add(entry.id)
    const match = folded === '' ? 50 : matchOf(entry, asked)
    if (match === 0) continue
    const used = lately.get(entry.id) ?? 0
    // Without a query what was used lately leads; with one it only settles near-equal matches.
    const lift = folded === '' ? used * 10 : used
    found.push({ entry, match, score: match + (entry.weight ?? 0) + lift })
  }
  return found.sort(byScore).slice(0, limit)
}

function byScore<T extends Rankable>(a: Ranked<T>, b: Ranked<T>): number {
  return (
    b.score - a.score ||
    a.entry.title.length - b.entry.title.length ||
    (a.entry.id < b.entry.id ? -1 : a.entry.id > b.entry.id ? 1 : 0)
  )
}

interface Query {
  readonly text: string
  readonly words: readonly string[]
  readonly compact: string
  /** The text with a gap after it, and before it: whole words at the beginning, beginnings of later words. */
  readonly begins: string
  readonly later: string
  /** Typos by asked word and then by word of an entry: entries share most of their words. */
  readonly typos: Map<string, Map<string, number>>
}

interface Prepared {
  readonly text: string
  readonly words: readonly string[]
  readonly initials: string
  /** Without the gaps between words: "takeoff" is "Take-off". */
  readonly compact: string
}

interface PreparedEntry {
  readonly texts: readonly Prepared[]
  /** The words of all its texts, each once. */
  readonly words: readonly string[]
  readonly joined: string
}

const prepared = new WeakMap<Rankable, PreparedEntry>()

/** Entries live as long as the palette is open, and are asked again at every key. */
function prepare(entry: Rankable): PreparedEntry {
  const known = prepared.get(entry)
  if (known) return known
  const texts = [entry.title, ...(entry.also ?? [])].map((text) => {
    const folded = fold(text)
    const words = wordsOf(folded)
    const initials = words.map((word) => word[0] ?? '').join('')
    return { text: folded.includes('_') ? words.join(' ') : folded, words, initials, compact: words.join('') }
  })
  const words = [...new Set(texts.flatMap((text) => text.words))]
  const made = { texts, words, joined: words.join(' ') }
  prepared.set(entry, made)
  return made
}

/** 0 for no match, else up to 100. */
function matchOf(entry: Rankable, query: Query): number {
  const { texts, words, joined } = prepare(entry)
  const match = query.words.every((word) => joined.includes(word)) ? matchText : matchShort
  let best = 0
  for (let index = 0; index < texts.length; index++) {
    const text = texts[index]
    const score = text ? match(text, query) * (index === 0 ? 1 : 0.96) : 0
    if (score > best) best = score
  }
  if (best >= 40) return best
  // Words may also be spread over the title and the other words ("triple TP16").
  return Math.max(best, matchLoosely(words, query))
}

function matchText(prepared: Prepared, query: Query): number {
  const { text, words } = prepared
  if (text === query.text) return 100
  const closeness = query.text.length / Math.max(text.length, query.text.length)
  if (text.startsWith(query.begins)) return 91 + 4 * closeness
  if (text.startsWith(query.text)) return 86 + 4 * closeness
  if (text.includes(query.later)) return 80 + 6 * closeness
  const order = prefixMatch(words, query.words)
  if (order > 0) return order + 6 * closeness
  const short = matchShort(prepared, query)
  if (short > 0) return short
  if (query.text.length >= 3 && text.includes(query.text)) return 52 + 6 * closeness
  return 0
}

/** "takeoff" for "Take-off", "gtc" for "Go to a cell": the words run together, or their first letters. */
function matchShort({ compact, initials }: Prepared, query: Query): number {
  if (query.compact.length >= 4 && compact.startsWith(query.compact)) return 64
  return query.text.length >= 2 && initials.startsWith(query.text) ? 60 : 0
}

/** Every word of the query begins a word: 72 in their order, 64 in any order, else 0. */
function prefixMatch(words: readonly string[], asked: readonly string[]): number {
  if (asked.length === 0) return 0
  let from = 0
  let inOrder = true
  for (const word of asked) {
    let at = words.findIndex((candidate, index) => index >= from && candidate.startsWith(word))
    if (at === -1) {
      at = words.findIndex((candidate) => candidate.startsWith(word))
      inOrder = false
    }
    if (at === -1) return 0
    from = at + 1
  }
  return inOrder ? 72 : 64
}

/** Every word begins a word, stands within one, or is a typo of one: at most 48. */
function matchLoosely(words: readonly string[], { words: asked, typos: known }: Query): number {
  if (asked.length === 0) return 0
  let score = 48
  for (const word of asked) {
    if (words.some((candidate) => candidate.startsWith(word))) continue
    if (word.length >= 3 && words.some((candidate) => candidate.includes(word))) {
      score -= 4
      continue
    }
    const typos = fewestTypos(words, word, known)
    if (typos === 0) return 0
    score -= 6 * typos
  }
  return Math.max(score, 1)
}

/** Typos between `word` and the nearest word or beginning of a word; 0 when none is near enough. */
function fewestTypos(words: readonly string[], word: string, known: Query['typos']): number {
  const allowed = word.length >= 7 ? 2 : word.length >= 4 ? 1 : 0
  if (allowed === 0) return 0
  const counted = known.get(word) ?? new Map<string, number>()
  known.set(word, counted)
  let fewest = allowed + 1
  for (const candidate of words) {
    if (candidate.length < word.length - allowed || !sharesStart(candidate, word)) continue
    const typos = counted.get(candidate) ?? distanceToStart(word, candidate, allowed + 1)
    counted.set(candidate, typos)
    fewest = Math.min(fewest, typos)
  }
  return fewest <= allowed ? fewest : 0
}

/** People rarely miss both of the first two letters. */
function sharesStart(a: string, b: string): boolean {
  return a[0] === b[0] || a[1] === b[0] || a[0] === b[1] || a[1] === b[1]
}

/**
 * Fewest insertions, deletions, changes and swaps of neighbours (optimal string alignment) that turn `word` into
 * some beginning of `candidate`; stops at `limit`.
 */
function distanceToStart(word: string, candidate: string, limit: number): number {
  const width = Math.min(candidate.length, word.length + limit)
  let before: number[] = []
  let above = Array.from({ length: width + 1 }, (_, column) => column)
  for (let i = 1; i <= word.length; i++) {
    const row = [i]
    let least = i
    for (let j = 1; j <= width; j++) {
      const same = word[i - 1] === candidate[j - 1]
      let cost = Math.min((above[j] ?? 0) + 1, (row[j - 1] ?? 0) + 1, (above[j - 1] ?? 0) + (same ? 0 : 1))
      if (i > 1 && j > 1 && word[i - 1] === candidate[j - 2] && word[i - 2] === candidate[j - 1]) {
        cost = Math.min(cost, (before[j - 2] ?? 0) + 1)
      }
      row.push(cost)
      least = Math.min(least, cost)
    }
    if (least >= limit) return limit
    before = above
    above = row
  }
  return Math.min(...above.slice(Math.max(0, word.length - limit)), limit)
}
