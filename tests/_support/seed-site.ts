import { closeDatabase } from '../../db/connection'
import { seedDemo } from '../../db/seed/demo'
import { seedOtherFirm } from './other-firm'

/** Run by `startSite`: the demo, and a second firm to test the walls between firms with. */
async function main(): Promise<void> {
  await seedDemo()
  await seedOtherFirm()
  await closeDatabase()
}

main().catch((error) => {
  console.error(error)
  process.exit(1)
})
