'use client'

import { Dialog as Radix } from 'radix-ui'
import type { ReactNode } from 'react'

/** A form or a question over the page: focus stays in it, Esc closes it, and focus goes back where it was. */
export function Dialog({
  open,
  onOpenChange,
  title,
  about,
  children,
}: {
  readonly open: boolean
  readonly onOpenChange: (open: boolean) => void
  readonly title: string
  readonly about?: string
  readonly children: ReactNode
}) {
  return (
    <Radix.Root open={open} onOpenChange={onOpenChange}>
      <Radix.Portal>
        <Radix.Overlay className="fixed inset-0 z-30 bg-veil" />
        <Radix.Content
          {...(about === undefined ? { 'aria-describedby': undefined } : {})}
          className="fixed top-[12dvh] left-1/2 z-30 max-h-[80dvh] w-[min(34rem,calc(100vw-2rem))] -translate-x-1/2 overflow-y-auto rounded-soft border border-line bg-raised p-6 text-ink shadow-lift"
        >
          <Radix.Title className="text-xl font-semibold">{title}</Radix.Title>
          {about === undefined ? null : (
            <Radix.Description className="mt-1 text-quiet">{about}</Radix.Description>
          )}
          <div className="mt-5">{children}</div>
        </Radix.Content>
      </Radix.Portal>
    </Radix.Root>
  )
}
