'use client'

import { Toaster } from 'sonner'

/** Short notes at the foot of the screen; they never carry the only copy of anything. */
export function Toasts() {
  return (
    <Toaster
      position="bottom-right"
      toastOptions={{
        unstyled: true,
        classNames: {
          toast:
            'flex w-full items-center gap-3 rounded-soft border border-line bg-raised px-4 py-3 text-ink shadow-lift font-sans text-[0.9375rem]',
          error: '!border-ember',
          description: 'text-quiet',
        },
      }}
    />
  )
}
