import type { Metadata } from 'next'
import { requirePageActor } from '@/app/_server/page-actor'
import { Brand } from '@/app/_ui/mark'
import { PersonMenu } from '@/app/_ui/person-menu'
import { listWorkbooks } from '@/db/access/workbooks'
import { listedWorkbook } from './_list/listed'
import { roleWord } from './_list/words'
import { WorkbookList } from './_list/workbook-list'

export const metadata: Metadata = { title: 'Workbooks' }

export default async function WorkbooksPage({
  searchParams,
}: {
  readonly searchParams: Promise<{ readonly q?: string | string[] }>
}) {
  const { q } = await searchParams
  const search = typeof q === 'string' ? q.trim().slice(0, 120) : ''
  const actor = await requirePageActor('/workbooks')
  const listed = await listWorkbooks(actor, { search })
  if (!listed.ok) throw new Error(listed.failure.message ?? listed.failure.text)
  const now = new Date()
  return (
    <div className="min-h-dvh">
      <header className="flex items-center justify-between gap-4 border-b border-line px-4 py-2.5 sm:px-8">
        <div className="flex min-w-0 items-center gap-4">
          <Brand />
          <span className="truncate border-l border-line pl-4 text-quiet max-sm:hidden">
            {actor.firmName}
          </span>
        </div>
        <PersonMenu name={actor.name} role={roleWord(actor.role)} />
      </header>
      <WorkbookList
        workbooks={listed.value.map((workbook) => listedWorkbook(workbook, now))}
        search={search}
        mayChange={actor.role !== 'viewer'}
      />
    </div>
  )
}
