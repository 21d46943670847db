import { calculator } from '@/app/_server/calculator/calculator'
import { storedState } from '@/app/_server/calculator/stored-state'
import { downloadAs } from '@/app/_server/file-name'
import { workbookId } from '@/app/_server/request'
import { route } from '@/app/_server/respond'
import { requireActor } from '@/app/_server/session'
import { temporaryFile } from '@/app/_server/temporary-file'
import { openWorkbook } from '@/db/access/workbooks'

interface Params {
  readonly id: string
}

const xlsxType = 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet'

/** The newest state as an XLSX file with live formulas, written in the calculator's process. */
export const GET = route<Params>(async (request, { params }) => {
  const id = await workbookId(params)
  if (!id.ok) return id
  const actor = await requireActor(request)
  if (!actor.ok) return actor
  const opened = await openWorkbook(actor.value, id.value)
  if (!opened.ok) return opened
  const { title } = opened.value
  const file = await temporaryFile('workbook.xlsx')
  const written = await calculator().run({
    kind: 'xlsx',
    state: storedState(opened.value),
    title,
    created: new Date().toISOString(),
    path: file.path,
  })
  if (!written.ok) {
    await file.remove()
    return written
  }
  return new Response(file.stream(), {
    headers: {
      'content-type': xlsxType,
      'content-length': String(written.value.bytes),
      'content-disposition': downloadAs(title, 'xlsx'),
      'cache-control': 'no-store',
    },
  })
})
