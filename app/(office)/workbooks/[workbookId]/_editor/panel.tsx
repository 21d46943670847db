'use client'

import { Dialog } from 'radix-ui'
import type { ReactNode } from 'react'

/** A sheet of paper over the workbook for one question; Esc closes it and the keyboard goes back to the cell. */
export function Panel({
  title,
  about,
  wide = false,
  onClose,
  onClosed,
  children,
}: {
  readonly title: string
  readonly about: string
  readonly wide?: boolean
  readonly onClose: () => void
  /** The focus goes where this puts it. */
  readonly onClosed: () => void
  readonly children: ReactNode
}) {
  return (
    <Dialog.Root open onOpenChange={(open) => open || onClose()}>
      <Dialog.Portal>
        <Dialog.Overlay className="fixed inset-0 z-40 bg-veil" />
        <Dialog.Content
          className={`fixed top-[min(5rem,6vh)] left-1/2 z-50 flex max-h-[88vh] -translate-x-1/2 flex-col overflow-hidden rounded-soft border border-line bg-raised text-ink shadow-lift outline-none ${
            wide ? 'w-[min(68rem,calc(100vw-1rem))]' : 'w-[min(44rem,calc(100vw-1rem))]'
          }`}
          // The keyboard is in the panel, on nothing yet: no button lights up that nobody asked for.
          onOpenAutoFocus={(event) => {
            event.preventDefault()
            if (event.currentTarget instanceof HTMLElement) event.currentTarget.focus()
          }}
          onCloseAutoFocus={(event) => {
            event.preventDefault()
            onClosed()
          }}
        >
          <header className="flex items-start gap-4 border-line border-b px-5 py-3.5">
            <div className="min-w-0 flex-1">
              <Dialog.Title className="font-semibold text-lg leading-6">{title}</Dialog.Title>
              <Dialog.Description className="mt-0.5 text-[0.875rem] text-quiet">{about}</Dialog.Description>
            </div>
            <Dialog.Close className="min-h-8 rounded-soft px-2 text-[0.875rem] text-quiet hover:text-ink">
              Close <kbd className="ml-1">Esc</kbd>
            </Dialog.Close>
          </header>
          {children}
        </Dialog.Content>
      </Dialog.Portal>
    </Dialog.Root>
  )
}
