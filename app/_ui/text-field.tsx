import { type ComponentProps, useId } from 'react'

interface Props extends Omit<ComponentProps<'input'>, 'id'> {
  readonly label: string
  /** What a good answer looks like ("e.g. Heron Slough growing house"). */
  readonly example?: string
  /** What was wrong and what to do; announced when it appears. */
  readonly error?: string | undefined
}

/** A labelled field with its example and its error tied to it for readers of every kind. */
export function TextField({ label, example, error, ...input }: Props) {
  const id = useId()
  const described = [example && `${id}-example`, error && `${id}-error`].filter(Boolean).join(' ')
  return (
    <div className="grid gap-1.5">
      <label htmlFor={id} className="font-medium">
        {label}
      </label>
      <input
        id={id}
        className="field"
        aria-invalid={error ? true : undefined}
        aria-describedby={described || undefined}
        {...input}
      />
      {example ? (
        <p id={`${id}-example`} className="text-sm text-quiet">
          {example}
        </p>
      ) : null}
      {error ? (
        <p id={`${id}-error`} role="alert" className="text-sm text-ember">
          <span aria-hidden="true">! </span>
          {error}
        </p>
      ) : null}
    </div>
  )
}
