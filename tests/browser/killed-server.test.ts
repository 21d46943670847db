import { afterAll, beforeAll, expect, test } from 'vitest'
import type { AppendAccepted, WorkbookOpened } from '@/lib/workbook'
import { sendSignInForm } from '../_support/sign-in-form'
import { demoFirm } from '../_support/site'
import { type Site, startSite } from '../_support/site-server'
import { addRows, sent, setCell } from '../_support/workbooks'

/** A site of its own: this one is killed. */
let site: Site
let cookie: string
beforeAll(async () => {
  site = await startSite(JSON.parse(process.env.TEST_CLUSTER ?? ''), 'killed-server')
  const { estimator } = demoFirm.emails
  cookie =
    (await sendSignInForm(site.address, { email: estimator, password: demoFirm.password })).cookie ?? ''
})
afterAll(() => site?.stop())

async function call<T>(path: string, body?: unknown): Promise<T> {
  const headers = { cookie, origin: site.address, 'content-type': 'application/json' }
  const request = body === undefined ? { headers } : { method: 'POST', headers, body: JSON.stringify(body) }
  const response = await fetch(site.address + path, request)
  if (!response.ok) throw new Error(`${path}: ${response.status} ${await response.text()}`)
  return (await response.json()) as T
}

test('the web server killed with SIGKILL right after its answer, four times: no acknowledged edit is lost, and people stay signed in', async () => {
  const { id } = await call<{ id: string }>('/api/workbooks', {
    title: 'Killed',
    frame: 'gable',
    system: 'us',
  })
  const path = `/api/workbooks/${id}`
  const acknowledged: string[] = []
  let base = 0
  for (let round = 0; round < 4; round++) {
    for (let edit = 0; edit <= round * 3; edit++) {
      const operations = [sent(base === 0 ? addRows() : setCell(base))]
      const answer = await call<AppendAccepted>(`${path}/operations`, { base, operations })
      base = answer.seq
      acknowledged.push(...answer.accepted.map((one) => one.id))
    }
    site = await site.killAndServeAgain()
    const opened = await call<WorkbookOpened>(path)
    expect(opened.seq).toBe(base)
    const logged = await call<{ id: string }[]>(`${path}/operations?after=0`)
    expect(logged.map((one) => one.id)).toEqual(acknowledged)
  }
  expect(acknowledged.length).toBe(22)
})
