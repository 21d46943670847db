'use client'

import Link from 'next/link'
import { Mark } from '@/app/_ui/mark'
import type { WorkbookSession } from './session-contract'
import { useShape, useView } from './use-session'
import type { EditorView } from './view-state'

/** On a narrow screen the steps fold into one line: where you are, and a list to go elsewhere. */
export function PhoneSteps({
  session,
  view,
  onPalette,
}: {
  readonly session: WorkbookSession
  readonly view: EditorView
  readonly onPalette: () => void
}) {
  useShape(session)
  const { sheet: shown } = useView(view)
  const { sheets } = session.workbook
  const steps = sheets.filter((sheet) => sheet.kind === 'step')
  const tables = sheets.filter((sheet) => sheet.kind === 'table')
  return (
    <header className="flex shrink-0 items-center gap-3 border-line border-b px-4 py-2 md:hidden">
      <Link href="/workbooks" aria-label="All workbooks" className="grid size-9 place-items-center">
        <Mark />
      </Link>
      <div className="min-w-0 flex-1">
        <h1 className="truncate font-normal text-[0.8125rem] text-quiet">{session.title}</h1>
        <select
          aria-label="Step"
          value={shown}
          onChange={(event) => {
            const sheet = sheets.find((candidate) => candidate.id === event.target.value)
            if (sheet) view.show(sheet)
          }}
          className="w-full truncate bg-transparent font-semibold"
        >
          {steps.map((sheet, i) => (
            <option key={sheet.id} value={sheet.id}>
              {i + 1} {sheet.name}
            </option>
          ))}
          {tables.length > 0 ? (
            <optgroup label="Tables">
              {tables.map((sheet) => (
                <option key={sheet.id} value={sheet.id}>
                  {sheet.name}
                </option>
              ))}
            </optgroup>
          ) : null}
        </select>
      </div>
      <button
        type="button"
        onClick={onPalette}
        className="min-h-9 rounded-soft border border-line bg-raised px-3 text-[0.875rem]"
      >
        Commands
      </button>
    </header>
  )
}
