import type { CommandContext } from '@/lib/commands'
import { changeWords, differs } from './change-words'
import type { Change } from './palette-props'

/** What a typed value would change, figure by figure, before it is set. */
export function Preview({
  context,
  changes,
  waiting,
}: {
  readonly context: CommandContext
  readonly changes: readonly Change[] | undefined
  readonly waiting: boolean
}) {
  const shown = changes?.filter(differs) ?? []
  if (!changes && !waiting) return null
  return (
    <section
      aria-label="What it would change"
      className="min-h-0 overflow-y-auto border-line border-t px-4 py-2 sm:px-5"
    >
      {!changes ? (
        <p className="py-1 text-quiet text-sm">Working it out …</p>
      ) : shown.length === 0 ? (
        <p className="py-1 text-quiet text-sm">None of the main figures would change.</p>
      ) : (
        <dl className="grid grid-cols-[auto_1fr] gap-x-6 gap-y-1 py-1">
          {shown.map((change) => (
            <div key={change.name} className="contents">
              <dt className="text-quiet">{change.label}</dt>
              <dd className="figure m-0 text-right sm:text-left">{changeWords(context, change)}</dd>
            </div>
          ))}
        </dl>
      )}
    </section>
  )
}
