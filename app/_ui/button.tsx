import type { ComponentProps } from 'react'

type Tone = 'action' | 'plain' | 'quiet' | 'danger'

const tones: Record<Tone, string> = {
  action: 'bg-clay text-on-clay border-clay hover:bg-[color-mix(in_srgb,var(--clay)_88%,var(--ink))]',
  plain: 'bg-raised text-ink border-edge hover:border-ink',
  quiet: 'bg-transparent text-ink border-transparent hover:bg-[color-mix(in_srgb,var(--ink)_7%,transparent)]',
  danger: 'bg-raised text-ember border-ember hover:bg-[color-mix(in_srgb,var(--ember)_8%,var(--raised))]',
}

/** Classes of a button, for links that look like one. */
export function buttonClass(tone: Tone = 'plain'): string {
  return `inline-flex min-h-10 items-center justify-center gap-2 rounded-soft border px-4 py-1.5 font-medium whitespace-nowrap transition-colors disabled:opacity-60 ${tones[tone]}`
}

export function Button({
  tone = 'plain',
  className = '',
  type = 'button',
  ...rest
}: ComponentProps<'button'> & { readonly tone?: Tone }) {
  return <button type={type} className={`${buttonClass(tone)} ${className}`} {...rest} />
}
