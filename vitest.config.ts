import { defineConfig } from 'vitest/config';

const real = { environment: 'node', testTimeout: 60_000, hookTimeout: 120_000, fileParallelism: false } as const;

export default defineConfig({
  test: {
    projects: [
      {
        test: {
          name: 'unit',
          environment: 'node',
          testTimeout: 60_000,
          include: ['tests/{analytic,published,reference,property,faults,engine,cli}/**/*.test.ts'],
        },
      },
      // The built page in a real Chromium, served by the browser shell. Needs a build.
      { test: { name: 'browser', include: ['tests/e2e/browser/**/*.test.ts'], ...real } },
      // The built page in a real Electron window. Needs build:smoke and a display.
      { test: { name: 'electron', include: ['tests/e2e/electron/**/*.test.ts'], ...real } },
    ],
  },
});
