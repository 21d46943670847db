'use client'

import { useMemo } from 'react'
import type { Sheet } from '@/lib/workbook'
import { Legend } from '../_grid/legend'
import { caution, showsLoads, withoutCaution } from './caution'
import { lockWords } from './permission-words'
import type { WorkbookSession } from './session-contract'
import { useShape } from './use-session'

/** The sheet's name, what is done on it in a sentence, and what the grounds of its cells mean. */
export function SheetHead({ session, sheet }: { readonly session: WorkbookSession; readonly sheet: Sheet }) {
  const shape = useShape(session)
  // biome-ignore lint/correctness/useExhaustiveDependencies: the workbook is changed in place; the shape says when
  const loads = useMemo(() => showsLoads(session.workbook, sheet), [session, sheet, shape])
  const about = loads ? withoutCaution(sheet.about) : sheet.about
  const locked = lockWords(session, sheet)
  return (
    <header className="flex shrink-0 flex-wrap items-baseline gap-x-4 gap-y-1 px-4 pt-3 pb-2.5">
      <h2 className="text-lg font-semibold leading-6">{sheet.name}</h2>
      {about ? <p className="min-w-0 max-w-[70ch] text-[0.875rem] text-quiet">{about}</p> : null}
      {locked ? (
        <p className="text-[0.8125rem] text-clay">
          <span aria-hidden="true">▪ </span>
          {locked}
        </p>
      ) : null}
      <div className="ml-auto self-center max-xl:ml-0 max-xl:basis-full">
        <Legend />
      </div>
      {loads ? (
        <p className="basis-full text-[0.8125rem] text-quiet">
          <span aria-hidden="true" className="text-clay">
            ▲{' '}
          </span>
          {caution}
        </p>
      ) : null}
    </header>
  )
}
