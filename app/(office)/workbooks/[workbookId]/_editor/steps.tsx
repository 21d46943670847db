'use client'

import Link from 'next/link'
import { type KeyboardEvent, useRef } from 'react'
import { Brand } from '@/app/_ui/mark'
import { keyCaps, type Platform } from '@/lib/commands'
import type { Sheet } from '@/lib/workbook'
import { lockWords } from './permission-words'
import type { WorkbookSession } from './session-contract'
import type { StepState } from './step-state'
import { useShape, useView } from './use-session'
import { useStepStates } from './use-step-states'
import type { EditorView } from './view-state'

interface Props {
  readonly session: WorkbookSession
  readonly view: EditorView
  readonly platform: Platform
  readonly onPalette: () => void
}

/** The sheets in the order of the work, numbered, each with a state of its own; the tables stand below them. */
export function Steps({ session, view, platform, onPalette }: Props) {
  useShape(session)
  const { sheet: shown } = useView(view)
  const states = useStepStates(session)
  const list = useRef<HTMLElement>(null)
  const steps = session.workbook.sheets.filter((sheet) => sheet.kind === 'step')
  const tables = session.workbook.sheets.filter((sheet) => sheet.kind === 'table')

  const entry = (sheet: Sheet, number: number | undefined) => (
    <StepEntry
      key={sheet.id}
      sheet={sheet}
      number={number}
      current={sheet.id === shown}
      state={states.get(sheet.id)}
      onShow={() => view.show(sheet)}
    />
  )

  return (
    <nav
      ref={list}
      aria-label="Steps"
      data-region="steps"
      className="hidden w-[13.5rem] shrink-0 flex-col border-line border-r md:flex"
    >
      <div className="border-line border-b px-4 pt-3.5 pb-4">
        <Link href="/workbooks" className="text-ink" title="All workbooks">
          <Brand />
        </Link>
        <h1 className="mt-3 font-semibold leading-snug">{session.title}</h1>
        <p className="text-[0.8125rem] text-quiet">{session.state}</p>
      </div>
      {/* biome-ignore lint/a11y/noStaticElementInteractions: the keys move between the buttons inside */}
      <div
        className="min-h-0 flex-1 overflow-y-auto py-2.5"
        onKeyDown={(event) => moveFocus(event, list.current)}
      >
        <ol className="m-0 list-none p-0">{steps.map((sheet, i) => entry(sheet, i + 1))}</ol>
        {tables.length > 0 ? (
          <>
            <h2 className="mt-3 mb-1 px-4 font-normal text-[0.8125rem] text-quiet" id="tables-title">
              {tables.every((sheet) => lockWords(session, sheet)) ? 'Tables, locked' : 'Tables'}
            </h2>
            <ul className="m-0 list-none p-0" aria-labelledby="tables-title">
              {tables.map((sheet) => entry(sheet, undefined))}
            </ul>
          </>
        ) : null}
      </div>
      <button
        type="button"
        onClick={onPalette}
        className="flex items-center gap-1.5 border-line border-t px-4 py-2.5 text-left text-[0.8125rem] text-quiet hover:text-ink"
      >
        <span className="flex gap-0.5">
          {keyCaps('Mod+K', platform).map((cap) => (
            <kbd key={cap}>{cap}</kbd>
          ))}
        </span>
        everything else
      </button>
    </nav>
  )
}

function StepEntry({
  sheet,
  number,
  current,
  state,
  onShow,
}: {
  readonly sheet: Sheet
  readonly number: number | undefined
  readonly current: boolean
  readonly state: StepState | undefined
  readonly onShow: () => void
}) {
  return (
    <li>
      <button
        type="button"
        onClick={onShow}
        aria-current={current ? 'step' : undefined}
        data-region-focus={current ? '' : undefined}
        data-step={sheet.id}
        tabIndex={current ? 0 : -1}
        title={state?.words.join('\n') || undefined}
        className={`flex w-full items-baseline gap-1 border-l-3 py-[0.25rem] pr-4 pl-[0.8125rem] text-left text-[0.875rem] leading-5 focus-visible:outline-offset-[-2px] ${
          current
            ? 'border-clay bg-raised font-semibold'
            : 'border-transparent hover:bg-[color-mix(in_srgb,var(--ink)_5%,transparent)]'
        }`}
      >
        <span className="figure w-6 shrink-0 text-[0.75rem] text-quiet" aria-hidden={number === undefined}>
          {number}
        </span>
        <span className="min-w-0 flex-1 truncate">{sheet.name}</span>
        <StepMark state={state} table={number === undefined} />
      </button>
    </li>
  )
}

function StepMark({ state, table }: { readonly state: StepState | undefined; readonly table: boolean }) {
  if (state && state.toLookAt > 0) {
    return (
      <span className="figure text-[0.75rem] font-semibold text-clay">
        {state.toLookAt > 99 ? '99+' : state.toLookAt}
        <span aria-hidden="true"> !</span>
        <span className="sr-only"> to look at</span>
      </span>
    )
  }
  if (table || !state?.filled) return null
  return (
    <span className="text-[0.75rem] text-moss">
      <span aria-hidden="true">✓</span>
      <span className="sr-only"> in order</span>
    </span>
  )
}

/** Arrow keys, Home and End move between the steps; Enter opens one. */
function moveFocus(event: KeyboardEvent, list: HTMLElement | null): void {
  const steps = [...(list?.querySelectorAll<HTMLButtonElement>('[data-step]') ?? [])]
  const at = steps.indexOf(document.activeElement as HTMLButtonElement)
  const target =
    event.key === 'ArrowDown'
      ? at + 1
      : event.key === 'ArrowUp'
        ? at - 1
        : event.key === 'Home'
          ? 0
          : event.key === 'End'
            ? steps.length - 1
            : undefined
  if (target === undefined || event.ctrlKey || event.metaKey || event.altKey) return
  event.preventDefault()
  steps[Math.max(0, Math.min(steps.length - 1, target))]?.focus()
}
