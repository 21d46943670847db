import { readFileSync } from 'node:fs'
import { join } from 'node:path'
import type { Page } from 'playwright-core'
import { projectRoot } from './empty-app'
import type { RawSource } from './raw-engine'

export { launchChromium } from '../_support/chromium'

type Address = { sheet: number; row: number; col: number }
interface PageEngine {
  setCellContents(address: Address, value: number): unknown
  getCellValue(address: Address): unknown
}
/** What the scripts in the page keep on the window. */
type RawWindow = Window & {
  HyperFormula: { buildFromSheets(...args: unknown[]): PageEngine }
  raw: PageEngine
}

/** Opens a blank page with HyperFormula's own browser bundle and builds the workbook in it. */
export async function openRawPage(page: Page, source: RawSource): Promise<number> {
  const bundle = join(projectRoot, 'node_modules/hyperformula/dist/hyperformula.full.min.js')
  await page.setContent('<!doctype html><title>raw</title><p id="total"></p>')
  await page.addScriptTag({ content: readFileSync(bundle, 'utf8') })
  return page.evaluate((given) => {
    const { sheets, config, names } = given as never as RawSource
    const window = globalThis as never as RawWindow
    const started = performance.now()
    window.raw = window.HyperFormula.buildFromSheets(sheets, config, names)
    return performance.now() - started
  }, source as never)
}

/** Milliseconds of one edit in the raw page, and the number that came out. */
export interface RawEdit {
  readonly engine: number
  readonly result: number
}

/** One edit in the raw page; its result is put into the page, so that it is painted. */
export function editRawPage(page: Page, address: Address, value: number, shown: Address): Promise<RawEdit> {
  return page.evaluate(
    async ({ address, value, shown }) => {
      const { raw } = globalThis as never as RawWindow
      const started = performance.now()
      raw.setCellContents(address, value)
      const engine = performance.now() - started
      const result = Number(raw.getCellValue(shown))
      const text = document.getElementById('total')
      if (text) text.textContent = String(result)
      await new Promise((resolve) => requestAnimationFrame(() => setTimeout(resolve)))
      return { engine, result }
    },
    { address, value, shown },
  )
}
