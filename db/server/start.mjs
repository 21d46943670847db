import { join } from 'node:path'
import { ensureBuilt } from './build.mjs'
import { endChildren, runChild } from './children.mjs'
import { openDatabase } from './local.mjs'
import { lockHolder, processMark, takeLock } from './lock.mjs'
import { freePort } from './ports.mjs'
import { ensureDependencies, ensurePackages, loadEnvironment } from './prepare.mjs'
import { ensureDataFolder, Obstacle, readJson, root, runMain, say, writePrivateJson } from './project.mjs'
import { endLeftover } from './running.mjs'
import { ensureSecrets } from './secrets.mjs'
import { serve } from './serve.mjs'

/** `npm start`, and with `--dev` `npm run dev`: from a bare checkout to an address to open. */
runMain(async () => {
  const dev = process.argv.includes('--dev')
  loadEnvironment()
  const runFile = join(ensureDataFolder(), 'running.json')
  const unlock = await takeLock(join(ensureDataFolder(), 'start.lock'))
  if (!unlock) {
    const pid = lockHolder(join(ensureDataFolder(), 'start.lock'))?.split('-')[0]
    const where = readJson(runFile)?.address
    throw new Obstacle(
      `Panewright is running already (process ${pid}${where ? `, ${where}` : ''}). End that one first.`,
    )
  }
  /** In reverse order of starting. @type {(() => Promise<void> | void)[]} */
  const undo = [unlock]
  const end = endOnce(undo)
  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.on(signal, () => void end(0))
  try {
    await endLeftover(runFile)
    await ensureDependencies()
    if (!process.env.DATABASE_URL) await ensurePackages(['postgresql'])
    const opening = openDatabase()
    undo.unshift(() =>
      opening.then(
        (opened) => opened.release(),
        () => {},
      ),
    )
    const database = await opening
    const environment = await prepareDatabase(database)
    if (!dev) await ensureBuilt()
    const port = await freePort(wantedPort())
    const server = await serve({ port, dev, env: { ...environment, ...ensureSecrets() } })
    undo.unshift(server.stop)
    writePrivateJson(runFile, { address: server.address, web: processMark(server.child.pid) })
    say(`\nPanewright is at ${server.address}\n${demoLines(database.outside)}\nCtrl-C ends it.\n`)
    void server.ended.then(() => end(1))
  } catch (error) {
    await end(1, error)
  }
})

/** Migrates and seeds in a process of its own: this one runs before TypeScript can. */
async function prepareDatabase(/** @type {import('./local.mjs').OpenDatabase} */ database) {
  const { outside, ownerUrl, appUrl } = database
  const application = outside && !process.env.APP_DATABASE_URL ? undefined : appUrl
  const env = { DATABASE_URL: ownerUrl, ...(application ? { APP_DATABASE_URL: application } : {}) }
  const args = [
    '--import',
    'tsx',
    join(root, 'db/server/prepare-database.ts'),
    ...(seedsDemo(outside) ? ['--demo'] : []),
  ]
  const status = await runChild(process.execPath, args, env)
  if (status !== 0) throw new Obstacle('The database could not be prepared. The reason is above.')
  return application ? { APP_DATABASE_URL: application } : { DATABASE_URL: ownerUrl }
}

/** An outside database gets the demo only when asked for: its password is in the source. */
function seedsDemo(/** @type {boolean} */ outside) {
  return outside ? process.env.PANEWRIGHT_DEMO === '1' : process.env.PANEWRIGHT_DEMO !== '0'
}

function demoLines(/** @type {boolean} */ outside) {
  if (!seedsDemo(outside)) return ''
  const { password, members } = readJson(join(root, 'db/seed/demo.json'))
  const width = Math.max(...members.map((/** @type {{ email: string }} */ member) => member.email.length))
  const lines = members.map(
    (/** @type {{ email: string, role: string }} */ { email, role }) => `  ${email.padEnd(width)}  ${role}`,
  )
  return `\nDemo sign-ins (password ${password}):\n${lines.join('\n')}\n`
}

function wantedPort() {
  const text = process.env.PORT ?? '3000'
  const port = Number(text)
  if (Number.isInteger(port) && port > 0 && port < 65_536) return port
  throw new Obstacle(`PORT is "${text}"; a whole number from 1 to 65535 is expected.`)
}

/**
 * Gives a function that ends everything once, whatever calls it and how often: a signal, a server that ended, or a
 * step that failed because a signal ended its child.
 */
function endOnce(/** @type {(() => Promise<void> | void)[]} */ undo) {
  /** @type {Promise<void> | undefined} */
  let ending
  return (/** @type {number} */ status, /** @type {unknown} */ reason = undefined) => {
    ending ??= (async () => {
      endChildren()
      for (const step of undo.splice(0)) await step()
      if (reason instanceof Obstacle) say(reason.message)
      else if (reason !== undefined) console.error(reason)
      process.exit(status)
    })()
    return ending
  }
}
