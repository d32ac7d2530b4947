// The window's frame in a real browser, on the real engine, mostly by keyboard: what a user does between two rehearsals.
import { AxeBuilder } from '@axe-core/playwright';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import type { Browser, BrowserContext, Locator, Page } from 'playwright-core';
import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import { serve, type Served } from '../../../src-main/shells/browser/server.ts';
import { EngineClient } from '../../../src-main/shells/engine-client.ts';
import { startWithNode } from '../../../src-main/shells/start-with-node.ts';
import { complaintsOf, launchChromium } from '../../support/chromium.ts';

let folder: string;
let browser: Browser;
let context: BrowserContext;
let client: EngineClient;
let served: Served;
let page: Page;
let complaints: string[];

const planLine = (): Locator => page.getByRole('banner', { name: 'Plan' });
const answer = (): Locator => page.getByRole('contentinfo', { name: 'Answer' });
const access = (): Locator => planLine().getByRole('button', { name: /^Access resistance of pipette A/ });
const site = (): Locator => planLine().getByRole('button', { name: /^Site of pipette A/ });
const undoButton = (): Locator => page.getByRole('button', { name: /^Undo: / });

beforeAll(async () => {
  folder = mkdtempSync(join(tmpdir(), 'holdfast-frame-'));
  client = new EngineClient(startWithNode(resolve('out/main/engine.cjs')), join(folder, 'Notebook.holdfast'));
  served = await serve({ pages: resolve('out/renderer'), client, startFolder: folder });
  browser = await launchChromium();
  // The secret of the first page stays with the browser context; one page serves every test.
  context = await browser.newContext({ viewport: { width: 1280, height: 800 } });
  page = await context.newPage();
  complaints = complaintsOf(page);
  await page.goto(served.newAddress());
  await answer()
    .getByRole('button', { name: /reads .*, is / })
    .waitFor({ timeout: 60_000 });
});
afterAll(async () => {
  await browser?.close();
  await served?.close();
  await client?.stop();
  rmSync(folder, { recursive: true, force: true, maxRetries: 10, retryDelay: 100 });
});
beforeEach(async () => {
  await page.keyboard.press('Escape');
  while ((await undoButton().count()) > 0) await undoButton().click();
});

describe('the plan line', () => {
  test('steps a number with the arrow keys, says what undo takes back, and answers with an estimate', async () => {
    const before = await answer().innerText();
    await access().focus();
    const words = await access().innerText();
    await page.keyboard.press('ArrowUp');
    await page.keyboard.press('ArrowUp');
    expect(Number.parseFloat(await access().innerText())).toBe(Number.parseFloat(words) + 2);
    expect(await undoButton().innerText()).toMatch(/access resistance A .* → .*MΩ/);
    await answer().getByText('estimate', { exact: true }).waitFor();
    await page.keyboard.press('Control+z');
    expect(await access().innerText()).toBe(words);
    // Back at the rehearsed plan its own figures stand again, no estimate.
    expect(await answer().getByText('estimate', { exact: true }).count()).toBe(0);
    expect((await answer().innerText()).split('\n')[0]).toBe(before.split('\n')[0]);
  });

  test('takes a value in another unit, typed in place', async () => {
    await access().focus();
    await page.keyboard.type('0.02 GOhm');
    await page.keyboard.press('Enter');
    expect(await access().innerText()).toBe('20\u2009MΩ');
  });

  test('explains a wrong unit under the field and changes nothing', async () => {
    const words = await access().innerText();
    await access().click();
    const field = page.getByRole('textbox', { name: 'Access resistance of pipette A' });
    await field.fill('12 mV');
    expect(await page.getByRole('alert').innerText()).toContain('mV is a unit of voltage');
    await page.keyboard.press('Escape');
    expect(await access().innerText()).toBe(words);
    expect(await undoButton().count()).toBe(0);
  });
});

describe('the cell', () => {
  test('a pipette is dragged along it, and one undo brings it back', async () => {
    await page.keyboard.press('Control+2');
    const stage = page.getByRole('application');
    const box = (await stage.boundingBox())!;
    const before = await site().innerText();
    await stage.focus();
    await page.keyboard.press('a');
    await page.keyboard.press('Shift+ArrowUp');
    await page.keyboard.press('Shift+ArrowUp');
    expect(await site().innerText()).not.toBe(before);
    while ((await undoButton().count()) > 0) await undoButton().click();

    // The head of A lies to the lower left of the soma; what the pointer is on is found by trying.
    const head = await headOf(box);
    await page.mouse.move(head.x, head.y);
    await page.mouse.down();
    await page.mouse.move(head.x + 10, head.y - 150, { steps: 8 });
    await page.mouse.up();
    const moved = await site().innerText();
    expect(moved).not.toBe(before);
    await undoButton().click();
    expect(await site().innerText()).toBe(before);
    expect(await undoButton().count()).toBe(0);
  });

  test('takes a probe at the selected place, and gives it up again', async () => {
    const stage = page.getByRole('application');
    await stage.focus();
    const box = (await stage.boundingBox())!;
    await selectTrunk(box);
    await page.keyboard.press('p');
    expect(await page.getByRole('heading', { name: /^Probe / }).count()).toBe(1);
    await page.getByRole('button', { name: 'Remove the probe' }).click();
    expect(await page.getByRole('heading', { name: /^Probe / }).count()).toBe(0);
  });
});

describe('the rig', () => {
  test('a second pipette comes and goes with its lane, as one step each', async () => {
    await page.keyboard.press('Control+2');
    await page.getByRole('button', { name: 'Add a second pipette' }).click();
    await planLine()
      .getByRole('button', { name: /^Site of pipette B/ })
      .waitFor();
    await page.getByRole('button', { name: 'Remove pipette B and its lane' }).click();
    expect(
      await planLine()
        .getByRole('button', { name: /^Site of pipette B/ })
        .count(),
    ).toBe(0);
    await undoButton().click();
    expect(
      await planLine()
        .getByRole('button', { name: /^Site of pipette B/ })
        .count(),
    ).toBe(1);
    await undoButton().click();
    expect(await undoButton().count()).toBe(0);
  });
});

describe('the keyboard', () => {
  test.each([
    ['1', 'Cell'],
    ['2', 'Rig'],
    ['3', 'Protocol'],
    ['4', 'Rehearse'],
    ['5', 'Forecast'],
  ])('Ctrl+%s opens %s', async (key, name) => {
    await page.keyboard.press(`Control+${key}`);
    expect(await page.getByRole('tab', { name }).getAttribute('aria-selected')).toBe('true');
  });

  test('? lists the keys, Ctrl+K finds a command by a few letters', async () => {
    await page.keyboard.press('?');
    await page.getByRole('dialog', { name: 'All keys' }).waitFor();
    await page.keyboard.press('Escape');
    await page.keyboard.press('Control+k');
    await page.getByRole('combobox', { name: 'Command' }).fill('open prot');
    await page.keyboard.press('Enter');
    expect(await page.getByRole('tab', { name: 'Protocol' }).getAttribute('aria-selected')).toBe('true');
  });
});

describe('for everyone', () => {
  test.each(['light', 'dark'] as const)('axe finds nothing serious in any area, %s', async (colorScheme) => {
    await page.emulateMedia({ colorScheme, reducedMotion: 'reduce' });
    for (const name of ['Cell', 'Rig', 'Protocol', 'Rehearse', 'Forecast']) {
      await page.getByRole('tab', { name }).click();
      const { violations } = await new AxeBuilder({ page }).analyze();
      const serious = violations.filter((v) => v.impact === 'serious' || v.impact === 'critical');
      expect(serious.map((v) => `${name}: ${v.id} ${v.nodes[0]?.html ?? ''}`)).toEqual([]);
    }
  });

  test('nothing was refused by the content security policy, and nothing failed', () => {
    expect(complaints).toEqual([]);
  });
});

/** Looks for the pipette's head by pressing a coarse grid of points until the rig's details name pipette A. */
async function headOf(box: { x: number; y: number; width: number; height: number }): Promise<{ x: number; y: number }> {
  for (let y = box.y + box.height - 40; y > box.y + 60; y -= 12) {
    for (let x = box.x + 14; x < box.x + box.width - 10; x += 12) {
      await page.keyboard.press('Escape');
      await page.mouse.click(x, y);
      if ((await page.getByRole('heading', { name: 'Pipette A', exact: true }).count()) > 0) return { x, y };
    }
  }
  throw new Error('pipette A is not in the picture');
}

/** Clicks down the middle of the picture until a place on a dendrite is selected. */
async function selectTrunk(box: { x: number; y: number; width: number; height: number }): Promise<void> {
  for (let y = box.y + 80; y < box.y + box.height - 120; y += 10) {
    for (let x = box.x + box.width * 0.3; x < box.x + box.width * 0.8; x += 12) {
      await page.mouse.click(x, y);
      if ((await page.getByRole('button', { name: /^Place a probe/ }).count()) > 0) return;
    }
  }
  throw new Error('no place on the cell was found');
}
