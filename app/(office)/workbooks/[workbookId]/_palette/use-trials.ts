import {
  type ArgumentOption,
  type ArgumentValues,
  type Command,
  type CommandContext,
  labelOf,
  nextArgument,
} from '@/lib/commands'
import { unitOf } from '@/lib/units'
import type { Operation } from '@/lib/workbook'
import type { Change, PaletteProps } from './palette-props'
import type { PaletteState } from './use-palette'
import { type Trial, useTryOut } from './use-try-out'

/** As many options as are seen without scrolling. */
const visible = 8

export interface Trials {
  /** What the selected line would do, in a sentence. */
  readonly says: string
  /** It would be saved, and could be undone. */
  readonly saved: boolean
  /** What the selected line would change; undefined while that is unknown. */
  readonly changes: readonly Change[] | undefined
  readonly waiting: boolean
  readonly columns: readonly { readonly name: string; readonly label: string; readonly unit: string }[]
  /** `same` when it was tried and the figure stays; undefined while that is unknown. */
  readonly changeOf: (option: ArgumentOption, name: string) => Change | 'same' | undefined
}

/** Tries out the selected line, and beside it the options that are seen. */
export function useTrials(palette: PaletteState, { context, tryOut }: PaletteProps): Trials {
  const chosen = chosenOf(palette)
  const selected = chosen && trialOf(context, chosen.command, chosen.args)
  const compared = tryOut ? comparedTrials(palette, context) : []
  const answers = useTryOut(tryOut, [...(selected ? [selected] : []), ...compared])
  const changes = selected && answers.get(selected.key)
  return {
    says: saysOf(context, chosen),
    saved: selected !== undefined,
    changes,
    waiting: tryOut !== undefined && selected !== undefined && changes === undefined,
    columns: tryOut ? columnsOf(palette, context) : [],
    changeOf: (option, name) => {
      const { stage } = palette
      if (stage.kind === 'find') return undefined
      const args = { ...stage.args, [stage.spec.id]: option.value }
      const answer = answers.get(keyOf(stage.command, args))
      return answer && (answer.find((change) => change.name === name) ?? 'same')
    },
  }
}

interface Chosen {
  readonly command: Command
  readonly args: ArgumentValues
}

/** The command and arguments that Enter stands for, complete or not. */
function chosenOf(palette: PaletteState): Chosen | undefined {
  const { stage } = palette
  if (stage.kind === 'find') {
    const entry = palette.entries.find(({ id }) => id === palette.active)
    return entry && entry.available === true ? { command: entry.command, args: entry.args } : undefined
  }
  const now = palette.current()
  return { command: stage.command, args: 'args' in now ? now.args : stage.args }
}

function saysOf(context: CommandContext, chosen: Chosen | undefined): string {
  return chosen?.command.says?.(context, chosen.args) ?? ''
}

function keyOf(command: Command, args: ArgumentValues): string {
  return `${command.id} ${JSON.stringify(Object.entries(args).sort())}`
}

/** Undefined unless the command is complete and would change the workbook. */
function trialOf(context: CommandContext, command: Command, args: ArgumentValues): Trial | undefined {
  if (command.when(context) !== true || nextArgument(command, context, args)) return undefined
  const operations = operationsOf(context, command, args)
  return operations && { key: keyOf(command, args), operations }
}

function operationsOf(
  context: CommandContext,
  command: Command,
  args: ArgumentValues,
): readonly Operation[] | undefined {
  const effect = command.run(context, args)
  return effect.kind === 'operations' ? effect.operations : undefined
}

function comparedTrials(palette: PaletteState, context: CommandContext): readonly Trial[] {
  const { stage, options = [], active } = palette
  if (stage.kind === 'find' || stage.spec.kind !== 'choice' || !stage.spec.compare) return []
  const { command, args, spec } = stage
  const at = Math.max(
    0,
    options.findIndex(({ value }) => value === active),
  )
  const first = Math.max(0, Math.min(at - visible + 1, options.length - visible))
  return options.slice(first, first + visible).flatMap(({ value }) => {
    const trial = trialOf(context, command, { ...args, [spec.id]: value })
    return trial ? [trial] : []
  })
}

function columnsOf({ stage }: PaletteState, context: CommandContext): Trials['columns'] {
  if (stage.kind === 'find' || stage.spec.kind !== 'choice') return []
  return (stage.spec.compare ?? []).flatMap((name) => {
    const named = context.workbook.names.get(name)
    return named ? [{ name, label: labelOf(named), unit: unitOf(named.quantity, context.system).symbol }] : []
  })
}
