import { defineConfig } from 'vitest/config'

const slow = ['tests/**/*.sheet.test.ts', '**/node_modules/**']

/** Four kinds of tests, in this order; `--project unit` alone starts no database, browser or office program. */
export default defineConfig({
  resolve: { alias: { '@': import.meta.dirname } },
  test: {
    reporters: ['default', './tests/_support/reporter.ts'],
    projects: [
      {
        extends: true,
        test: {
          name: 'unit',
          include: ['tests/{lib,app,published,bench,project}/**/*.test.ts'],
          exclude: slow,
          sequence: { groupOrder: 0 },
        },
      },
      {
        extends: true,
        test: {
          name: 'db',
          include: ['tests/db/**/*.test.ts'],
          exclude: slow,
          globalSetup: ['tests/_support/database-global.ts'],
          setupFiles: ['tests/_support/database-file.ts'],
          pool: 'forks',
          maxWorkers: 2,
          testTimeout: 90_000,
          hookTimeout: 60_000,
          sequence: { groupOrder: 1 },
        },
      },
      {
        extends: true,
        test: {
          name: 'sheet',
          include: ['tests/**/*.sheet.test.ts'],
          testTimeout: 300_000,
          maxWorkers: 2,
          sequence: { groupOrder: 2 },
        },
      },
      {
        extends: true,
        test: {
          name: 'browser',
          include: ['tests/browser/**/*.test.ts'],
          exclude: slow,
          globalSetup: ['tests/_support/browser-global.ts'],
          fileParallelism: false,
          testTimeout: 120_000,
          hookTimeout: 120_000,
          sequence: { groupOrder: 3 },
        },
      },
    ],
  },
})
