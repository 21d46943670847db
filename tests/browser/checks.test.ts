import type { Browser, Page } from 'playwright-core'
import { afterAll, afterEach, beforeAll, expect, test } from 'vitest'
import { siteAddress } from '../_support/site'
import { expectNothingWrongAnywhere, openNewWorkbook, regionWithFocus, selectedCell } from './open-workbook'
import { command, figure, launchChromium, untilSettled } from './person'

let browser: Browser
let page: Page
beforeAll(async () => {
  browser = await launchChromium()
  page = await openNewWorkbook(browser, 'Teasel Bank trial house')
})
afterAll(() => browser.close())
// What one test leaves open is not in the way of the next.
afterEach(async () => {
  for (let tries = 0; tries < 4 && (await page.getByRole('dialog').count()) > 0; tries += 1)
    await page.keyboard.press('Escape')
})

test('things to look at are listed with the cell to go to, and Enter goes there', async () => {
  expect(await page.locator('[data-step="job"]').textContent()).not.toContain('!')
  await page.keyboard.press('Alt+Shift+L')
  const dialog = page.getByRole('dialog', { name: 'Things to look at' })
  const light = dialog.getByRole('button', { name: /less light than the crop asks for/ })
  await light.waitFor()
  await expectNothingWrongAnywhere(page, 'things to look at')
  while (!(await light.evaluate((row) => row === document.activeElement)))
    await page.keyboard.press('ArrowDown')
  await page.keyboard.press('Enter')
  await dialog.waitFor({ state: 'detached' })
  await expect.poll(() => page.locator('[aria-current="step"]').textContent()).toMatch(/Light/)
  await expect.poll(() => regionWithFocus(page)).toBe('grid')
})

test('loads and spans stand under a caution', async () => {
  await command(page, 'go weather')
  await page.getByText(/the local code and a licensed engineer decide\. Never step on a sheet/).waitFor()
  await command(page, 'go light')
  await page.getByRole('heading', { name: 'Light' }).waitFor()
  expect(await page.getByText(/Never step on a sheet/).count()).toBe(0)
})

test('every covering is tried, and the one that is chosen is set in one step', async () => {
  await untilSettled(page)
  const before = await figure(page, 'quotation_total')
  await command(page, 'try every covering')
  await page.keyboard.type('whole')
  await page.keyboard.press('Enter')
  const dialog = page.getByRole('dialog', { name: 'Try every covering' })
  await dialog.getByText(/^All \d+ tried/).waitFor({ timeout: 60_000 })
  await dialog.locator('svg circle').first().waitFor()
  await expectNothingWrongAnywhere(page, 'try every covering')
  const rows = await dialog
    .locator('tbody tr')
    .evaluateAll((all) =>
      all.map((row) => [...row.querySelectorAll('td')].map((cell) => cell.textContent ?? '')),
    )
  const prices = rows
    .map(([, price = '']) => Number(price.replace(/[^\d.]/g, '')))
    .filter((price) => price > 0)
  expect(prices.length).toBeGreaterThan(10)
  expect(prices).toEqual([...prices].sort((a, b) => a - b))
  expect(await dialog.locator('svg circle').count()).toBe(prices.length)

  await dialog.locator('[data-outcome]').first().focus()
  await page.keyboard.press('End')
  await page.keyboard.press('ArrowUp')
  const code = await page.evaluate(() => (document.activeElement as HTMLElement).dataset.outcome)
  await page.keyboard.press('Enter')
  await dialog.waitFor({ state: 'detached' })
  await untilSettled(page)
  await expect.poll(() => figure(page, 'quotation_total')).not.toBe(before)
  const id = page.url().split('/').at(-1)
  const log = await page.request.get(`${siteAddress()}/api/workbooks/${id}/operations?after=0`)
  expect(await log.text()).toContain(`"input":"${code}"`)
  await page.keyboard.press('Control+z')
  await expect.poll(() => figure(page, 'quotation_total')).toBe(before)
})

test('trying can be stopped, and then nothing has changed', async () => {
  await untilSettled(page)
  const before = await figure(page, 'quotation_total')
  await command(page, 'try every covering')
  await page.keyboard.type('roof')
  await page.keyboard.press('Enter')
  const dialog = page.getByRole('dialog', { name: 'Try every covering' })
  await dialog.getByRole('button', { name: 'Stop' }).click()
  await dialog.getByText(/were tried/).waitFor()
  await page.keyboard.press('Escape')
  await untilSettled(page)
  expect(await figure(page, 'quotation_total')).toBe(before)
})

test('an input is found for a result, shown with what it changes, and set only then', async () => {
  await untilSettled(page)
  const before = await figure(page, 'design_heat_loss')
  const target = Math.round(before / 1000) * 1000 + 5000
  await solve(`${target}`)
  const dialog = page.getByRole('dialog', { name: 'Solve for' })
  await dialog.getByText(/→/).first().waitFor({ timeout: 30_000 })
  await expectNothingWrongAnywhere(page, 'solve for')
  expect(await figure(page, 'design_heat_loss')).toBe(before)
  await dialog.getByRole('button', { name: /^Set / }).press('Enter')
  await dialog.waitFor({ state: 'detached' })
  await expect.poll(async () => Math.abs((await figure(page, 'design_heat_loss')) - target)).toBeLessThan(1)
  await page.keyboard.press('Control+z')
  await expect.poll(() => figure(page, 'design_heat_loss')).toBe(before)
})

test('a result that cannot be reached is refused in words', async () => {
  await untilSettled(page)
  await solve('1')
  const dialog = page.getByRole('dialog', { name: 'Solve for' })
  await dialog.locator('.text-ember').waitFor({ timeout: 30_000 })
  expect(await dialog.getByRole('button', { name: /^Set / }).count()).toBe(0)
  await page.keyboard.press('Escape')
})

test('converting the units changes headings, tally and entry line at once, and one undo brings all back', async () => {
  await command(page, 'go frame_width')
  await untilSettled(page)
  const us = await figure(page, 'design_heat_loss')
  const tally = page.getByRole('region', { name: 'Tally' })
  const text = (await selectedCell(page)).text
  await command(page, 'convert to metric')
  await tally.getByText('W', { exact: true }).waitFor()
  await untilSettled(page)
  // 1 Btu/h is 0.29307107 W (NIST SP 811, appendix B).
  expect((await figure(page, 'design_heat_loss')) / us).toBeCloseTo(0.29307107, 6)
  expect((await selectedCell(page)).text).not.toBe(text)
  expect(await tally.getByText('▲').count()).toBe(0)
  await page.keyboard.press('Control+z')
  await tally.getByText('Btu/h', { exact: true }).waitFor()
  await untilSettled(page)
  expect(await figure(page, 'design_heat_loss')).toBeCloseTo(us, 6)
  expect((await selectedCell(page)).text).toBe(text)
})

/** Asks for a design heat loss by changing the length of the frame. */
async function solve(target: string): Promise<void> {
  await command(page, 'solve for')
  await page.keyboard.type('design heat loss')
  await page.keyboard.press('Enter')
  await page.keyboard.type(target)
  await page.keyboard.press('Enter')
  await page.keyboard.type('frame length')
  await page.keyboard.press('Enter')
}
