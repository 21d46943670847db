import { type CommandContext, commandById, keyLabel, nextArgument, type Platform } from '@/lib/commands'
import { changeWords, differs } from './change-words'
import type { PaletteState } from './use-palette'
import type { Trials } from './use-trials'

/** What the three keys do now, and what will change. */
export function Footer({
  palette,
  context,
  trials,
  platform,
}: {
  readonly palette: PaletteState
  readonly context: CommandContext
  readonly trials: Trials
  readonly platform: Platform
}) {
  const words = keyWords(palette, context)
  const says = trials.says
  // The columns or the preview already show the figures while arguments are filled in.
  const changes = palette.stage.kind === 'find' ? (trials.changes?.filter(differs) ?? []).slice(0, 3) : []
  const undo = commandById('undo')?.keys?.[0]
  return (
    <div className="flex flex-wrap items-baseline gap-x-5 gap-y-1.5 border-line border-t px-4 py-2.5 text-quiet text-sm sm:px-5">
      {words.enter ? <Key cap="Enter" word={words.enter} /> : null}
      {words.tab ? <Key cap="Tab" word={words.tab} /> : null}
      <Key cap="Esc" word={words.escape} />
      <span className="min-w-0 text-ink max-sm:order-first max-sm:w-full sm:min-w-52 sm:flex-1 sm:text-right">
        {says}
        {trials.saved && undo ? ` ${keyLabel(undo, platform)} undoes it.` : ''}
        {changes.map((change) => (
          <span key={change.name} className="block text-quiet">
            {change.label} <span className="figure text-ink">{changeWords(context, change)}</span>
          </span>
        ))}
      </span>
    </div>
  )
}

function Key({ cap, word }: { readonly cap: string; readonly word: string }) {
  return (
    <span className="whitespace-nowrap">
      <kbd className="mr-1.5">{cap}</kbd>
      {word}
    </span>
  )
}

interface Words {
  readonly enter: string | undefined
  readonly tab: string | undefined
  readonly escape: string
}

function keyWords(palette: PaletteState, context: CommandContext): Words {
  const { stage, entries, active } = palette
  if (stage.kind === 'fill') {
    const now = palette.current()
    const missing = 'args' in now ? nextArgument(stage.command, context, now.args) : undefined
    const specs = stage.command.arguments ?? []
    return {
      enter: 'problem' in now ? undefined : missing ? 'next' : 'do it',
      tab: specs.at(-1)?.id === stage.spec.id ? undefined : 'next argument',
      escape: 'back',
    }
  }
  const entry = entries.find(({ id }) => id === active)
  const asks = entry?.command.arguments !== undefined
  const missing = entry && nextArgument(entry.command, context, entry.args)
  const goes = entry?.command.group === 'Go to'
  return {
    enter: entry?.available !== true ? undefined : missing ? 'fill it in' : goes ? 'go there' : 'do it',
    tab: asks && !goes && !missing && entry.available === true ? 'change a part' : undefined,
    escape: 'close',
  }
}
