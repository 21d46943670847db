import { defineConfig } from 'vitest/config'

export default defineConfig({
  resolve: { alias: { '@': import.meta.dirname } },
  test: {
    projects: [
      {
        extends: true,
        test: {
          name: 'unit',
          include: ['tests/lib/**/*.test.ts', 'tests/published/**/*.test.ts'],
          sequence: { groupOrder: 0 },
        },
      },
    ],
  },
})
