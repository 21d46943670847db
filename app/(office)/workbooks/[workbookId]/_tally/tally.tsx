'use client'

import { useEffect, useRef, useState } from 'react'
import type { UnitSystem } from '@/lib/units'
import type { WorkbookSession } from '../_editor/session-contract'
import { useSession } from '../_editor/use-session'
import { type Difference, differences, type Reading, readTally, summary } from './figures'

const shownFor = 8000

interface Shown {
  /** The system that the readings are in: a conversion of the units changes no figure of the job. */
  readonly system: UnitSystem
  readonly readings: readonly Reading[]
  readonly changed: ReadonlyMap<string, Difference>
  readonly said: string
}

/** The figures that decide the job. After an edit each says what that edit did to it. */
export function Tally({ session }: { readonly session: WorkbookSession }) {
  const { readings, changed, said } = useTally(session)
  if (readings.length === 0) return null
  return (
    <section
      aria-label="Tally"
      data-region="tally"
      tabIndex={-1}
      className="relative flex shrink-0 overflow-x-auto overscroll-x-contain border-line border-b outline-none"
    >
      <dl className="flex min-w-max flex-1" data-region-focus tabIndex={0} aria-label="Figures of the job">
        {readings.map((reading) => (
          <TallyFigure key={reading.name} reading={reading} difference={changed.get(reading.name)} />
        ))}
      </dl>
      <p className="sr-only" aria-live="polite">
        {said}
      </p>
    </section>
  )
}

function TallyFigure({
  reading,
  difference,
}: {
  readonly reading: Reading
  readonly difference: Difference | undefined
}) {
  return (
    <div className="min-w-36 flex-1 border-line border-l px-4 pt-2 pb-1.5 first:border-l-0 lg:min-w-40">
      <dt className="truncate text-[0.8125rem] text-quiet leading-5">{reading.label}</dt>
      <dd className="m-0">
        <span
          className="figure font-medium text-[1.375rem] leading-7"
          title={reading.error}
          data-name={reading.name}
          data-value={reading.value}
        >
          {reading.text}
        </span>
        {reading.unit === '' ? null : (
          <span className="ml-1.5 whitespace-nowrap text-[0.8125rem] text-quiet">{reading.unit}</span>
        )}
        <span
          className={`figure block h-4 text-[0.8125rem] leading-4 transition-opacity duration-700 ${tone(difference)} ${difference ? 'opacity-100' : 'opacity-0'}`}
        >
          {difference ? (
            <>
              <span aria-hidden="true">{difference.direction === 'up' ? '▲' : '▼'} </span>
              <span className="sr-only">{difference.direction} </span>
              {difference.text}
            </>
          ) : null}
        </span>
      </dd>
    </div>
  )
}

function tone(difference: Difference | undefined): string {
  if (difference?.news === 'good') return 'text-moss'
  return difference?.news === 'bad' ? 'text-clay' : 'text-quiet'
}

function useTally(session: WorkbookSession): Shown {
  const { engine } = useSession(session)
  const read = () => readTally(session.workbook, session.named)
  const [shown, setShown] = useState<Shown>(() => ({
    system: session.workbook.system,
    readings: read(),
    changed: new Map(),
    said: '',
  }))
  const timer = useRef<ReturnType<typeof setTimeout> | undefined>(undefined)

  // biome-ignore lint/correctness/useExhaustiveDependencies: `read` reads the session, which is the dependency
  useEffect(() => {
    // Values that arrive while the engine starts are not the work of an edit.
    const quietly = engine.kind === 'starting'
    const stop = session.onValues(() => {
      setShown((before) => {
        const readings = read()
        const { system } = session.workbook
        const changed =
          quietly || before.system !== system
            ? new Map<string, Difference>()
            : differences(before.readings, readings, session.workbook, session.named)
        if (changed.size === 0 && same(before.readings, readings)) return before
        return { system, readings, changed, said: summary(readings, changed) }
      })
      clearTimeout(timer.current)
      timer.current = setTimeout(
        () => setShown((before) => ({ ...before, changed: new Map(), said: '' })),
        shownFor,
      )
    })
    return () => {
      stop()
      clearTimeout(timer.current)
    }
  }, [session, engine.kind === 'starting'])

  return shown
}

function same(a: readonly Reading[], b: readonly Reading[]): boolean {
  return (
    a.length === b.length &&
    a.every(
      (reading, i) =>
        reading.name === b[i]?.name && reading.text === b[i]?.text && reading.unit === b[i]?.unit,
    )
  )
}
