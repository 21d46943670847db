import { existsSync } from 'node:fs'
import { readFile } from 'node:fs/promises'
import { join } from 'node:path'
import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, expect, test } from 'vitest'
import { applyAll, fromJson, type Workbook, type WorkbookOpened } from '@/lib/workbook'
import { createEngine } from '@/lib/workbook/engine'
import { siteAddress } from '../_support/site'
import { compareRecalculated } from '../_support/spreadsheet'
import { command, figure, launchChromium, newContext, signIn, untilSettled } from './person'

/** The picture in the README is made by this test; it is renewed when it is absent or when asked for. */
const picture = join(import.meta.dirname, 'workbook.png')
const renew = process.env.RENEW_PICTURE === '1' || !existsSync(picture)

let browser: Browser
beforeAll(async () => {
  browser = await launchChromium()
})
afterAll(() => browser.close())

/** What the server keeps of a workbook: the snapshot with every later operation applied. */
async function savedWorkbook(page: Page, id: string): Promise<Workbook> {
  const answer = await page.request.get(`${siteAddress()}/api/workbooks/${id}`)
  const opened = (await answer.json()) as WorkbookOpened
  const workbook = fromJson(opened.snapshot.workbook)
  const applied = applyAll(
    workbook,
    opened.tail.map(({ op }) => op),
  )
  if (!applied.ok) throw new Error(applied.failure.text)
  return workbook
}

test('a house becomes a saved, priced, exported workbook by keyboard alone', async () => {
  const page = await (await newContext(browser)).newPage()
  const faults: string[] = []
  page.on('pageerror', (error) => faults.push(error.message))
  await signIn(page, 'estimator')

  await command(page, 'new workbook')
  await page.keyboard.type('Quill Lane growing house')
  await page.keyboard.press('Enter')
  await page.keyboard.type('gable')
  await page.keyboard.press('Enter')
  await page.keyboard.type('feet')
  await page.keyboard.press('Enter')
  await page.waitForURL(/\/workbooks\/[0-9a-f-]{36}$/)
  const id = page.url().split('/').at(-1) ?? ''
  await untilSettled(page)
  const before = {
    heat: await figure(page, 'design_heat_loss'),
    price: await figure(page, 'quotation_total'),
  }
  expect(before.heat).toBeGreaterThan(0)
  expect(before.price).toBeGreaterThan(0)

  await command(page, "frame width 30'")
  await expect.poll(() => figure(page, 'design_heat_loss')).toBeGreaterThan(before.heat)
  await untilSettled(page)
  const wider = { heat: await figure(page, 'design_heat_loss'), price: await figure(page, 'quotation_total') }
  expect(wider.price).toBeGreaterThan(before.price)

  await command(page, 'cover roof twin-wall polycarbonate, 6 mm')
  await expect.poll(() => figure(page, 'design_heat_loss')).toBeGreaterThan(wider.heat)
  expect(await figure(page, 'quotation_total')).not.toBe(wider.price)

  // In the grid: to the length, type over it; undo and redo.
  await untilSettled(page)
  const shorter = await figure(page, 'covering_area')
  await command(page, 'go frame_length')
  await page.getByRole('region', { name: /Frame cells/ }).waitFor()
  await page.keyboard.type('60')
  await page.keyboard.press('Enter')
  await expect.poll(() => figure(page, 'covering_area')).toBeGreaterThan(shorter)
  await untilSettled(page)
  const longer = {
    heat: await figure(page, 'design_heat_loss'),
    price: await figure(page, 'quotation_total'),
  }
  await page.keyboard.press('Control+z')
  await expect.poll(() => figure(page, 'design_heat_loss')).toBeLessThan(longer.heat)
  await page.keyboard.press('Control+Shift+z')
  await expect.poll(() => figure(page, 'design_heat_loss')).toBe(longer.heat)
  await untilSettled(page)

  if (renew) {
    await command(page, 'go surfaces')
    await page.getByRole('region', { name: /Surfaces cells/ }).waitFor()
    await page.waitForTimeout(1500)
    await page.screenshot({ path: picture })
  }

  await page.reload()
  await untilSettled(page)
  expect(await figure(page, 'design_heat_loss')).toBe(longer.heat)
  expect(await figure(page, 'quotation_total')).toBe(longer.price)

  const workbook = await savedWorkbook(page, id)
  const engine = createEngine(workbook)
  expect(engine.named('frame_width')).toEqual([30])
  expect(engine.named('frame_length')).toEqual([60])
  expect(engine.named('roof_covering')).toEqual(['PC-TWIN-6'])
  expect(engine.named('design_heat_loss')?.[0]).toBeCloseTo(longer.heat, 6)
  expect(engine.named('quotation_total')?.[0]).toBeCloseTo(longer.price, 6)

  const download = page.waitForEvent('download')
  await command(page, 'export')
  const file = await (await download).path()
  const compared = await compareRecalculated([
    {
      name: 'the exported workbook',
      bytes: await readFile(file),
      workbook,
      values: (address) => engine.value(address),
    },
  ])
  expect(compared.differences).toEqual([])
  expect(compared.formulas).toBeGreaterThan(100)
  expect(faults).toEqual([])
  await page.context().close()
})
