import type { CommandContext } from './command'
import { type Entry, entriesFor } from './entries'
import { type RankOptions, rank } from './rank'
import { type RankableInput, rankableInputs, typedEntries } from './typed'

/** What the palette searches; made once when it opens. */
export interface CommandIndex {
  readonly context: CommandContext
  readonly entries: readonly Entry[]
  /** What may be set by typing its name and a value. */
  readonly inputs: readonly RankableInput[]
  /** By the command and arguments that an entry stands for. */
  readonly byDeed: ReadonlyMap<string, Entry>
}

export function makeIndex(context: CommandContext): CommandIndex {
  const entries = entriesFor(context)
  const byDeed = new Map(entries.map((entry) => [deedOf(entry), entry]))
  return { context, entries, inputs: rankableInputs(context), byDeed }
}

/**
 * One ranked list. A reading with its arguments filled in stands above what merely matches, unless it holds an error
 * or something is called exactly that. Below 50 ms at 5,000 entries.
 */
export function searchCommands(
  index: CommandIndex,
  query: string,
  { limit = 40, recent = [] }: RankOptions = {},
): readonly Entry[] {
  if (query.trim() === '') return emptyQuery(index, recent, limit)
  const matched = rank(index.entries, query, { limit, recent })
  const typed = typedEntries(index.context, query, index.inputs).map((entry) => knownAs(index, entry))
  const between = (from: number, below: number) =>
    matched.filter(({ match }) => match >= from && match < below).map(({ entry }) => entry)
  const ordered = [
    ...between(96, Number.POSITIVE_INFINITY),
    ...typed.filter(({ problem }) => problem === undefined),
    ...between(80, 96),
    ...typed.filter(({ problem }) => problem !== undefined),
    ...between(0, 80),
  ]
  return dedupe(ordered).slice(0, limit)
}

/** `go heat` is the same as the sheet's own entry: that one stands for it, so that it is remembered as one thing. */
function knownAs(index: CommandIndex, typed: Entry): Entry {
  return index.byDeed.get(deedOf(typed)) ?? typed
}

/** Nothing typed yet: what was used lately, then the commands in the order of the registry, what cannot run last. */
function emptyQuery(index: CommandIndex, recent: readonly string[], limit: number): readonly Entry[] {
  const lately = recent.flatMap((id) => index.entries.filter((entry) => entry.id === id)).slice(0, 5)
  const commands = index.entries.filter(({ kind }) => kind === 'command')
  const sheets = index.entries.filter(({ kind }) => kind === 'sheet')
  const able = (entry: Entry) => entry.available === true
  const ordered = [...lately, ...commands.filter(able), ...sheets, ...commands.filter((one) => !able(one))]
  return dedupe(ordered).slice(0, limit)
}

function deedOf({ command, args }: Entry): string {
  return `${command.id} ${JSON.stringify(args)}`
}

function dedupe(entries: readonly Entry[]): readonly Entry[] {
  const seen = new Set<string>()
  return entries.filter((entry) => {
    const deed = deedOf(entry)
    if (seen.has(entry.id) || seen.has(deed)) return false
    seen.add(entry.id).add(deed)
    return true
  })
}
