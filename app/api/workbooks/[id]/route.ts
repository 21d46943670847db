import { z } from 'zod'
import { keepValues } from '@/app/_server/calculator/keep-values'
import { readJson, workbookId } from '@/app/_server/request'
import { route } from '@/app/_server/respond'
import { requireActor } from '@/app/_server/session'
import { openWorkbook, removeWorkbook, renameWorkbook } from '@/db/access/workbooks'

interface Params {
  readonly id: string
}

/** `WorkbookOpened`: the newest snapshot and the operations after it. */
export const GET = route<Params>(async (request, { params }) => {
  const id = await workbookId(params)
  if (!id.ok) return id
  const actor = await requireActor(request)
  if (!actor.ok) return actor
  const opened = await openWorkbook(actor.value, id.value)
  if (opened.ok && !opened.value.snapshot.values) keepValues(actor.value, id.value)
  return opened
})

const renameSchema = z.strictObject({
  title: z.string().trim().min(1, 'a title of 1 to 120 characters is expected').max(120),
})

/** Gives it another title. */
export const PATCH = route<Params>(async (request, { params }) => {
  const id = await workbookId(params)
  if (!id.ok) return id
  const body = await readJson(request, renameSchema, 4_096)
  if (!body.ok) return body
  const actor = await requireActor(request)
  if (!actor.ok) return actor
  return renameWorkbook(actor.value, id.value, body.value.title)
})

/** Takes it from the firm's list; the log stays. */
export const DELETE = route<Params>(async (request, { params }) => {
  const id = await workbookId(params)
  if (!id.ok) return id
  const actor = await requireActor(request)
  if (!actor.ok) return actor
  return removeWorkbook(actor.value, id.value)
})
