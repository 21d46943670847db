import { RadioGroup } from 'radix-ui'
import { type ReactNode, useId } from 'react'

export interface Choice {
  readonly value: string
  readonly title: string
  readonly detail: string
  readonly picture?: ReactNode
}

/** One of a few, each with its picture or its example; arrows move, as in any radio group. */
export function ChoiceCards({
  label,
  choices,
  value,
  onChange,
}: {
  readonly label: string
  readonly choices: readonly Choice[]
  readonly value: string
  readonly onChange: (value: string) => void
}) {
  const id = useId()
  return (
    <div className="grid gap-1.5">
      <span id={id} className="font-medium">
        {label}
      </span>
      <RadioGroup.Root
        aria-labelledby={id}
        value={value}
        onValueChange={onChange}
        onKeyDown={(event) => {
          // A button would be pressed by it; here, as from every field, it sends the form.
          if (event.key === 'Enter') event.currentTarget.closest('form')?.requestSubmit()
        }}
        className="grid gap-3 sm:grid-cols-2"
      >
        {choices.map((choice) => (
          <RadioGroup.Item
            key={choice.value}
            value={choice.value}
            className="flex min-h-16 items-center gap-4 rounded-soft border border-edge px-4 py-3 text-left hover:border-ink data-[state=checked]:border-clay data-[state=checked]:bg-straw data-[state=checked]:shadow-[inset_0_0_0_1px_var(--clay)]"
          >
            {choice.picture}
            <span className="grid">
              <span className="font-medium">{choice.title}</span>
              <span className="text-sm text-quiet">{choice.detail}</span>
            </span>
          </RadioGroup.Item>
        ))}
      </RadioGroup.Root>
    </div>
  )
}
