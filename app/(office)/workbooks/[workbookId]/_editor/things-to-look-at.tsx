'use client'

import { type KeyboardEvent, useEffect, useRef, useState } from 'react'
import { type CellAddress, cellName, sheetById } from '@/lib/workbook'
import { bySeverity, type CheckBook, type Finding, findings, type Severity } from './checks'
import { useKindFindings } from './kind-watch'
import { Panel } from './panel'
import type { WorkbookSession } from './session-contract'
import { loadCheckBook } from './use-check-book'

const severityWords: Record<
  Severity,
  { readonly mark: string; readonly word: string; readonly tone: string }
> = {
  error: { mark: '!', word: 'put right', tone: 'text-ember' },
  missing: { mark: '○', word: 'missing', tone: 'text-ember' },
  warning: { mark: '△', word: 'look at', tone: 'text-clay' },
  override: { mark: '↷', word: 'override', tone: 'text-quiet' },
  note: { mark: '·', word: 'to know', tone: 'text-quiet' },
}

/** Every check that does not hold, missing input, cell in error and override, the gravest first; Enter goes to the cell. */
export function ThingsToLookAt({
  session,
  onGo,
  onClose,
  onClosed,
}: {
  readonly session: WorkbookSession
  readonly onGo: (address: CellAddress) => void
  readonly onClose: () => void
  readonly onClosed: () => void
}) {
  const read = useFindings(session)
  const kinds = useKindFindings(session)
  const list = useRef<HTMLUListElement>(null)
  // The first is ready for Enter as soon as it is there.
  useEffect(() => {
    if (read) list.current?.querySelector<HTMLElement>('[data-finding]')?.focus()
  }, [read])
  const found = read && bySeverity([...read, ...kinds])
  return (
    <Panel title="Things to look at" about={aboutWords(found)} onClose={onClose} onClosed={onClosed}>
      {found && found.length > 0 ? (
        <ul ref={list} className="m-0 min-h-0 list-none overflow-y-auto p-0 py-1.5" onKeyDown={moveFocus}>
          {found.map((finding) => (
            <li key={`${finding.at.sheet} ${finding.at.row} ${finding.at.column} ${finding.words}`}>
              <FindingRow session={session} finding={finding} onGo={onGo} />
            </li>
          ))}
        </ul>
      ) : null}
    </Panel>
  )
}

function FindingRow({
  session,
  finding,
  onGo,
}: {
  readonly session: WorkbookSession
  readonly finding: Finding
  readonly onGo: (address: CellAddress) => void
}) {
  const { mark, word, tone } = severityWords[finding.severity]
  const { at, goTo } = finding
  const place = ({ sheet, row, column }: CellAddress) =>
    `${sheetById(session.workbook, sheet)?.name ?? ''} ${cellName(row, column)}`
  const elsewhere = place(at) === place(goTo) ? '' : `, said at ${place(at)}`
  return (
    <button
      type="button"
      data-finding
      onClick={() => onGo(goTo)}
      className="flex w-full items-baseline gap-3 px-5 py-2 text-left hover:bg-frost focus-visible:bg-frost focus-visible:outline-offset-[-2px] max-sm:flex-wrap max-sm:gap-y-0.5"
    >
      <span className="w-24 shrink-0 text-[0.8125rem] text-quiet">
        <span aria-hidden="true" className={`mr-1.5 inline-block w-3 text-center font-semibold ${tone}`}>
          {mark}
        </span>
        {word}
      </span>
      <span className="min-w-0 flex-1 first-letter:uppercase max-sm:order-3 max-sm:basis-full">
        {finding.words}
      </span>
      <span className="figure shrink-0 text-[0.8125rem] text-quiet max-sm:ml-auto">
        <span className="sr-only">go to </span>
        {place(goTo)}
        <span className="sr-only">{elsewhere}</span>
      </span>
    </button>
  )
}

function aboutWords(found: readonly Finding[] | undefined): string {
  if (!found) return 'Reading the workbook …'
  if (found.length === 0) return 'Nothing: every check holds and no input is missing.'
  const grave = found.filter(({ severity }) => severity === 'error' || severity === 'missing').length
  const things = found.length === 1 ? 'One thing' : `${found.length} things`
  return grave === 0
    ? `${things}, none of them in the way.`
    : `${things}, ${grave === found.length ? '' : `${grave} of them `}to put right before work goes on.`
}

/** Read once when it is opened: the list must not move under the person's hand. */
function useFindings(session: WorkbookSession): readonly Finding[] | undefined {
  const [found, setFound] = useState<readonly Finding[] | undefined>(undefined)
  useEffect(() => {
    let gone = false
    const read = (book: CheckBook | undefined) => {
      if (!gone) setFound(allFindings(session, book))
    }
    loadCheckBook().then(read, () => read(undefined))
    return () => {
      gone = true
    }
  }, [session])
  return found
}

function allFindings(session: WorkbookSession, book: CheckBook | undefined): Finding[] {
  const { workbook } = session
  const value = (address: CellAddress) => session.value(address)
  return workbook.sheets.flatMap((sheet) => findings(workbook, sheet, value, book))
}

function moveFocus(event: KeyboardEvent<HTMLUListElement>): void {
  const rows = [...event.currentTarget.querySelectorAll<HTMLElement>('[data-finding]')]
  const at = rows.indexOf(document.activeElement as HTMLElement)
  const to = { ArrowDown: at + 1, ArrowUp: at - 1, Home: 0, End: rows.length - 1 }[event.key]
  if (to === undefined) return
  event.preventDefault()
  rows[Math.max(0, Math.min(rows.length - 1, to))]?.focus()
}
