import { spawnSync } from 'node:child_process'
import { join } from 'node:path'
import { openDatabase } from './local.mjs'
import { root, runMain } from './project.mjs'

/** `npm run db:types`: writes db/schema.ts from the migrated database; `--verify` only compares. */
runMain(async () => {
  const database = await openDatabase()
  try {
    process.exitCode = generateTypes(database.ownerUrl, process.argv.includes('--verify'))
  } finally {
    await database.release()
  }
})

function generateTypes(url: string, verify: boolean): number {
  const out = join(root, 'db/schema.ts')
  const args = ['--dialect', 'postgres', '--out-file', out, '--date-parser', 'string']
  args.push('--exclude-pattern', 'kysely_*', ...(verify ? ['--verify'] : []))
  const program = join(root, 'node_modules/kysely-codegen/dist/cli/bin.js')
  // By environment: a password on the command line is there for every user of the machine to read.
  return (
    spawnSync(process.execPath, [program, ...args], {
      stdio: 'inherit',
      cwd: root,
      env: { ...process.env, DATABASE_URL: url },
    }).status ?? 1
  )
}
