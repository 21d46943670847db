import { z } from 'zod'
import { keepValues } from '@/app/_server/calculator/keep-values'
import { check, readJson, workbookId } from '@/app/_server/request'
import { json, route } from '@/app/_server/respond'
import { requireActor } from '@/app/_server/session'
import { appendOperations, operationsAfter } from '@/db/access/workbooks'
import { httpStatus } from '@/lib/failures'
import { appendRequestSchema } from '@/lib/workbook'

interface Params {
  readonly id: string
}

/** A full batch of operations with long texts; more is refused while it arrives. */
const largestBatch = 16 * 1024 * 1024

const querySchema = z.object({
  after: z
    .string()
    .regex(/^\d{1,9}$/, 'a sequence such as after=12 is expected')
    .transform(Number),
})

/** The operations after `?after=`, in order. */
export const GET = route<Params>(async (request, { params }) => {
  const id = await workbookId(params)
  if (!id.ok) return id
  const query = check(querySchema, Object.fromEntries(new URL(request.url).searchParams))
  if (!query.ok) return query
  const actor = await requireActor(request)
  if (!actor.ok) return actor
  return operationsAfter(actor.value, id.value, query.value.after)
})

/** Appends a batch. 200 `AppendAccepted`: committed; 409 `AppendBehind`: nothing was, and what is missing comes along. */
export const POST = route<Params>(async (request, { params }) => {
  const id = await workbookId(params)
  if (!id.ok) return id
  const body = await readJson(request, appendRequestSchema, largestBatch)
  if (!body.ok) return body
  const actor = await requireActor(request)
  if (!actor.ok) return actor
  const appended = await appendOperations(actor.value, id.value, body.value)
  if (!appended.ok) return appended
  if ('code' in appended.value) return json(appended.value, httpStatus.behind)
  keepValues(actor.value, id.value)
  return appended
})
