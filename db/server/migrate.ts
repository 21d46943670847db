import { migrate } from '../migrate'
import { openDatabase } from './local.mjs'
import { runMain, say } from './project.mjs'

/** `npm run db:migrate` */
runMain(async () => {
  const database = await openDatabase()
  try {
    const applied = await migrate(database.ownerUrl)
    say(applied.length ? `Applied ${applied.join(', ')}` : 'The database is up to date')
  } finally {
    await database.release()
  }
})
