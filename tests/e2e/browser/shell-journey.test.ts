// The built page, the browser shell and the real engine, as shipped.
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { serve, type Served } from '../../../src-main/shells/browser/server.ts';
import { EngineClient } from '../../../src-main/shells/engine-client.ts';
import { startWithNode } from '../../../src-main/shells/start-with-node.ts';
import { complaintsOf, launchChromium } from '../../support/chromium.ts';
import { findAgain, rehearse } from '../../support/journey.ts';

let folder: string;
let browser: Browser;
beforeAll(async () => {
  folder = mkdtempSync(join(tmpdir(), 'holdfast-journey-'));
  browser = await launchChromium();
});
afterAll(async () => {
  await browser?.close();
  rmSync(folder, { recursive: true, force: true, maxRetries: 10, retryDelay: 100 });
});

/** Everything from nothing to everything gone again, around what happens on the page. */
async function opened<T>(what: (page: Page) => Promise<T>): Promise<T> {
  const client = new EngineClient(startWithNode(resolve('out/main/engine.cjs')), join(folder, 'Notebook.holdfast'));
  const served: Served = await serve({ pages: resolve('out/renderer'), client, startFolder: folder });
  const page = await browser.newPage({ viewport: { width: 1440, height: 900 } });
  const complaints = complaintsOf(page);
  try {
    await page.goto(served.newAddress());
    const result = await what(page);
    expect(complaints).toEqual([]);
    return result;
  } finally {
    await page.close();
    await served.close();
    await client.stop();
  }
}

test('a plan is rehearsed, and found with its answer after closing and opening again', async () => {
  const answer = await opened(rehearse);
  expect(await opened(findAgain)).toEqual(answer);
}, 150_000);
