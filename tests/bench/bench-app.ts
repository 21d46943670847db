import { spawnSync } from 'node:child_process'
import { join } from 'node:path'
import type { Browser, BrowserContext } from 'playwright-core'
import demo from '@/db/seed/demo.json'
import { ensureBuilt } from '@/db/server/build.mjs'
import { freePort } from '@/db/server/ports.mjs'
import { ensureSecrets } from '@/db/server/secrets.mjs'
import { serve } from '@/db/server/serve.mjs'
import { projectRoot } from './empty-app'
import { startThrowawayDatabase } from './throwaway-database'

/** The product as `npm start` runs it, built if need be, on a port and a database of the benchmark's own. */
export interface BenchApp {
  readonly address: string
  stop(): Promise<void>
}

const firstPort = 47_100

export async function startBenchApp(name: string): Promise<BenchApp> {
  await ensureBuilt()
  const database = await startThrowawayDatabase(name)
  try {
    const env = { ...process.env, DATABASE_URL: database.ownerUrl, APP_DATABASE_URL: database.appUrl }
    const args = ['--import', 'tsx', join(projectRoot, 'db/server/prepare-database.ts'), '--demo']
    const prepared = spawnSync(process.execPath, args, { cwd: projectRoot, env, encoding: 'utf8' })
    if (prepared.status !== 0) throw new Error(`the demo could not be seeded: ${prepared.stderr}`)
    const server = await serve({
      port: await freePort(firstPort),
      env: { APP_DATABASE_URL: database.appUrl, ...ensureSecrets() },
      output: 'ignore',
    })
    return {
      address: server.address,
      stop: async () => {
        await server.stop()
        await database.stop()
      },
    }
  } catch (error) {
    await database.stop()
    throw error
  }
}

/** Signs in as the demo's estimator, by the form, in a browser context of its own. */
export async function signIn(browser: Browser, app: BenchApp): Promise<BrowserContext> {
  const context = await browser.newContext({ viewport: { width: 1440, height: 900 } })
  const page = await context.newPage()
  const estimator = demo.members.find(({ role }) => role === 'estimator')
  await page.goto(`${app.address}/sign-in`)
  await page.getByLabel('E-mail').fill(estimator?.email ?? '')
  await page.getByLabel('Password').fill(demo.password)
  await page.getByRole('button', { name: 'Sign in' }).click()
  await page.waitForURL(`${app.address}/workbooks`)
  await page.close()
  return context
}
