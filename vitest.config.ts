import { defineConfig } from 'vitest/config'
import path from 'node:path'

const alias = { '@': path.resolve(import.meta.dirname) }

export default defineConfig({
  test: {
    // Unit tests need nothing; API tests need the PostgreSQL server that `npm test` starts
    // (TEST_DATABASE_ADMIN_URL), and clone a migrated template once per file.
    projects: [
      {
        resolve: { alias },
        test: {
          name: 'unit',
          include: [
            'tests/science/**/*.test.ts',
            'tests/rules/**/*.test.ts',
            'tests/unit/**/*.test.{ts,tsx}',
          ],
        },
      },
      {
        resolve: { alias },
        test: {
          name: 'api',
          include: ['tests/api/**/*.test.ts'],
          globalSetup: ['tests/support/global-setup.ts'],
          testTimeout: 30_000,
          hookTimeout: 60_000,
          pool: 'forks',
          maxWorkers: 2,
        },
      },
    ],
  },
})
