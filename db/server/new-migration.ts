import { readFileSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { migrations } from '../migrations'
import { Obstacle, root, runMain, say } from './project.mjs'

/** `npm run db:new -- name_of_the_change`: an empty migration with the next number, entered in the index. */
runMain(() => {
  const [name] = process.argv.slice(2)
  if (!name || !/^[a-z][a-z0-9_]*$/.test(name)) {
    throw new Obstacle('A name such as add_suppliers is expected: npm run db:new -- add_suppliers')
  }
  const number = String(Object.keys(migrations).length + 1).padStart(3, '0')
  const key = `${number}_${name}`
  const folder = join(root, 'db/migrations')
  writeFileSync(
    join(folder, `${key}.ts`),
    "import { type Kysely, sql } from 'kysely'\n\n" +
      '/** */\nexport async function up(db: Kysely<unknown>): Promise<void> {\n  await sql`select 1`.execute(db)\n}\n',
    { flag: 'wx' },
  )
  const index = join(folder, 'index.ts')
  const text = readFileSync(index, 'utf8')
    .replace(
      /(import \* as m\d+ from [^\n]+\n)(?!import \* as m)/,
      `$1import * as m${number} from './${key}'\n`,
    )
    .replace(
      /\n}\n\nexport const migrationProvider/,
      `\n  '${key}': m${number},\n}\n\nexport const migrationProvider`,
    )
  writeFileSync(index, text)
  say(`Wrote db/migrations/${key}.ts. Then: npm run db:migrate && npm run db:types`)
})
