import { Command as List } from 'cmdk'
import { Lock } from 'lucide-react'
import {
  type CommandContext,
  checkArgument,
  type Entry,
  keyCaps,
  type Platform,
  phraseOf,
} from '@/lib/commands'
import type { PaletteState } from './use-palette'

interface EntriesProps {
  readonly palette: PaletteState
  readonly context: CommandContext
  readonly platform: Platform
}

/** What was found, best first; before anything is typed, by group. */
export function Entries({ palette, context, platform }: EntriesProps) {
  const { entries, query, recent } = palette
  const row = (entry: Entry) => (
    <EntryRow key={entry.id} entry={entry} context={context} platform={platform} choose={palette.choose} />
  )
  if (query.trim() !== '') return entries.map(row)
  return groupsOf(entries, recent).map(({ heading, members }) => (
    <List.Group
      key={heading}
      heading={heading}
      className="[&_[cmdk-group-heading]]:px-4 [&_[cmdk-group-heading]]:pt-2.5 [&_[cmdk-group-heading]]:pb-1 [&_[cmdk-group-heading]]:text-quiet [&_[cmdk-group-heading]]:text-sm sm:[&_[cmdk-group-heading]]:px-5"
    >
      {members.map(row)}
    </List.Group>
  ))
}

function groupsOf(entries: readonly Entry[], recent: readonly string[]) {
  const groups = new Map<string, Entry[]>()
  for (const entry of entries) {
    const heading = recent.includes(entry.id)
      ? 'Used lately'
      : entry.available !== true
        ? 'Not now'
        : entry.kind === 'sheet'
          ? 'Sheets'
          : entry.command.group
    groups.set(heading, [...(groups.get(heading) ?? []), entry])
  }
  return [...groups].map(([heading, members]) => ({ heading, members }))
}

/** One look for every line of the list: a straight mark and the frost ground say which is selected. */
export const rowClass =
  'relative flex min-h-9 scroll-my-1 flex-wrap items-baseline gap-x-3 px-4 py-1.5 sm:px-5 data-[selected=true]:bg-frost data-[selected=true]:before:absolute data-[selected=true]:before:inset-y-0 data-[selected=true]:before:left-0 data-[selected=true]:before:w-[3px] data-[selected=true]:before:bg-clay'

const kindWords: Partial<Record<Entry['kind'], string>> = {
  sheet: 'sheet',
  name: 'value',
  row: 'table row',
  workbook: 'workbook',
}

function EntryRow({
  entry,
  context,
  platform,
  choose,
}: {
  readonly entry: Entry
  readonly context: CommandContext
  readonly platform: Platform
  readonly choose: (entry: Entry) => void
}) {
  const { available, problem, hint, detail, command } = entry
  const able = available === true
  const [chord] = entry.kind === 'command' ? (command.keys ?? []) : []
  return (
    <List.Item value={entry.id} onSelect={() => choose(entry)} className={rowClass}>
      <span className={`min-w-0 ${able ? '' : 'text-quiet'}`}>
        {entry.kind === 'typed' ? <Filled entry={entry} context={context} /> : entry.title}
      </span>
      {able ? (
        <span className="min-w-0 flex-1 truncate text-quiet text-sm">
          {problem === undefined ? (
            (hint ?? detail)
          ) : (
            <span className="text-ember">
              <span aria-hidden>! </span>
              {problem}
            </span>
          )}
        </span>
      ) : (
        <span className="min-w-0 flex-1 text-quiet text-sm">
          <Lock aria-hidden className="mr-1.5 inline size-3.5 align-[-2px]" />
          <span className="sr-only">Not available: </span>
          {available}
        </span>
      )}
      {chord ? (
        <span className="ml-auto flex shrink-0 gap-1 max-sm:hidden">
          {keyCaps(chord, platform).map((cap) => (
            <kbd key={cap}>{cap}</kbd>
          ))}
        </span>
      ) : kindWords[entry.kind] ? (
        <span className="ml-auto shrink-0 text-quiet text-sm">{kindWords[entry.kind]}</span>
      ) : null}
    </List.Item>
  )
}

/** A command with the arguments that were typed, each on the ground of an input. */
function Filled({ entry, context }: { readonly entry: Entry; readonly context: CommandContext }) {
  const { command, args } = entry
  return phraseOf(command).map((part, index) => {
    // Arguments stand where the phrase puts them: the place is the key.
    const key = typeof part === 'string' ? part : part.argument
    const gap = index === 0 ? '' : ' '
    if (typeof part === 'string') return <span key={key}>{gap + part.replace(/\s*…$/, '')}</span>
    const spec = command.arguments?.find(({ id }) => id === part.argument)
    const given = args[part.argument]
    if (!spec || given === undefined) return <span key={key}>{`${gap}…`}</span>
    const checked = checkArgument(spec, context, args, given)
    return (
      <span key={key}>
        {gap}
        <span className="rounded-[3px] bg-straw px-1.5 py-px">
          {checked.ok ? checked.value.shown : String(given)}
        </span>
      </span>
    )
  })
}
