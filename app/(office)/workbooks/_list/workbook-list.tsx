'use client'

import { Plus } from 'lucide-react'
import dynamic from 'next/dynamic'
import { useCallback, useRef, useState } from 'react'
import { Button } from '@/app/_ui/button'
import { EmptyList } from './empty-list'
import { useListKeys } from './list-keys'
import { columnsClass, ListRow } from './list-row'
import { NewWorkbook } from './new-workbook'
import type { ListedWorkbook } from './row'
import { RowDialogs } from './row-dialogs'
import type { RowAction } from './row-menu'
import { SearchBox } from './search-box'

/** With every command in it, so it is fetched when it is first asked for. */
const ListPalette = dynamic(() => import('./list-palette').then((module) => module.ListPalette), {
  ssr: false,
})

const headings = ['Workbook', 'Covering area', 'Design heat loss', 'Quotation', 'Changed', '']

/** The firm's workbooks, most recent first, with the figures that tell one from another. */
export function WorkbookList({
  workbooks,
  search,
  mayChange,
}: {
  readonly workbooks: readonly ListedWorkbook[]
  readonly search: string
  readonly mayChange: boolean
}) {
  const list = useRef<HTMLUListElement>(null)
  const field = useRef<HTMLInputElement>(null)
  const [making, setMaking] = useState(false)
  const [palette, setPalette] = useState<'never' | 'open' | 'closed'>('never')
  const [chosen, choose] = useState<{ readonly action: RowAction; readonly workbook: ListedWorkbook }>()
  const openNew = useCallback(() => setMaking(true), [])
  const openPalette = useCallback(() => setPalette('open'), [])
  useListKeys({ list, search: field, onNew: mayChange ? openNew : undefined, onPalette: openPalette })

  return (
    <main className="mx-auto w-full max-w-6xl px-4 py-8 sm:px-8">
      <div className="flex flex-wrap items-end justify-between gap-x-6 gap-y-4">
        <div>
          <h1 className="text-2xl font-semibold">Workbooks</h1>
          <p role="status" className="text-quiet">
            {countWords(workbooks.length, search)}
          </p>
        </div>
        <div className="flex w-full flex-wrap gap-3 sm:w-auto sm:flex-1 sm:justify-end">
          <SearchBox search={search} field={field} />
          {mayChange ? (
            <Button tone="action" onClick={openNew}>
              <Plus size={17} aria-hidden="true" />
              New workbook
            </Button>
          ) : null}
        </div>
      </div>
      {workbooks.length === 0 ? (
        <EmptyList search={search} onNew={mayChange ? openNew : undefined} />
      ) : (
        <div className="mt-6 rounded-soft border border-line bg-raised">
          <div
            aria-hidden="true"
            className={`hidden border-b border-line px-5 py-2.5 text-sm text-quiet ${columnsClass}`}
          >
            {headings.map((heading, at) => (
              <span key={heading} className={at > 0 && at < 4 ? 'text-right' : ''}>
                {heading}
              </span>
            ))}
          </div>
          <ul ref={list} className="[&>li:last-child]:border-b-0">
            {workbooks.map((workbook) => (
              <ListRow
                key={workbook.id}
                workbook={workbook}
                mayChange={mayChange}
                onChoose={(action) => choose({ action, workbook })}
              />
            ))}
          </ul>
        </div>
      )}
      <Hints mayChange={mayChange} />
      <NewWorkbook open={making} onOpenChange={setMaking} />
      {palette === 'never' ? null : (
        <ListPalette
          open={palette === 'open'}
          onClose={() => setPalette('closed')}
          workbooks={workbooks}
          mayChange={mayChange}
        />
      )}
      <RowDialogs chosen={chosen} onDone={() => choose(undefined)} />
    </main>
  )
}

function countWords(count: number, search: string): string {
  const workbooks = count === 1 ? '1 workbook' : `${count === 0 ? 'No' : count} workbooks`
  return search === '' ? workbooks : `${workbooks} with “${search}” in the title`
}

function Hints({ mayChange }: { readonly mayChange: boolean }) {
  return (
    <p className="mt-5 flex flex-wrap gap-x-6 gap-y-2 text-sm text-quiet max-sm:hidden">
      <span>
        <kbd>↑</kbd> <kbd>↓</kbd> along the rows
      </span>
      <span>
        <kbd>Enter</kbd> open
      </span>
      <span>
        <kbd>/</kbd> search
      </span>
      {mayChange ? (
        <span>
          <kbd>N</kbd> new workbook
        </span>
      ) : null}
      <span>
        <kbd>Ctrl K</kbd> everything else
      </span>
    </p>
  )
}
