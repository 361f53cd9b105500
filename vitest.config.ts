import react from '@vitejs/plugin-react';
import { defineConfig } from 'vitest/config';
import { LastLineReporter } from './tests/support/last-line-reporter.ts';

export default defineConfig({
  plugins: [react()],
  test: {
    reporters: ['default', new LastLineReporter()],
    projects: [
      {
        extends: true,
        test: {
          name: 'rules',
          environment: 'node',
          include: ['tests/domain/**/*.test.ts', 'tests/published/**/*.test.ts'],
          testTimeout: 30_000,
        },
      },
      {
        extends: true,
        test: {
          name: 'screens',
          environment: 'jsdom',
          include: ['tests/screens/**/*.test.tsx'],
          setupFiles: ['tests/support/screens-setup.ts'],
        },
      },
      {
        extends: true,
        test: {
          name: 'system',
          environment: 'node',
          include: [
            'tests/api/**/*.test.ts',
            'tests/jobs/**/*.test.ts',
            'tests/platform/**/*.test.ts',
          ],
          globalSetup: ['tests/support/start-postgres.ts'],
          testTimeout: 60_000,
          hookTimeout: 60_000,
        },
      },
      {
        extends: true,
        test: {
          name: 'whole',
          environment: 'node',
          include: ['tests/architecture/**/*.test.ts', 'tests/journeys/**/*.test.ts'],
          globalSetup: ['tests/support/start-postgres.ts', 'tests/support/build-frontend.ts'],
          testTimeout: 300_000,
          hookTimeout: 300_000,
          fileParallelism: false,
        },
      },
    ],
  },
});
