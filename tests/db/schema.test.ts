import { spawnSync } from 'node:child_process'
import { readdirSync } from 'node:fs'
import { join } from 'node:path'
import { expect, test } from 'vitest'
import { migrate } from '@/db/migrate'
import { migrations } from '@/db/migrations'
import { root } from '@/db/server/project.mjs'
import { asAdmin } from '../_support/database'

const verify = () =>
  spawnSync(process.execPath, ['--import', 'tsx', join(root, 'db/server/types.ts'), '--verify'], {
    cwd: root,
    encoding: 'utf8',
    env: { ...process.env, DATABASE_URL: process.env.TEST_OWNER_URL },
  })

test('the committed types are those of the migrated database, and a difference is found', async () => {
  const current = verify()
  expect(current.stdout + current.stderr).toContain('up-to-date')
  expect(current.status).toBe(0)
  await asAdmin('alter table workbook add column surprise text')
  expect(verify().status).toBe(1)
  await asAdmin('alter table workbook drop column surprise')
})

test('every migration file is in the index, in order, and a second run applies none', async () => {
  const files = readdirSync(join(root, 'db/migrations')).filter((name) => name !== 'index.ts')
  expect(Object.keys(migrations)).toEqual(files.map((name) => name.replace(/\.ts$/, '')).sort())
  expect(await migrate(process.env.TEST_OWNER_URL ?? '')).toEqual([])
})
