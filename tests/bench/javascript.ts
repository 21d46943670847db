import { gzipSync } from 'node:zlib'
import type { Page, Response } from 'playwright-core'

/** Bytes of scripts after gzip at its strongest, whatever the server itself sends. */
export interface Scripts {
  /** Named in the page's own HTML: what a first load waits for. */
  readonly first: number
  /** Those that the window fetched later: the grid's, and the others, largest first. */
  readonly grid: readonly number[]
  readonly others: readonly number[]
  /** Of all that the window fetched, the ones that hold HyperFormula; and the same of its workers. */
  readonly engineOnWindow: number
  readonly engineInWorker: number
}

/** Class names of the grid's package, which no minifier changes. */
const gridMark = /\bgdg-|\bdvn-scroll/
const engineMark = 'buildFromSheets'

/** Opens an address and weighs the scripts that come; `settled` says when the last of them has been asked for. */
export async function weighScripts(
  page: Page,
  address: string,
  settled: () => Promise<unknown>,
): Promise<Scripts> {
  const bodies = new Map<string, Promise<Buffer>>()
  const onResponse = (response: Response) => {
    const url = response.url()
    if (new URL(url).pathname.endsWith('.js') && response.ok()) bodies.set(url, bodyOf(url))
  }
  page.context().on('response', onResponse)
  const html = (await (await page.goto(address))?.text()) ?? ''
  await settled()
  page.context().off('response', onResponse)
  const onWindow = new Set(
    await page.evaluate(() => performance.getEntriesByType('resource').map(({ name }) => name)),
  )
  const first = firstScripts(html, address)
  for (const url of first) if (!bodies.has(url)) bodies.set(url, bodyOf(url))
  const scripts = await Promise.all(
    [...bodies].map(async ([url, body]) => ({
      url,
      text: (await body).toString(),
      size: gzipSync(await body, { level: 9 }).length,
    })),
  )
  const later = scripts
    .filter(({ url }) => !first.has(url) && onWindow.has(url))
    .sort((a, b) => b.size - a.size)
  const sum = (test: (script: (typeof scripts)[number]) => boolean) =>
    scripts.filter(test).reduce((total, { size }) => total + size, 0)
  return {
    first: sum(({ url }) => first.has(url)),
    grid: later.filter(({ text }) => gridMark.test(text)).map(({ size }) => size),
    others: later.filter(({ text }) => !gridMark.test(text)).map(({ size }) => size),
    engineOnWindow: sum(
      ({ url, text }) => (onWindow.has(url) || first.has(url)) && text.includes(engineMark),
    ),
    engineInWorker: sum(
      ({ url, text }) => !onWindow.has(url) && !first.has(url) && text.includes(engineMark),
    ),
  }
}

/** Scripts and script preloads of the HTML, without those for browsers that know no modules. */
function firstScripts(html: string, address: string): Set<string> {
  const urls = new Set<string>()
  for (const [tag] of html.matchAll(/<(?:script|link)\b[^>]*>/g)) {
    const path = /\b(?:src|href)="([^"]+\.js[^"]*)"/.exec(tag)?.[1]
    const isScript = tag.startsWith('<script') || /\bas="script"/.test(tag)
    if (path && isScript && !/\bnomodule\b/i.test(tag)) urls.add(new URL(path, address).href)
  }
  return urls
}

async function bodyOf(url: string): Promise<Buffer> {
  return Buffer.from(await (await fetch(url)).arrayBuffer())
}
