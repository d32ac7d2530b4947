import { defineConfig } from 'vitest/config';

/** Real windows: one at a time, and after everything else, so that nothing competes with them. */
const real = (groupOrder: number) =>
  ({
    environment: 'node',
    testTimeout: 60_000,
    hookTimeout: 120_000,
    fileParallelism: false,
    sequence: { groupOrder },
  }) as const;

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
      { test: { name: 'browser', include: ['tests/e2e/browser/**/*.test.ts'], ...real(1) } },
      // The built page in a real Electron window. Needs build:smoke and a runtime; skips itself without one.
      { test: { name: 'electron', include: ['tests/e2e/electron/**/*.test.ts'], ...real(2) } },
    ],
  },
});
