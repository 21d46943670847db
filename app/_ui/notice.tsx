import type { ReactNode } from 'react'
import { Brand } from './mark'

/** A page that says one thing and offers what to do next. */
export function Notice({
  title,
  children,
  actions,
}: {
  readonly title: string
  readonly children: ReactNode
  readonly actions: ReactNode
}) {
  return (
    <main className="mx-auto grid min-h-dvh max-w-xl content-center gap-6 px-6 py-16">
      <Brand />
      <h1 className="text-2xl font-semibold">{title}</h1>
      <div className="grid gap-3 text-quiet">{children}</div>
      <div className="flex flex-wrap gap-3">{actions}</div>
    </main>
  )
}
