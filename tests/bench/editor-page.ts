import type { BrowserContext, Page } from 'playwright-core'
import { cellName, type Workbook } from '@/lib/workbook'
import type { BenchApp } from './bench-app'
import type { Place } from './subject'

/** The open workbook, used with the keyboard as a person would. */

export function workbookAddress(app: BenchApp, id: string): string {
  return `${app.address}/workbooks/${id}`
}

export async function openEditor(context: BrowserContext, app: BenchApp, id: string): Promise<Page> {
  const page = await context.newPage()
  await page.goto(workbookAddress(app, id))
  await untilReady(page)
  return page
}

/** Everything is saved and computed. */
export async function untilReady(page: Page): Promise<void> {
  const status = page.locator('[data-save="saved"]')
  await status.waitFor({ timeout: 60_000 })
  await status.filter({ hasNotText: /comput/ }).waitFor({ timeout: 60_000 })
}

/** Goes to a cell by the palette, which opens from anywhere; the grid has the focus then. */
export async function goToCell(page: Page, workbook: Workbook, place: Place): Promise<void> {
  const title = workbook.sheets.find(({ id }) => id === place.sheet)?.name ?? ''
  const name = cellName(place.row, place.column)
  await page.keyboard.press('Control+k')
  await page.getByRole('combobox', { name: 'Find a command, a sheet or a value' }).waitFor()
  await page.keyboard.type(`'${title}'!${name}`)
  await page.keyboard.press('Enter')
  await page.getByRole('region', { name: `${title} cells` }).waitFor()
  await page.getByLabel(`Input of ${name}`, { exact: true }).waitFor()
  await focusGrid(page)
}

/** F6 goes round the parts of the screen, until the cells have the focus. */
async function focusGrid(page: Page): Promise<void> {
  const focused = page.locator('[data-region="grid"]:focus-within')
  for (let tries = 0; tries < 8; tries++) {
    await page.waitForTimeout(300)
    if ((await focused.count()) > 0) return
    await page.keyboard.press('F6')
  }
  throw new Error('the grid cannot be reached with F6')
}

/** Types a number over the selected cell; Enter is for the caller to press. */
export async function typeNumber(page: Page, number: number): Promise<void> {
  await page.keyboard.type(String(number))
}

/** Waits until the edit is saved, then goes back up to the cell that Enter left. */
export async function backToCell(page: Page): Promise<void> {
  await untilReady(page)
  await page.waitForTimeout(300)
  await page.keyboard.press('ArrowUp')
}
