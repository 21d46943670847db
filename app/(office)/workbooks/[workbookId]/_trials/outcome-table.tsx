'use client'

import type { KeyboardEvent } from 'react'
import type { Trial } from '@/lib/commands'
import type { Outcome } from './trial'
import type { FigureWords } from './try-every'

/** The plot in figures, the cheapest first. Arrow keys go from row to row, Enter chooses. */
export function OutcomeTable({
  outcomes,
  figures,
  now,
  marked,
  mayChange,
  onMark,
  onChoose,
}: {
  readonly outcomes: readonly Outcome[]
  readonly figures: Readonly<Record<'price' | 'heat' | 'light', FigureWords>>
  readonly now: string | undefined
  readonly marked: string | undefined
  readonly mayChange: boolean
  readonly onMark: (code: string) => void
  readonly onChoose: (trial: Trial) => void
}) {
  const head = 'sticky top-0 bg-raised px-2 py-1.5 align-bottom font-normal max-sm:px-1.5 text-quiet'
  return (
    <div className="min-w-0 flex-1 overflow-x-auto border-line border-t lg:overflow-y-auto lg:border-t-0 lg:border-l">
      <table className="w-full border-collapse text-[0.875rem]" onKeyDown={moveFocus}>
        <caption className="sr-only">Coverings by price</caption>
        <thead className="text-[0.8125rem]">
          <tr>
            <th scope="col" className={`${head} w-9 text-right`}>
              <span className="sr-only">Number in the plot</span>
            </th>
            <th scope="col" className={`${head} text-left`}>
              Covering
            </th>
            {(['price', 'heat', 'light'] as const).map((aspect) => (
              <th key={aspect} scope="col" className={`${head} text-right`}>
                {figures[aspect].label}
                {figures[aspect].unit === '' ? null : (
                  <span className="block text-[0.75rem]">{figures[aspect].unit}</span>
                )}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {outcomes.map((outcome, i) => {
            const { trial } = outcome
            const cell = 'figure px-2 py-1 text-right whitespace-nowrap max-sm:px-1.5 max-sm:text-[0.8125rem]'
            return (
              <tr
                key={trial.code}
                className={`border-line border-t ${trial.code === marked ? 'bg-frost' : ''}`}
                onPointerEnter={() => onMark(trial.code)}
              >
                <td className={`${cell} text-quiet`}>{i + 1}</td>
                <th scope="row" className="px-2 py-0.5 text-left font-normal max-sm:px-1.5">
                  <button
                    type="button"
                    data-outcome={trial.code}
                    disabled={!mayChange}
                    onFocus={() => onMark(trial.code)}
                    onClick={() => onChoose(trial)}
                    className="min-h-7 w-full text-left enabled:hover:underline"
                  >
                    <span className="sr-only">Use </span>
                    {trial.title}
                    {trial.code === now ? (
                      <span className="ml-2 whitespace-nowrap text-[0.8125rem] text-quiet">
                        <span aria-hidden="true" className="text-clay">
                          ◉{' '}
                        </span>
                        now
                      </span>
                    ) : null}
                  </button>
                </th>
                {(['price', 'heat', 'light'] as const).map((aspect) => {
                  const value = outcome[aspect]
                  return (
                    <td key={aspect} className={cell}>
                      {value === undefined ? '–' : figures[aspect].show(value)}
                    </td>
                  )
                })}
              </tr>
            )
          })}
        </tbody>
      </table>
    </div>
  )
}

function moveFocus(event: KeyboardEvent<HTMLTableElement>): void {
  const rows = [...event.currentTarget.querySelectorAll<HTMLElement>('[data-outcome]')]
  const at = rows.indexOf(document.activeElement as HTMLElement)
  const to = { ArrowDown: at + 1, ArrowUp: at - 1, Home: 0, End: rows.length - 1 }[event.key]
  if (to === undefined) return
  event.preventDefault()
  rows[Math.max(0, Math.min(rows.length - 1, to))]?.focus()
}
