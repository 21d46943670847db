'use client'

import { useLayoutEffect, useRef, useState } from 'react'

/** What is to be said of the cell, on one line; where that is too long the rest is a button away. */
export function CellAbout({
  id,
  problem,
  parts,
}: {
  readonly id: string
  readonly problem: string | undefined
  readonly parts: readonly (string | undefined)[]
}) {
  const line = useRef<HTMLParagraphElement>(null)
  const [cut, setCut] = useState(false)
  const [all, setAll] = useState(false)
  const text = problem ?? parts.filter(Boolean).join(' · ')

  // biome-ignore lint/correctness/useExhaustiveDependencies: another text is measured anew
  useLayoutEffect(() => {
    const element = line.current
    if (!element || all) return
    const measure = () => setCut(element.scrollWidth > element.clientWidth)
    measure()
    const observer = new ResizeObserver(measure)
    observer.observe(element)
    return () => observer.disconnect()
  }, [text, all])

  return (
    <div className="flex items-start gap-3 text-[0.8125rem] text-quiet leading-5">
      <p
        ref={line}
        id={id}
        title={cut && !all ? text : undefined}
        className={`min-h-5 min-w-0 ${all ? 'max-h-40 overflow-y-auto' : 'truncate'} ${problem ? 'text-ember' : ''}`}
      >
        {problem ? <span aria-hidden="true">! </span> : null}
        {text}
      </p>
      {cut || all ? (
        <button
          type="button"
          aria-expanded={all}
          aria-controls={id}
          onClick={() => setAll(!all)}
          className="min-h-6 shrink-0 text-ink underline decoration-line underline-offset-2 hover:decoration-ink"
        >
          {all ? 'less' : 'all of it'}
        </button>
      ) : null}
    </div>
  )
}
