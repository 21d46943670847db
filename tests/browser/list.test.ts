import { readFileSync } from 'node:fs'
import { join } from 'node:path'
import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { sendSignInForm } from '../_support/sign-in-form'
import { demoFirm, siteAddress } from '../_support/site'
import { desk, launchChromium, newContext, type View } from './person'

const axe = readFileSync(join(process.cwd(), 'node_modules/axe-core/axe.min.js'), 'utf8')

let browser: Browser
beforeAll(async () => {
  browser = await launchChromium()
})
afterAll(() => browser.close())

const views: readonly View[] = [
  { ...desk, theme: 'light' },
  { width: 1024, height: 768, theme: 'dark' },
  { width: 390, height: 844, theme: 'light' },
  { width: 390, height: 844, theme: 'dark' },
]

describe.each(views)('at $width pixels, $theme', (view) => {
  test('nothing is wrong for readers of every kind, and nothing is wider than the screen', async () => {
    const page = await open('estimator', view)
    await checkPage(page, 'list')
    await page.getByRole('button', { name: /your menu/ }).click()
    await page.getByRole('menu').waitFor()
    await checkPage(page, 'menu')
    await page.keyboard.press('Escape')
    await page.getByRole('button', { name: 'New workbook' }).click()
    await page.getByRole('dialog').waitFor()
    await checkPage(page, 'new workbook')
    await page.goto(`${siteAddress()}/workbooks?q=${encodeURIComponent('no such title')}`)
    await page.getByRole('link', { name: 'Show all workbooks' }).waitFor()
    await checkPage(page, 'nothing found')
    await page.goto(`${siteAddress()}/nowhere`)
    await checkPage(page, 'not found')
    await page.context().clearCookies()
    await page.goto(`${siteAddress()}/sign-in`)
    await checkPage(page, 'sign-in')
    await page.context().close()
  })
})

describe('by keyboard', () => {
  test('search, arrows and Enter open the workbook that was looked for', async () => {
    const page = await open('estimator')
    const titles = await page.locator('a[data-row]').allTextContents()
    const title = titles.at(-1) ?? ''
    expect(titles.length).toBeGreaterThan(1)
    await page.keyboard.press('/')
    await page.keyboard.type(title.toUpperCase())
    await page.getByRole('status').filter({ hasText: '1 workbook with' }).waitFor()
    await page.keyboard.press('ArrowDown')
    expect(await page.evaluate(() => document.activeElement?.textContent)).toBe(title)
    await page.keyboard.press('Enter')
    await page.waitForURL(/\/workbooks\/[0-9a-f-]{36}$/)
    await page.context().close()
  })

  test('arrows stop at the last row and go back up to the search field', async () => {
    const page = await open('viewer')
    const count = await page.locator('a[data-row]').count()
    for (let n = 0; n < count + 2; n++) await page.keyboard.press('ArrowDown')
    const last = await page.locator('a[data-row]').last().textContent()
    expect(await page.evaluate(() => document.activeElement?.textContent)).toBe(last)
    for (let n = 0; n < count; n++) await page.keyboard.press('ArrowUp')
    expect(await page.evaluate(() => document.activeElement?.getAttribute('type'))).toBe('search')
    await page.context().close()
  })

  test('a workbook is made, renamed and removed', async () => {
    const page = await open('estimator')
    await page.keyboard.press('n')
    await page.getByRole('dialog').waitFor()
    await page.keyboard.press('Enter')
    await page.getByRole('alert').filter({ hasText: 'Give it a title' }).waitFor()
    await page.keyboard.type('Tansy Bank hoop')
    await page.keyboard.press('Tab')
    await page.keyboard.press('ArrowDown')
    await page.keyboard.press('Enter')
    await page.waitForURL(/\/workbooks\/[0-9a-f-]{36}$/)
    await page.goto(`${siteAddress()}/workbooks`)
    await choose(page, 'Tansy Bank hoop', 'Rename…')
    await page.keyboard.type('Tansy Bank, second try')
    await page.keyboard.press('Enter')
    await page.getByRole('link', { name: 'Tansy Bank, second try' }).waitFor()
    await choose(page, 'Tansy Bank, second try', 'Remove…')
    await page.getByRole('button', { name: 'Remove', exact: true }).click()
    await page.getByRole('link', { name: 'Tansy Bank, second try' }).waitFor({ state: 'detached' })
    await page.context().close()
  })

  test('single-key shortcuts can be switched off, and stay off', async () => {
    const page = await open('estimator')
    await page.getByRole('button', { name: /your menu/ }).click()
    await page.getByRole('menuitemcheckbox', { name: 'Single-key shortcuts' }).click()
    await page.reload()
    await page.locator('a[data-row]').first().waitFor()
    await page.keyboard.press('n')
    await page.keyboard.press('/')
    expect(await page.getByRole('dialog').count()).toBe(0)
    expect(await page.evaluate(() => document.activeElement?.tagName)).toBe('BODY')
    await page.context().close()
  })
})

test('a viewer is offered nothing that changes anything', async () => {
  const page = await open('viewer')
  expect(await page.getByRole('button', { name: 'New workbook' }).count()).toBe(0)
  await page
    .getByRole('button', { name: /^More about/ })
    .first()
    .click()
  expect(await page.getByRole('menuitem').allTextContents()).toEqual(['Export as XLSX'])
  await page.context().close()
})

test('the chosen theme is there in the first bytes of the next page', async () => {
  const page = await open('estimator')
  await page.getByRole('button', { name: /your menu/ }).click()
  await page.getByRole('menuitemradio', { name: 'Dark' }).click()
  const response = await page.goto(`${siteAddress()}/workbooks`)
  expect(await response?.text()).toMatch(/<html[^>]* data-theme="dark"/)
  await page.context().close()
})

test('signing out by the menu ends the session itself', async () => {
  const page = await open('owner')
  const cookie = (await page.context().cookies()).map(({ name, value }) => `${name}=${value}`).join('; ')
  await page.getByRole('button', { name: /your menu/ }).click()
  await page.getByRole('menuitem', { name: 'Sign out' }).click()
  await page.waitForURL(/\/sign-in$/)
  const replayed = await fetch(`${siteAddress()}/api/workbooks`, { headers: { cookie } })
  expect(replayed.status).toBe(401)
  await page.context().close()
})

/** The list, signed in by a session of its own. */
async function open(role: keyof typeof demoFirm.emails, view: View = desk): Promise<Page> {
  const context = await newContext(browser, view)
  const { emails, password } = demoFirm
  const [name = '', value = ''] =
    (await sendSignInForm(siteAddress(), { email: emails[role], password })).cookie?.split('=') ?? []
  await context.addCookies([{ name, value, url: siteAddress(), httpOnly: true, sameSite: 'Lax' }])
  const page = await context.newPage()
  await page.goto(`${siteAddress()}/workbooks`)
  await page.locator('a[data-row]').first().waitFor()
  await page.waitForLoadState('networkidle')
  return page
}

async function choose(page: Page, title: string, action: string): Promise<void> {
  await page.getByRole('button', { name: `More about ${title}` }).click()
  await page.getByRole('menuitem', { name: action }).click()
  await page.getByRole('dialog').waitFor()
}

interface Violation {
  readonly id: string
  readonly impact: string
  readonly nodes: readonly { readonly html: string }[]
}

/** Nothing serious or critical by axe, and no sideways scrolling. */
async function checkPage(page: Page, what: string): Promise<void> {
  const found = (await page.evaluate(`(() => { ${axe}; return axe.run(document) })()`)) as {
    readonly violations: readonly Violation[]
  }
  const serious = found.violations
    .filter(({ impact }) => impact === 'serious' || impact === 'critical')
    .map(({ id, nodes }) => `${what}: ${id} ${nodes[0]?.html}`)
  expect(serious).toEqual([])
  expect(await page.evaluate(() => document.documentElement.scrollWidth - innerWidth)).toBeLessThanOrEqual(0)
}
