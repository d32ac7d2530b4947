// The built page, the Electron shell and the real engine under the Node of the tests, in a real window.
import { mkdirSync, mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Page } from 'playwright-core';
import { afterAll, beforeAll, beforeEach, expect, test } from 'vitest';
import { openDisplay, type Display } from '../../support/display.ts';
import { openElectron, whyNoWindow } from '../../support/electron.ts';
import { findAgain, rehearse } from '../../support/journey.ts';

const obstacle = whyNoWindow();
let display: Display;
let home: string;
beforeAll(async () => {
  home = mkdtempSync(join(tmpdir(), 'holdfast-journey-'));
  mkdirSync('test-results', { recursive: true });
  if (obstacle === null) display = await openDisplay();
});
afterAll(() => {
  display?.close();
  rmSync(home, { recursive: true, force: true, maxRetries: 10, retryDelay: 100 });
});
beforeEach((context) => context.skip(obstacle !== null, obstacle ?? ''));

async function opened<T>(what: (page: Page) => Promise<T>): Promise<T> {
  const window = await openElectron({ main: 'out-smoke/main/main-smoke.cjs', display, home });
  try {
    const result = await what(window.page);
    expect(window.complaints).toEqual([]);
    return result;
  } finally {
    // To look at when something failed.
    await window.page.screenshot({ path: 'test-results/electron-journey.png' });
    await window.close();
  }
}

test('a plan is rehearsed, and found with its answer after closing and opening again', async () => {
  const answer = await opened(rehearse);
  expect(await opened(findAgain)).toEqual(answer);
}, 150_000);
