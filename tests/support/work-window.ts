// One window of the built program on a new notebook, for tests of the work areas; and the check of accessibility they share.
import { AxeBuilder } from '@axe-core/playwright';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import type { Browser, Page } from 'playwright-core';
import { serve, type Served } from '../../src-main/shells/browser/server.ts';
import { EngineClient } from '../../src-main/shells/engine-client.ts';
import { startWithNode } from '../../src-main/shells/start-with-node.ts';
import { complaintsOf, launchChromium } from './chromium.ts';

export interface WorkWindow {
  readonly page: Page;
  /** What the page said on its console: policy violations, errors. */
  readonly complaints: readonly string[];
  /** Opens an area by its tab. */
  readonly show: (area: string) => Promise<void>;
  readonly close: () => Promise<void>;
}

/** Opens the example notebook and waits until the first plan's rehearsal is there. */
export async function openWorkWindow(): Promise<WorkWindow> {
  const folder = mkdtempSync(join(tmpdir(), 'holdfast-work-'));
  const client = new EngineClient(startWithNode(resolve('out/main/engine.cjs')), join(folder, 'Notebook.holdfast'));
  const served: Served = await serve({ pages: resolve('out/renderer'), client, startFolder: folder });
  const browser: Browser = await launchChromium();
  const context = await browser.newContext({ viewport: { width: 1280, height: 800 }, acceptDownloads: true });
  const page = await context.newPage();
  const complaints = complaintsOf(page);
  await page.goto(served.newAddress());
  const show = (area: string): Promise<void> => page.getByRole('tab', { name: area }).click();
  await page.getByRole('tab', { name: 'Forecast' }).click({ timeout: 60_000 });
  await page.getByRole('region', { name: 'Reach by region' }).waitFor({ timeout: 90_000 });
  return {
    page,
    complaints,
    show,
    close: async () => {
      await browser.close();
      await served.close();
      await client.stop();
      rmSync(folder, { recursive: true, force: true, maxRetries: 10, retryDelay: 100 });
    },
  };
}

/** Serious and critical findings in the work area and its details, by rule. Empty is good. */
export async function seriousFindings(page: Page): Promise<string[]> {
  // The legacy mode needs no second page, which the browser shell would not let in.
  const found = await new AxeBuilder({ page }).setLegacyMode(true).include('#work').include('.details').analyze();
  return found.violations
    .filter((one) => one.impact === 'serious' || one.impact === 'critical')
    .map((one) => `${one.id}: ${one.nodes.map((node) => node.html.slice(0, 120)).join(' | ')}`);
}
