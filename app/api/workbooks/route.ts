import { z } from 'zod'
import { keepValues } from '@/app/_server/calculator/keep-values'
import { check, readJson } from '@/app/_server/request'
import { json, route } from '@/app/_server/respond'
import { requireActor } from '@/app/_server/session'
import { createWorkbook, listWorkbooks } from '@/db/access/workbooks'

const querySchema = z.object({ search: z.string().trim().max(120).optional() })

/** The firm's workbooks, most recently changed first; `?search=` looks in the titles. */
export const GET = route(async (request) => {
  const query = check(querySchema, Object.fromEntries(new URL(request.url).searchParams))
  if (!query.ok) return query
  const actor = await requireActor(request)
  if (!actor.ok) return actor
  const { search } = query.value
  return listWorkbooks(actor.value, search === undefined ? {} : { search })
})

const newSchema = z.strictObject({
  title: z.string().trim().min(1, 'a title of 1 to 120 characters is expected').max(120),
  frame: z.string().min(1).max(40),
  system: z.enum(['us', 'si'], 'us or si is expected'),
})

/** 201 with the new workbook's id and address. */
export const POST = route(async (request) => {
  const body = await readJson(request, newSchema, 4_096)
  if (!body.ok) return body
  const actor = await requireActor(request)
  if (!actor.ok) return actor
  const made = await createWorkbook(actor.value, body.value, {
    now: () => new Date(),
    newId: () => crypto.randomUUID(),
  })
  if (!made.ok) return made
  keepValues(actor.value, made.value.id)
  return json(made.value, 201, { location: `/workbooks/${made.value.id}` })
})
