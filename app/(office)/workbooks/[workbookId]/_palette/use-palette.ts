import { useState } from 'react'
import {
  type ArgumentOption,
  type ArgumentSpec,
  type ArgumentValues,
  type Command,
  checkArgument,
  commandById,
  type Entry,
  makeIndex,
  nextArgument,
  optionsOf,
  rankOptions,
  searchCommands,
} from '@/lib/commands'
import type { PaletteProps } from './palette-props'
import { readRecent, rememberRecent } from './recent'

/** Finding an entry, or filling in the arguments of one command. */
type Stage =
  | { readonly kind: 'find' }
  | {
      readonly kind: 'fill'
      readonly command: Command
      readonly args: ArgumentValues
      /** The argument being typed. */
      readonly spec: ArgumentSpec
      /** Remembered as this entry when it has run. */
      readonly id: string
    }

export type PaletteState = ReturnType<typeof usePalette>

/** The palette's behaviour, without its looks. */
export function usePalette({ context, onRun, onClose, begin: start }: PaletteProps) {
  const [index, setIndex] = useState(() => makeIndex(context))
  // The firm's workbooks may arrive after the palette has opened.
  if (index.context.workbooks !== context.workbooks) setIndex(makeIndex(context))
  const [recent] = useState(readRecent)
  const [query, setQuery] = useState('')
  const [stage, setStage] = useState<Stage>(() => startStage())
  const [text, setText] = useState(() =>
    stage.kind === 'fill' ? textFor(stage.spec, start?.args ?? {}) : '',
  )
  /** Until something is typed, all options stay in sight, also when one was given before. */
  const [touched, setTouched] = useState(false)
  const [picked, setPicked] = useState<string>()
  const [message, setMessage] = useState<string>()

  function startStage(): Stage {
    const command = start && commandById(start.command)
    if (command?.when(context) !== true) return { kind: 'find' }
    const spec = nextArgument(command, context, start?.args ?? {}) ?? command.arguments?.at(-1)
    if (!spec) return { kind: 'find' }
    return {
      kind: 'fill',
      command,
      args: without(start?.args ?? {}, spec.id),
      spec,
      id: `command:${command.id}`,
    }
  }

  /** What the input holds when this argument's turn comes. */
  function textFor(spec: ArgumentSpec, args: ArgumentValues): string {
    const given = args[spec.id]
    if (given === undefined) return spec.kind === 'text' ? (spec.initial?.(context) ?? '') : ''
    const checked = checkArgument(spec, context, args, given)
    return checked.ok ? checked.value.shown : String(given)
  }

  function givenOption(spec: ArgumentSpec, args: ArgumentValues): string | undefined {
    const given = args[spec.id]
    return given === undefined || !optionsOf(spec, context, args) ? undefined : String(given)
  }

  const entries =
    stage.kind === 'find'
      ? searchCommands(index, query, { recent, limit: query.trim() === '' ? 100 : 40 })
      : []
  const options = stage.kind === 'fill' ? fillOptions(stage) : undefined
  const listed = stage.kind === 'find' || options !== undefined
  const ids = options ? options.map(({ value }) => value) : entries.map(({ id }) => id)
  // The first is selected until another is picked, also when the list changes under the selection.
  const active = picked !== undefined && ids.includes(picked) ? picked : ids[0]

  function fillOptions({
    spec,
    args,
  }: Extract<Stage, { kind: 'fill' }>): readonly ArgumentOption[] | undefined {
    const all = optionsOf(spec, context, args)
    return all && rankOptions(all, touched ? text : '')
  }

  function type(value: string) {
    if (stage.kind === 'find') setQuery(value)
    else setText(value)
    setTouched(true)
    setPicked(undefined)
    setMessage(undefined)
  }

  function fill(command: Command, args: ArgumentValues, spec: ArgumentSpec, id: string) {
    setStage({ kind: 'fill', command, args: without(args, spec.id), spec, id })
    setText(textFor(spec, args))
    setTouched(false)
    setPicked(givenOption(spec, args))
    setMessage(undefined)
  }

  function run(command: Command, args: ArgumentValues, id: string) {
    const problem = onRun(command, args)
    if (problem !== undefined) return setMessage(problem)
    rememberRecent(id)
    onClose()
  }

  /** Runs the entry, or asks for what it lacks. */
  function choose(entry: Entry) {
    if (entry.available !== true) return setMessage(entry.available)
    const missing = nextArgument(entry.command, context, entry.args)
    if (missing) return fill(entry.command, entry.args, missing, entry.id)
    run(entry.command, entry.args, entry.id)
  }

  /** The argument as it stands: the option that is selected, or the text once it holds. */
  function current(): { readonly args: ArgumentValues } | { readonly problem: string } {
    if (stage.kind !== 'fill') return { args: {} }
    const option = options?.find(({ value }) => value === active)
    const given = option ? option.value : text
    const checked = checkArgument(stage.spec, context, stage.args, given)
    if (!checked.ok) return { problem: checked.failure.text }
    return { args: { ...stage.args, [stage.spec.id]: checked.value.value } }
  }

  /** A click on an option: as Enter on it. */
  function acceptOption(option: ArgumentOption) {
    if (stage.kind === 'fill') acceptArgs({ ...stage.args, [stage.spec.id]: option.value })
  }

  function acceptArgs(args: ArgumentValues) {
    if (stage.kind !== 'fill') return
    const missing = nextArgument(stage.command, context, args)
    if (missing) return fill(stage.command, args, missing, stage.id)
    run(stage.command, args, stage.id)
  }

  /** Enter: on to the next argument, or does it. */
  function accept() {
    if (stage.kind === 'find') {
      const entry = entries.find(({ id }) => id === active)
      return entry ? choose(entry) : undefined
    }
    const now = current()
    if ('problem' in now) return setMessage(now.problem)
    acceptArgs(now.args)
  }

  /** Tab: on to the next argument without doing it. */
  function advance() {
    if (stage.kind === 'find') {
      const entry = entries.find(({ id }) => id === active)
      if (!entry) return
      if (entry.available !== true) return setMessage(entry.available)
      const spec = nextArgument(entry.command, context, entry.args) ?? entry.command.arguments?.at(-1)
      if (spec) fill(entry.command, entry.args, spec, entry.id)
      return
    }
    const now = current()
    if ('problem' in now) return setMessage(now.problem)
    const next = neighbour(stage.command, stage.spec, 1)
    if (next) fill(stage.command, now.args, next, stage.id)
  }

  /** Esc: back one argument, then to the list, then out. */
  function back() {
    if (stage.kind === 'find') return onClose()
    const before = neighbour(stage.command, stage.spec, -1)
    if (before) return fill(stage.command, stage.args, before, stage.id)
    setStage({ kind: 'find' })
    setPicked(stage.id)
    setMessage(undefined)
  }

  return {
    stage,
    query,
    recent,
    text,
    value: stage.kind === 'find' ? query : text,
    entries,
    options,
    active,
    /** There is something to pick from, whether or not any of it fits what was typed. */
    listed,
    empty: listed && ids.length === 0,
    message,
    type,
    pick: setPicked,
    choose,
    acceptOption,
    accept,
    advance,
    back,
    current,
  }
}

function neighbour(command: Command, spec: ArgumentSpec, by: 1 | -1): ArgumentSpec | undefined {
  const specs = command.arguments ?? []
  return specs[specs.findIndex(({ id }) => id === spec.id) + by]
}

function without(args: ArgumentValues, id: string): ArgumentValues {
  const { [id]: _dropped, ...rest } = args
  return rest
}
