import { defineConfig } from 'vitest/config';

const SERVICES = 'tests/support/services.setup.ts';
const WITH_SERVICES = ['tests/server/**', 'tests/db/**'];
const WITH_WEB = ['tests/browser/**', 'tests/api/**'];
const files = (folders: string[]) => folders.map((folder) => `${folder}/*.test.{ts,tsx}`);

export default defineConfig({
  resolve: { alias: { '@': import.meta.dirname } },
  test: {
    testTimeout: 20_000,
    hookTimeout: 60_000,
    projects: [
      {
        extends: true,
        test: {
          name: 'unit',
          include: ['tests/**/*.test.{ts,tsx}'],
          exclude: [...WITH_SERVICES, ...WITH_WEB],
        },
      },
      {
        extends: true,
        test: { name: 'server', include: files(WITH_SERVICES), globalSetup: [SERVICES] },
      },
      {
        extends: true,
        test: {
          name: 'browser',
          include: files(WITH_WEB),
          globalSetup: [SERVICES, 'tests/support/web.setup.ts'],
          testTimeout: 60_000,
          hookTimeout: 120_000,
        },
      },
    ],
  },
});
