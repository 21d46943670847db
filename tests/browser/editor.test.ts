import type { Browser, Page } from 'playwright-core'
import { afterAll, afterEach, beforeAll, expect, test } from 'vitest'
import { siteAddress } from '../_support/site'
import { expectNothingWrongAnywhere, openNewWorkbook, regionWithFocus, selectedCell } from './open-workbook'
import { command, figure, launchChromium, untilSettled } from './person'

let browser: Browser
let page: Page
beforeAll(async () => {
  browser = await launchChromium()
  page = await openNewWorkbook(browser, 'Sorrel Hythe trial house')
})
afterAll(() => browser.close())
// What one test leaves open is not in the way of the next.
afterEach(async () => {
  for (let tries = 0; tries < 4 && (await page.getByRole('dialog').count()) > 0; tries += 1)
    await page.keyboard.press('Escape')
})

async function press(...keys: readonly string[]): Promise<void> {
  for (const key of keys) await page.keyboard.press(key)
}

async function goTo(reference: string, address: string): Promise<void> {
  await command(page, `go ${reference}`)
  await expect.poll(() => selectedCell(page)).toMatchObject({ address })
  await expect.poll(() => regionWithFocus(page)).toBe('grid')
}

test('the open workbook and the palette are for readers of every kind, in both themes at three sizes', async () => {
  await expectNothingWrongAnywhere(page, 'workbook')
  await page.keyboard.press('Control+k')
  await page.getByRole('combobox').waitFor()
  await expectNothingWrongAnywhere(page, 'palette')
  await page.keyboard.press('Escape')
})

test('F6 goes round the parts of the screen, out of the grid and back into it', async () => {
  await goTo('frame_width', 'B3')
  const visited: (string | undefined)[] = []
  for (let step = 0; step < 4; step += 1) {
    await page.keyboard.press('F6')
    visited.push(await regionWithFocus(page))
  }
  expect(visited).toEqual(['entry-line', 'steps', 'tally', 'grid'])
  await page.keyboard.press('Shift+F6')
  expect(await regionWithFocus(page)).toBe('tally')
  await page.keyboard.press('F6')
})

test('a text from another program lands cell by cell, goes on to other cells, and is undone in one step', async () => {
  // The blank rows below the sheet.
  await goTo('frame_width', 'B3')
  for (let row = 3; row < 43; row += 1) await page.keyboard.press('ArrowDown')
  await page.evaluate(() => navigator.clipboard.writeText('12\t"two\nlines"\r\n7\t\r\n'))
  await page.keyboard.press('Control+v')
  await expect.poll(() => selectedCell(page)).toEqual({ address: 'B43', text: '12' })
  await page.keyboard.press('Control+c')
  await press('ArrowDown', 'ArrowDown', 'ArrowDown')
  await page.keyboard.press('Control+v')
  await expect.poll(() => selectedCell(page)).toEqual({ address: 'B46', text: '12' })
  await press('ArrowRight')
  expect((await selectedCell(page)).text.replace(/\s/, ' ')).toBe('two lines')
  await press('ArrowDown', 'ArrowLeft')
  expect(await selectedCell(page)).toEqual({ address: 'B47', text: '7' })
  // The second paste goes whole, the rows that it made with it; the first stays, until it is undone too.
  await page.keyboard.press('Control+z')
  await expect.poll(async () => (await selectedCell(page)).text).toBe('')
  await goTo('frame_width', 'B3')
  for (let row = 3; row < 44; row += 1) await page.keyboard.press('ArrowDown')
  await expect.poll(() => selectedCell(page)).toEqual({ address: 'B44', text: '7' })
  await page.keyboard.press('Control+z')
  await expect.poll(async () => (await selectedCell(page)).text).toBe('')
  await untilSettled(page)
})

test('rows that the palette inserts push names along, and removing them brings all back', async () => {
  await untilSettled(page)
  const heat = await figure(page, 'design_heat_loss')
  await goTo('frame_width', 'B3')
  await command(page, 'insert rows above')
  await goTo('frame_width', 'B4')
  await untilSettled(page)
  expect(await figure(page, 'design_heat_loss')).toBe(heat)
  await press('ArrowUp')
  expect(await selectedCell(page)).toEqual({ address: 'B3', text: '' })
  await command(page, 'remove rows')
  await goTo('frame_width', 'B3')
  await untilSettled(page)
  expect(await figure(page, 'design_heat_loss')).toBe(heat)
})

test('what cannot be taken stays in the cell with what was expected, and Esc brings back what was there', async () => {
  await goTo('frame_width', 'B3')
  const before = await selectedCell(page)
  await page.keyboard.type('wide enough')
  await page.keyboard.press('Enter')
  await page
    .getByRole('alert')
    .filter({ hasText: /Expected a length/ })
    .waitFor()
  expect(await page.locator('textarea[aria-invalid]').inputValue()).toBe('wide enough')
  await page.keyboard.press('Escape')
  expect(await selectedCell(page)).toEqual(before)
})

test('a typed quantity is read back beside the entry, and whose change it was is said', async () => {
  await goTo('frame_width', 'B3')
  const line = page.getByRole('region', { name: 'Entry line' })
  await page.keyboard.type('12\' 6 1/2"')
  await line.getByText('= 3.823 m').waitFor()
  await page.keyboard.press('Enter')
  await press('ArrowUp')
  await line.getByText('changed by you, just now').waitFor()
  await page.keyboard.press('Control+z')
  await untilSettled(page)
})

test('a result is said in words, with its unit and its source', async () => {
  await goTo('heater_output', 'B15').catch(() => undefined)
  const line = page.getByRole('region', { name: 'Entry line' })
  await line.getByText(/design heat loss × \(1 \+ heater allowance\)/i).waitFor()
  await line.getByText(/Btu\/h · common practice, no source/).waitFor()
})

test('what is typed without a network is kept through closing the page, and saved when it is opened again', async () => {
  await goTo('frame_length', 'B4')
  await untilSettled(page)
  await page.context().setOffline(true)
  await page.keyboard.type('77')
  await page.keyboard.press('Enter')
  await page.locator('[data-save="offline"]').filter({ hasText: '1 change kept here' }).waitFor()
  const address = page.url()
  page.once('dialog', (dialog) => void dialog.accept())
  await page.goto('about:blank')
  await page.context().setOffline(false)
  await page.goto(address)
  await untilSettled(page)
  await goTo('frame_length', 'B4')
  expect((await selectedCell(page)).text).toBe('77\' 0"')
  const id = address.split('/').at(-1)
  const log = await page.request.get(`${siteAddress()}/api/workbooks/${id}/operations?after=0`)
  expect(await log.text()).toContain('"input":77')
})
