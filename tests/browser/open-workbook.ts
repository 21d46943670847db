import { readFileSync } from 'node:fs'
import { join } from 'node:path'
import type { Browser, Page } from 'playwright-core'
import { expect } from 'vitest'
import { sendSignInForm } from '../_support/sign-in-form'
import { demoFirm, siteAddress } from '../_support/site'
import { desk, newContext, type Role, untilSettled, type View } from './person'

/** A workbook of the test's own, open, computed and with the keyboard in the grid; signed in by a session of its own. */
export async function openNewWorkbook(
  browser: Browser,
  title: string,
  { role = 'estimator', view = desk }: { readonly role?: Role; readonly view?: View } = {},
): Promise<Page> {
  const context = await newContext(browser, view)
  const { emails, password } = demoFirm
  const [name = '', value = ''] =
    (await sendSignInForm(siteAddress(), { email: emails[role], password })).cookie?.split('=') ?? []
  await context.addCookies([{ name, value, url: siteAddress(), httpOnly: true, sameSite: 'Lax' }])
  await context.grantPermissions(['clipboard-read', 'clipboard-write'], { origin: siteAddress() })
  const page = await context.newPage()
  page.setDefaultTimeout(20_000)
  await page.goto(`${siteAddress()}/workbooks`)
  const id = await page.evaluate(async (named) => {
    const response = await fetch('/api/workbooks', {
      method: 'POST',
      headers: { 'content-type': 'application/json' },
      body: JSON.stringify({ title: named, frame: 'gable', system: 'us' }),
    })
    return ((await response.json()) as { id: string }).id
  }, title)
  await page.goto(`${siteAddress()}/workbooks/${id}`)
  await page.locator('[data-region="grid"] canvas').first().waitFor()
  await untilSettled(page)
  return page
}

const axe = readFileSync(join(process.cwd(), 'node_modules/axe-core/axe.min.js'), 'utf8')

interface Violation {
  readonly id: string
  readonly nodes: readonly { readonly html: string; readonly failureSummary: string }[]
}

/** Nothing that axe finds wrong, and nothing wider than the screen. */
export async function expectNothingWrong(page: Page, what: string): Promise<void> {
  const { violations } = (await page.evaluate(
    `(async () => { if (!window.axe) { ${axe} }; return window.axe.run(document, { resultTypes: ['violations'] }) })()`,
  )) as { readonly violations: readonly Violation[] }
  const words = violations.map(({ id, nodes }) => `${id}: ${nodes[0]?.html} ${nodes[0]?.failureSummary}`)
  expect(words, what).toEqual([])
  // The grid follows a change of the window a moment later.
  await expect
    .poll(() => page.evaluate(() => document.documentElement.scrollWidth - innerWidth), { message: what })
    .toBeLessThanOrEqual(0)
}

export const views: readonly View[] = (['light', 'dark'] as const).flatMap((theme) => [
  { width: 1440, height: 900, theme },
  { width: 1024, height: 768, theme },
  { width: 390, height: 844, theme },
])

/** The same in both themes at three sizes, on a page as it stands. */
export async function expectNothingWrongAnywhere(page: Page, what: string): Promise<void> {
  try {
    for (const view of views) {
      await showAs(page, view)
      await expectNothingWrong(page, `${what} at ${view.width}, ${view.theme}`)
    }
  } finally {
    await showAs(page, desk)
  }
}

/** Colours and widths have settled once two frames were drawn. */
async function showAs(page: Page, { width, height, theme }: View): Promise<void> {
  await page.setViewportSize({ width, height })
  await page.emulateMedia({ colorScheme: theme, reducedMotion: 'reduce' })
  await page.evaluate(() => new Promise((done) => requestAnimationFrame(() => requestAnimationFrame(done))))
}

/** The part of the screen that has the keyboard. */
export function regionWithFocus(page: Page): Promise<string | undefined> {
  return page.evaluate(
    () => document.activeElement?.closest<HTMLElement>('[data-region]')?.dataset.region ?? undefined,
  )
}

/** What the entry line shows of the selected cell. */
export async function selectedCell(page: Page): Promise<{ readonly address: string; readonly text: string }> {
  const input = page.getByLabel(/^Input of /)
  const label = (await input.getAttribute('aria-label')) ?? ''
  return { address: label.replace('Input of ', ''), text: await input.inputValue() }
}
