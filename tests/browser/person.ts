import type { Browser, BrowserContext, Page } from 'playwright-core'
import { demoFirm, siteAddress } from '../_support/site'

export { launchChromium } from '../_support/chromium'

export type Role = keyof typeof demoFirm.emails

export interface View {
  readonly width: number
  readonly height: number
  readonly theme: 'light' | 'dark'
}

export const desk: View = { width: 1440, height: 900, theme: 'light' }

export function newContext(browser: Browser, view: View = desk): Promise<BrowserContext> {
  return browser.newContext({
    viewport: { width: view.width, height: view.height },
    colorScheme: view.theme,
    reducedMotion: 'reduce',
    acceptDownloads: true,
  })
}

/** Signs in by keyboard alone and ends on the list of workbooks. */
export async function signIn(page: Page, role: Role): Promise<void> {
  await page.goto(`${siteAddress()}/sign-in`)
  await page.getByLabel(/e-mail/i).waitFor()
  await page.keyboard.press('Tab')
  while (!(await page.getByLabel(/e-mail/i).evaluate((field) => field === document.activeElement)))
    await page.keyboard.press('Tab')
  await page.keyboard.type(demoFirm.emails[role])
  await page.keyboard.press('Tab')
  await page.keyboard.type(demoFirm.password)
  await page.keyboard.press('Enter')
  await page.waitForURL(/\/workbooks$/)
}

/** The workbook's screen is there, computed and saved. */
export async function untilSettled(page: Page): Promise<void> {
  const status = page.locator('[data-save="saved"]')
  await status.filter({ hasNotText: /comput/ }).waitFor({ timeout: 60_000 })
}

/** Opens the palette, types a query and presses Enter on what comes first. */
export async function command(page: Page, query: string): Promise<void> {
  await page.keyboard.press('Control+k')
  await page.getByRole('combobox').waitFor()
  await page.keyboard.type(query)
  await page.getByRole('option').first().waitFor()
  await page.keyboard.press('Enter')
}

/** A figure of the tally as a number. */
export async function figure(page: Page, name: string): Promise<number> {
  return Number(await page.locator(`[data-name="${name}"]`).getAttribute('data-value'))
}
