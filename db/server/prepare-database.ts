import { closeDatabase } from '../connection'
import { migrate } from '../migrate'
import { seedDemo } from '../seed/demo'
import { runMain, say } from './project.mjs'

/** A step of `npm start`: migrates `DATABASE_URL` as the owner, then with `--demo` seeds as the application. */
runMain(async () => {
  const ownerUrl = process.env.DATABASE_URL
  if (!ownerUrl) throw new Error('DATABASE_URL is not set')
  const applied = await migrate(ownerUrl)
  if (applied.length > 0) say(`Applied ${applied.join(', ')}`)
  try {
    if (process.argv.includes('--demo')) for (const line of await seedDemo()) say(line)
  } finally {
    await closeDatabase()
  }
})
