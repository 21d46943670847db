import { Command as List } from 'cmdk'
import type { ArgumentOption, CommandContext } from '@/lib/commands'
import { formatQuantity } from '@/lib/units'
import { differenceWords } from './change-words'
import { rowClass } from './entries'
import type { PaletteState } from './use-palette'
import type { Trials } from './use-trials'

interface OptionsProps {
  readonly palette: PaletteState
  readonly context: CommandContext
  readonly trials: Trials
}

/** The values that an argument takes, with a figure of each and what choosing it would change. */
export function Options({ palette, context, trials }: OptionsProps) {
  const { options = [], stage } = palette
  if (stage.kind === 'find') return null
  const figure = options.find((option) => option.figure)?.figure
  const columns = trials.columns
  return (
    <>
      {figure || columns.length > 0 ? (
        <div
          aria-hidden
          className="hidden items-baseline gap-x-3 px-5 pt-1.5 pb-1 text-quiet text-sm sm:flex"
        >
          <span className="flex-1 first-letter:uppercase">{stage.spec.label.replace(/^an? /, '')}</span>
          {figure ? <span className="w-14 text-right">{figure.label}</span> : null}
          {columns.map(({ name, label, unit }) => (
            <span key={name} className="w-32 text-right">
              {label} {unit === '' ? '' : <span className="whitespace-nowrap">{unit}</span>}
            </span>
          ))}
        </div>
      ) : null}
      {options.map((option) => (
        <List.Item
          key={option.value}
          value={option.value}
          onSelect={() => palette.acceptOption(option)}
          className={rowClass}
        >
          <span className="min-w-0 flex-1 basis-full sm:basis-0">
            {option.title}
            {option.detail ? <span className="ml-1.5 text-quiet text-sm"> {option.detail}</span> : null}
          </span>
          {figure ? <Figure option={option} context={context} /> : null}
          {columns.map(({ name, label }) => (
            <span key={name} className="figure text-sm sm:w-32 sm:text-right">
              <span className="mr-1 font-sans text-quiet sm:sr-only">{label} </span>
              {differenceWords(context, trials.changeOf(option, name))}
            </span>
          ))}
        </List.Item>
      ))}
    </>
  )
}

function Figure({ option, context }: { readonly option: ArgumentOption; readonly context: CommandContext }) {
  const { figure } = option
  if (!figure) return <span className="sm:w-14" />
  const shown = formatQuantity(figure.value, figure.quantity, context.system, { unit: false, digits: 2 })
  return (
    <span className="figure text-sm sm:w-14 sm:text-right">
      <span className="mr-1 font-sans text-quiet sm:sr-only">{figure.label} </span>
      {shown}
    </span>
  )
}
