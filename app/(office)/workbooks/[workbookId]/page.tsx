import { notFound } from 'next/navigation'
import { requirePageActor } from '@/app/_server/page-actor'
import { OpenWorkbook } from './_editor/open-workbook'

export const metadata = { title: 'Workbook' }

interface Props {
  readonly params: Promise<{ readonly workbookId: string }>
}

/** Whether this person may see the workbook is decided where its data is read, by the route that hands it out. */
export default async function WorkbookPage({ params }: Props) {
  const { workbookId } = await params
  if (!/^[0-9a-f-]{36}$/i.test(workbookId)) notFound()
  await requirePageActor(`/workbooks/${workbookId}`)
  return <OpenWorkbook id={workbookId} />
}
