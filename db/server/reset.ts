import { existsSync, rmSync } from 'node:fs'
import { join } from 'node:path'
import { stopCluster } from './cluster.mjs'
import { connectionFile } from './local.mjs'
import { lockHolder, markIsAlive, withLock } from './lock.mjs'
import { databasePlace } from './place.mjs'
import { dataFolder, Obstacle, runMain, say } from './project.mjs'

/** `npm run db:reset -- --yes`: removes the local database, so that the next start makes it afresh. */
runMain(async () => {
  if (process.env.DATABASE_URL) {
    throw new Obstacle('DATABASE_URL names an outside database; this command removes the local one only.')
  }
  const folder = join(databasePlace(), 'pg')
  if (!process.argv.includes('--yes')) {
    throw new Obstacle(
      `This removes the database in ${folder} with all its data.\nTo go on: npm run db:reset -- --yes`,
    )
  }
  const running = lockHolder(join(dataFolder, 'start.lock'))
  if (running && markIsAlive(running)) throw new Obstacle('Panewright is running. End it first.')
  await withLock(join(dataFolder, 'database.lock'), async () => {
    if (existsSync(folder)) await stopCluster({ folder })
    rmSync(folder, { recursive: true, force: true })
    rmSync(connectionFile(), { force: true })
  })
  say('The local database is removed. The next start makes a new one.')
})
