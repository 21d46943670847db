import { join } from 'node:path'
import type { Browser } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { serverActions } from '../_support/endpoints'
import { sendSignInForm } from '../_support/sign-in-form'
import { demoFirm, otherFirm, siteAddress } from '../_support/site'
import { launchChromium } from './person'

/** Server actions against every kind of asker; the routes have their table in tests/db/routes.test.ts. */
const actions = ['(auth)/sign-in/actions.ts#signInWithPassword']

const people = [
  ...(['owner', 'manager', 'estimator', 'viewer'] as const).map((role) => ({
    who: role as string,
    email: demoFirm.emails[role],
    password: demoFirm.password as string,
  })),
  {
    who: 'another firm’s owner',
    email: otherFirm.emails.owner,
    password: otherFirm.password,
  },
]

let browser: Browser
beforeAll(async () => {
  browser = await launchChromium()
})
afterAll(() => browser.close())

test('the table has every server action of the tree, and no other', () => {
  expect(serverActions(join(process.cwd(), 'app'))).toEqual(actions)
})

describe('the sign-in form, without scripts', () => {
  test.each(people)('lets $who in with the right password', async ({ email, password }) => {
    const answer = await sendSignInForm(siteAddress(), { email, password, next: '/workbooks?q=a' })
    expect([answer.status, answer.location]).toEqual([303, '/workbooks?q=a'])
    const list = await fetch(`${siteAddress()}/api/workbooks`, { headers: { cookie: answer.cookie ?? '' } })
    expect(list.status).toBe(200)
    const titles = await list.text()
    expect(titles.includes(otherFirm.workbook.title)).toBe(email === otherFirm.emails.owner)
  })

  test('sets one cookie, out of reach of scripts and of other sites', async () => {
    const answer = await sendSignInForm(siteAddress(), {
      email: demoFirm.emails.owner,
      password: demoFirm.password,
    })
    const kept = answer.setCookies.filter((cookie) => !/=;|Max-Age=0|1970/.test(cookie))
    expect(kept).toHaveLength(1)
    expect(kept[0]).toMatch(/^panewright-session=.*; HttpOnly; SameSite=lax$/i)
    // The cookie is encrypted: nothing of the session can be read from it.
    expect(Buffer.from(kept[0]?.split('.')[3] ?? '', 'base64url').toString('latin1')).not.toContain('session')
  })

  test.each([
    ['a wrong password', demoFirm.emails.viewer, 'not this one'],
    ['an unknown address', 'nobody@larkfold.example', demoFirm.password],
    ['another firm’s password', demoFirm.emails.viewer, otherFirm.password],
  ])('refuses %s in the same words, and keeps the typed address', async (_what, email, password) => {
    const answer = await sendSignInForm(siteAddress(), { email, password })
    expect([answer.status, answer.cookie]).toEqual([200, undefined])
    expect(answer.text).toContain('The e-mail address or the password is wrong.')
    expect(answer.text).toContain(`value="${email}"`)
    expect(answer.text).not.toContain(password)
  })

  test.each(['//evil.example', 'https://evil.example/', '/\\evil.example', '/\t/evil.example'])(
    'goes on to the workbooks when asked to go to %j',
    async (next) => {
      const { email, password } = { email: demoFirm.emails.manager, password: demoFirm.password }
      const answer = await sendSignInForm(siteAddress(), { email, password, next })
      expect([answer.status, answer.location]).toEqual([303, '/workbooks'])
    },
  )

  test('is refused when it comes from another site', async () => {
    const fields = { email: demoFirm.emails.owner, password: demoFirm.password }
    const answer = await sendSignInForm(siteAddress(), fields, { origin: 'http://evil.example' })
    expect(answer.status).toBeGreaterThanOrEqual(400)
    expect(answer.cookie).toBeUndefined()
  })
})

describe('pages', () => {
  test.each(['/workbooks', `/workbooks/${otherFirm.workbook.id}`])(
    '%s sends nobody to sign in, also past the proxy',
    async (path) => {
      for (const headers of [{}, { 'x-middleware-subrequest': 'proxy:proxy:proxy:proxy:proxy' }]) {
        const response = await fetch(siteAddress() + path, { headers, redirect: 'manual' })
        const text = await response.text()
        // A page that streams has sent its first bytes by then; the redirect is in the rest.
        expect(response.headers.get('location') ?? text).toContain('/sign-in?next=')
        expect(text).not.toContain(otherFirm.workbook.title)
      }
    },
  )

  test.each(['/sign-in', '/nowhere', '/api/health/live', '/api/workbooks'])(
    '%s has the headers that keep it safe',
    async (path) => {
      const { headers } = await fetch(siteAddress() + path)
      const policy = headers.get('content-security-policy') ?? ''
      expect(policy).toMatch(/frame-ancestors 'none'/)
      expect(policy).not.toMatch(/script-src[^;]*unsafe/)
      expect(headers.get('x-content-type-options')).toBe('nosniff')
      expect(headers.get('referrer-policy')).toBe('same-origin')
      expect(headers.get('cache-control')).toMatch(/no-store/)
      expect(headers.get('x-powered-by')).toBeNull()
    },
  )

  test('a page’s scripts all carry the nonce of its own response', async () => {
    const response = await fetch(`${siteAddress()}/sign-in`)
    const nonce = /'nonce-([^']+)'/.exec(response.headers.get('content-security-policy') ?? '')?.[1]
    const scripts = [...(await response.text()).matchAll(/<script\b[^>]*>/g)].map(([tag]) => tag)
    expect(scripts.length).toBeGreaterThan(3)
    expect(scripts.filter((tag) => !tag.includes(`nonce="${nonce}"`))).toEqual([])
  })
})

test('ten wrong tries on one account: the eleventh is told how long to wait, the right password too', async () => {
  const { email } = { email: otherFirm.emails.viewer }
  for (let tries = 0; tries < 10; tries++) {
    const answer = await sendSignInForm(siteAddress(), { email, password: `wrong ${tries}` })
    expect(answer.text).toContain('is wrong')
  }
  const answer = await sendSignInForm(siteAddress(), { email, password: otherFirm.password })
  expect(answer.cookie).toBeUndefined()
  expect(answer.text).toMatch(/Too many tries\. Wait 1[0-5] minutes/)
})

test('with scripts: the error is announced, the address stays, and the hand is in the right field', async () => {
  const page = await browser.newPage()
  await page.goto(`${siteAddress()}/sign-in`)
  await page.getByLabel('E-mail').fill('not an address')
  await page.keyboard.press('Enter')
  await page.getByRole('alert').filter({ hasText: 'whole e-mail address' }).waitFor()
  expect(await focused(page)).toBe('email')
  await page.getByLabel('E-mail').fill(demoFirm.emails.estimator)
  await page.getByLabel('Password').fill('not this one')
  await page.keyboard.press('Enter')
  await page.getByRole('alert').filter({ hasText: 'is wrong' }).waitFor()
  expect(await page.getByLabel('E-mail').inputValue()).toBe(demoFirm.emails.estimator)
  expect(await focused(page)).toBe('password')
  await page.close()
})

function focused(page: Awaited<ReturnType<Browser['newPage']>>): Promise<string | null | undefined> {
  return page.evaluate(() => document.activeElement?.getAttribute('name'))
}
