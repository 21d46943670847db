import { type Ref, type RefObject, useEffect, useId, useState } from 'react'
import { type CommandContext, checkArgument, phraseOf, promptOf } from '@/lib/commands'
import type { PaletteState } from './use-palette'

interface LineProps {
  readonly ref: RefObject<HTMLInputElement | null>
  readonly list: RefObject<HTMLDivElement | null>
  readonly palette: PaletteState
  readonly context: CommandContext
}

/** What is typed: a search, or a command's words with its arguments in place. */
export function Line({ ref, list, palette, context }: LineProps) {
  const { stage, message } = palette
  const [listId, setListId] = useState<string>()
  const note = useId()
  const listed = palette.listed && !palette.empty
  useEffect(() => setListId(list.current?.id), [list])
  useActiveDescendant(ref, list, palette.active)
  const remark = remarkOf(palette, context)
  const input = (
    <Input
      ref={ref}
      palette={palette}
      label={labelOf(palette)}
      placeholder={
        stage.kind === 'find'
          ? context.workbook.sheets.length > 0
            ? 'Type a command, a sheet, or a value: frame width 24'
            : 'Type a command or a workbook'
          : promptOf(stage.spec, context, stage.args)
      }
      describedBy={remark || message ? note : undefined}
      controls={listed ? listId : undefined}
      expanded={listed}
      invalid={message !== undefined || remark?.kind === 'problem'}
    />
  )
  return (
    <div className="px-4 py-3 sm:px-5">
      {stage.kind === 'find' ? input : <Phrase palette={palette} context={context} input={input} />}
      {message !== undefined ? (
        <Remark id={note} kind="problem" text={message} />
      ) : remark ? (
        <Remark id={note} kind={remark.kind} text={remark.text} />
      ) : null}
    </div>
  )
}

interface InputProps {
  readonly ref: Ref<HTMLInputElement>
  readonly palette: PaletteState
  readonly label: string
  readonly placeholder: string
  readonly describedBy: string | undefined
  readonly controls: string | undefined
  readonly expanded: boolean
  readonly invalid: boolean
}

function Input({ ref, palette, label, placeholder, describedBy, controls, expanded, invalid }: InputProps) {
  const filling = palette.stage.kind === 'fill'
  return (
    <input
      ref={ref}
      key={palette.stage.kind === 'fill' ? `${palette.stage.command.id} ${palette.stage.spec.id}` : 'find'}
      type="text"
      // biome-ignore lint/a11y/noAutofocus: the dialog is opened to type in it
      autoFocus
      role="combobox"
      aria-autocomplete="list"
      aria-expanded={expanded}
      aria-controls={controls}
      aria-label={label}
      aria-describedby={describedBy}
      aria-invalid={invalid}
      autoComplete="off"
      autoCorrect="off"
      autoCapitalize="none"
      spellCheck={false}
      enterKeyHint="go"
      placeholder={placeholder}
      value={palette.value}
      onFocus={(event) => event.target.select()}
      onChange={(event) => palette.type(event.target.value)}
      onKeyDown={(event) => {
        // Home and End move in the text, not in the list.
        if (event.key === 'Home' || event.key === 'End') event.stopPropagation()
      }}
      className={
        filling
          ? 'min-w-10 max-w-full grow-0 rounded-[3px] bg-straw px-2 py-0.5 caret-clay outline-none field-sizing-content placeholder:text-quiet placeholder:opacity-100'
          : 'w-full bg-transparent text-lg caret-clay outline-none placeholder:text-quiet placeholder:opacity-100'
      }
    />
  )
}

/** "Cover [roof] with [tri…]": arguments already given as chips, the present one as the input. */
function Phrase({
  palette,
  context,
  input,
}: {
  readonly palette: PaletteState
  readonly context: CommandContext
  readonly input: React.ReactNode
}) {
  const { stage } = palette
  if (stage.kind === 'find') return input
  const { command, args, spec } = stage
  return (
    <div className="flex flex-wrap items-baseline gap-x-2 gap-y-1.5 text-lg">
      {phraseOf(command).map((part) => {
        if (typeof part === 'string') return <span key={part}>{part.replace(/\s*…$/, '')}</span>
        if (part.argument === spec.id)
          return (
            <span key={part.argument} className="contents">
              {input}
            </span>
          )
        const given = args[part.argument]
        const other = command.arguments?.find(({ id }) => id === part.argument)
        if (given === undefined || !other) {
          return (
            <span key={part.argument} className="border-edge border-b border-dashed px-3 text-quiet">
              <span className="sr-only">{other?.label ?? 'not yet given'}</span>
            </span>
          )
        }
        const checked = checkArgument(other, context, args, given)
        return (
          <span key={part.argument} className="rounded-[3px] bg-straw px-2 py-0.5">
            {checked.ok ? checked.value.shown : String(given)}
          </span>
        )
      })}
    </div>
  )
}

function Remark({
  id,
  kind,
  text,
}: {
  readonly id: string
  readonly kind: 'hint' | 'problem'
  readonly text: string
}) {
  return kind === 'problem' ? (
    <p id={id} className="mt-1.5 text-ember text-sm">
      <span aria-hidden className="mr-1.5 font-semibold">
        !
      </span>
      {text}
    </p>
  ) : (
    <p id={id} className="figure mt-1.5 text-quiet text-sm">
      {text}
    </p>
  )
}

/** What the typed value means, or what was expected instead; nothing before something is typed. */
function remarkOf(
  { stage, text, options }: PaletteState,
  context: CommandContext,
): { readonly kind: 'hint' | 'problem'; readonly text: string } | undefined {
  if (stage.kind === 'find' || options || text.trim() === '') return undefined
  const checked = checkArgument(stage.spec, context, stage.args, text)
  if (!checked.ok) return { kind: 'problem', text: checked.failure.text }
  return checked.value.hint === undefined ? undefined : { kind: 'hint', text: checked.value.hint }
}

function labelOf({ stage }: PaletteState): string {
  if (stage.kind === 'find') return 'Find a command, a sheet or a value'
  return `${stage.command.title.replace(/\s*…$/, '')}: ${stage.spec.label}`
}

/** cmdk names the active option a step late when its value is set from outside, so it is named here, after each paint. */
function useActiveDescendant(
  input: RefObject<HTMLInputElement | null>,
  list: RefObject<HTMLDivElement | null>,
  active: string | undefined,
) {
  useEffect(() => {
    const options = list.current?.querySelectorAll('[role="option"]') ?? []
    const option = [...options].find((one) => one.getAttribute('data-value') === active?.trim())
    if (option) input.current?.setAttribute('aria-activedescendant', option.id)
    else input.current?.removeAttribute('aria-activedescendant')
  })
}
