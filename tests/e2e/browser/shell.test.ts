// The browser shell with a real Chromium, a page that holds only the bridge, and a stand-in engine.
import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { serve, type Served } from '../../../src-main/shells/browser/server.ts';
import { EngineClient } from '../../../src-main/shells/engine-client.ts';
import { startWithNode } from '../../../src-main/shells/start-with-node.ts';
import { buildBridgePage } from '../../support/bridge-page.ts';
import { complaintsOf, launchChromium } from '../../support/chromium.ts';

let client: EngineClient;
let pages: string;
let folder: string;
let served: Served;
let browser: Browser;
let page: Page;
let complaints: string[];

/** Requests that only the stand-in engine knows go through the same door. */
const ask = (name: string, question: unknown, on = page) =>
  on.evaluate(([name, question]) => window.bridge.ask(name as 'engine about', question as never), [
    name,
    question,
  ] as const);

beforeAll(async () => {
  folder = mkdtempSync(join(tmpdir(), 'holdfast-start-'));
  mkdirSync(join(folder, 'cells'));
  writeFileSync(join(folder, 'a.holdfast'), '');
  pages = await buildBridgePage();
  client = new EngineClient(startWithNode(resolve('tests/support/stand-in-engine.cjs')), '/a.holdfast');
  served = await serve({ pages, client, startFolder: folder });
  browser = await launchChromium();
  page = await browser.newPage();
  complaints = complaintsOf(page);
  await page.goto(served.newAddress());
  await ask('echo', {});
});
afterAll(async () => {
  await browser?.close();
  await served?.close();
  await client?.stop();
  rmSync(folder, { recursive: true });
});

describe('a page in the browser shell', () => {
  test('carries arrays, bytes and NaN to the engine and back', async () => {
    const kinds = await page.evaluate(async () => {
      const question = { trace: Float64Array.of(0.1, NaN), bytes: Uint8Array.of(0, 255), reach: NaN };
      const answer = await window.bridge.ask('echo' as 'engine about', question as never);
      if (!answer.ok) throw new Error('refused');
      const back = answer.value as unknown as typeof question;
      return [back.trace instanceof Float64Array, [...back.trace], back.bytes instanceof Uint8Array, [...back.bytes]];
    });
    expect(kinds).toEqual([true, [0.1, NaN], true, [0, 255]]);
  });

  test('gets late answers, more of them than a browser has connections, and others in between', async () => {
    const late = Promise.all(Array.from({ length: 12 }, () => ask('late', {})));
    expect(await ask('echo', 'quick')).toEqual({ ok: true, value: 'quick' });
    expect(await late).toEqual(Array.from({ length: 12 }, () => ({ ok: true, value: 'late' })));
  });

  test('hears engine events, and of a restart', async () => {
    await ask('say', { reason: 'test' });
    await page.waitForFunction(() => window.events.length === 1);
    const died = await ask('die', {});
    expect(died).toMatchObject({ ok: false, refusals: [{ code: 'engine-stopped' }] });
    await page.waitForFunction(() => window.events.length === 2);
    expect(await page.evaluate(() => window.events)).toEqual([
      { event: 'worker restarted', reason: 'test' },
      { event: 'engine restarted', reason: expect.stringContaining('exit code 3') as string },
    ]);
  });

  test('lists and names notebooks below the start folder only', async () => {
    expect(await page.evaluate(() => window.bridge.listFolder(''))).toEqual({
      ok: true,
      value: { folder: '', folders: ['cells'], files: ['a.holdfast'] },
    });
    expect(await ask('notebook open', { path: 'a.holdfast' })).toEqual({
      ok: true,
      value: { path: join(folder, 'a.holdfast') },
    });
    expect(await ask('notebook create', { path: '../b' })).toMatchObject({
      refusals: [{ code: 'file-outside-folder' }],
    });
    expect(await page.evaluate(() => window.bridge.chooseNotebook('open', ''))).toBeNull();
  });

  test('keeps no secret in its address, and goes on after a reload', async () => {
    expect(page.url()).toBe(served.address);
    await page.reload();
    expect(await ask('echo', 'again')).toEqual({ ok: true, value: 'again' });
  });

  test('is let in once per code', async () => {
    const address = served.newAddress();
    const [first, second] = [await browser.newPage(), await browser.newPage()];
    await first.goto(address);
    expect(await ask('echo', 1, first)).toEqual({ ok: true, value: 1 });
    await second.goto(address);
    expect(await ask('echo', 1, second)).toMatchObject({ ok: false, refusals: [{ code: 'request-malformed' }] });
    await Promise.all([first.close(), second.close()]);
  });

  test('is isolated from other origins and complains of nothing', async () => {
    expect(await page.evaluate(() => crossOriginIsolated)).toBe(true);
    expect(complaints).toEqual([]);
  });

  test('cannot run a script that did not come from the server', async () => {
    const fresh = await browser.newPage();
    const refusals = complaintsOf(fresh);
    await fresh.goto(served.newAddress());
    // Refused at the assignment, by the policy on trusted types, or when it is put in, by the one on scripts.
    const put = fresh.evaluate(() => {
      const script = document.createElement('script');
      script.textContent = 'window.injected = true';
      document.head.append(script);
    });
    await put.catch(() => undefined);
    expect(await fresh.evaluate(() => 'injected' in window)).toBe(false);
    expect(refusals.join()).toMatch(/Content Security Policy|TrustedScript/);
    await fresh.close();
  });

  test('is told when the server has gone, and calls then refuse instead of waiting', async () => {
    const own = await serve({ pages, client, startFolder: folder });
    const fresh = await browser.newPage();
    await fresh.goto(own.newAddress());
    expect(await ask('echo', 1, fresh)).toEqual({ ok: true, value: 1 });
    await own.close();
    expect(await ask('echo', 1, fresh)).toMatchObject({ ok: false, refusals: [{ code: 'engine-stopped' }] });
    await fresh.close();
  });
});

test('the server ends after its last tab, not during a reload', async () => {
  const own = await serve({ pages, client, startFolder: folder, linger_ms: 1500 });
  const context = await browser.newContext();
  const tab = await context.newPage();
  await tab.goto(own.newAddress());
  await ask('echo', 1, tab);
  await tab.reload();
  await ask('echo', 1, tab);
  await new Promise((resolve) => setTimeout(resolve, 2500));
  expect(await ask('echo', 2, tab)).toEqual({ ok: true, value: 2 });
  await context.close();
  await own.closed;
  await expect(fetch(own.address)).rejects.toThrow();
});
