'use client'

import { useRouter } from 'next/navigation'
import { type RefObject, useRef, useTransition } from 'react'

/** Filters as one types; without scripts it is a plain form that asks the server on Enter. */
export function SearchBox({
  search,
  field,
}: {
  readonly search: string
  readonly field: RefObject<HTMLInputElement | null>
}) {
  const router = useRouter()
  const waiting = useRef<ReturnType<typeof setTimeout>>(undefined)
  const [pending, startTransition] = useTransition()

  function look(text: string, wait: number): void {
    clearTimeout(waiting.current)
    waiting.current = setTimeout(() => {
      const words = text.trim()
      startTransition(() =>
        router.replace(words === '' ? '/workbooks' : `/workbooks?q=${encodeURIComponent(words)}`, {
          scroll: false,
        }),
      )
    }, wait)
  }

  return (
    <search className="min-w-0 flex-1 sm:max-w-md">
      <form
        action="/workbooks"
        onSubmit={(event) => {
          event.preventDefault()
          look(field.current?.value ?? '', 0)
        }}
      >
        <input
          ref={field}
          type="search"
          name="q"
          aria-label="Search the workbooks by title"
          aria-busy={pending}
          placeholder="Search by title"
          autoComplete="off"
          maxLength={120}
          defaultValue={search}
          onChange={(event) => look(event.currentTarget.value, 150)}
          className="field"
        />
      </form>
    </search>
  )
}
