import { defineConfig } from 'vitest/config';

export default defineConfig({
  test: {
    setupFiles: ['tests/support/setup.ts'],
    projects: [
      {
        extends: true,
        test: {
          name: 'unit',
          include: [
            'tests/core/**/*.test.ts',
            'tests/reference/**/*.test.ts',
            'tests/contract/**/*.test.ts',
            'tests/components/**/*.test.{ts,tsx}',
            'tests/scripts/**/*.test.ts',
            'tests/memo/**/*.test.ts',
          ],
          environment: 'node',
        },
      },
      {
        extends: true,
        test: {
          name: 'db',
          include: ['tests/db/**/*.test.ts', 'tests/server/**/*.test.ts'],
          environment: 'node',
          globalSetup: ['tests/support/database-setup.ts'],
          testTimeout: 30_000,
        },
      },
    ],
  },
});
