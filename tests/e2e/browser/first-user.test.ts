// What a first user stumbles over: typing in the plan line, leaving a running plan, dialogs by keyboard, notes kept.
import type { Locator } from 'playwright-core';
import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import { openWorkWindow, type WorkWindow } from '../../support/work-window.ts';

let work: WorkWindow;
beforeAll(async () => {
  work = await openWorkWindow();
});
afterAll(async () => {
  expect(work.complaints).toEqual([]);
  await work.close();
});

const line = (): Locator => work.page.getByRole('banner', { name: 'Plan' });
const fragment = (name: string): Locator => line().getByRole('button', { name: new RegExp(`^${name}`) });
const undo = (): Locator => work.page.getByRole('button', { name: /^Undo: / });
const isOpen = (area: string): Promise<string | null> =>
  work.page.getByRole('tab', { name: area }).getAttribute('aria-selected');
const focused = (): Promise<string> =>
  work.page.evaluate(() => document.activeElement?.getAttribute('aria-label') ?? document.activeElement?.tagName ?? '');
const drawer = (): Locator => work.page.getByRole('navigation', { name: 'Notebook' });
async function openPlan(name: string): Promise<void> {
  if ((await drawer().count()) === 0) await work.page.getByRole('button', { name: 'Show the notebook' }).click();
  await drawer()
    .locator('li')
    .getByRole('button', { name: new RegExp(`^${name}`) })
    .click();
  await work.page.waitForFunction((wanted) => document.title.startsWith(wanted), name);
}

describe('the plan line', () => {
  beforeEach(async () => {
    while ((await undo().count()) > 0) await undo().click();
  });

  test('a last rung typed at human pace gives the ladder of the whole number, in the area one looks at', async () => {
    await work.show('Forecast');
    const sweeps = await fragment('Sweeps').innerText();
    await fragment('Last rung').focus();
    await work.page.keyboard.type('-60', { delay: 300 });
    await work.page.keyboard.press('Enter');
    expect(await fragment('Last rung').innerText()).toMatch(/−60/);
    // −100 to −60 mV by 5 mV.
    expect(await fragment('Sweeps').innerText()).toBe('9 sweeps');
    expect(await undo().innerText()).toMatch(/last rung .* → −60/);
    expect(await isOpen('Forecast')).toBe('true');
    await undo().click();
    expect(await fragment('Sweeps').innerText()).toBe(sweeps);
    expect(await undo().count()).toBe(0);
  });

  test('a number that meets no rung stays as typed while one types, and undo names both', async () => {
    await fragment('Last rung').focus();
    await work.page.keyboard.type('-63', { delay: 100 });
    const field = line().getByRole('textbox', { name: 'Last rung of the ladder' });
    expect(await field.inputValue()).toBe('-63');
    await work.page.keyboard.press('Enter');
    expect(await fragment('Last rung').innerText()).toMatch(/−65/);
    expect(await undo().innerText()).toMatch(/last rung .* → −65.*, nearest to −63/);
  });

  test('a click opens the area that owns the number', async () => {
    await work.show('Forecast');
    await fragment('Access resistance of pipette A').click();
    expect(await isOpen('Rig')).toBe('true');
    await work.page.keyboard.press('Escape');
  });

  test('Escape gives the number back, then leaves the line', async () => {
    const words = await fragment('Temperature').innerText();
    await fragment('Temperature').focus();
    await work.page.keyboard.type('30');
    await work.page.keyboard.press('Escape');
    expect(await fragment('Temperature').innerText()).toBe(words);
    await work.page.waitForFunction(() => document.activeElement?.tagName === 'BUTTON');
    await work.page.keyboard.press('Escape');
    expect(await focused()).toBe('BODY');
  });

  test('stays within two lines at 1280, and no line begins with a stop, for every example', async () => {
    const names = await planNames();
    for (const name of names) {
      await openPlan(name);
      await drawer().waitFor();
      const sentence = line().locator('.sentence');
      const [height, lead] = await sentence.evaluate((node) => [
        node.scrollHeight,
        parseFloat(getComputedStyle(node).lineHeight),
      ]);
      // A fragment's underline reaches a little below its line.
      expect(height, name).toBeLessThanOrEqual(2 * lead + 8);
      // A fragment and the stop behind it lie on one line: one box, not two.
      const boxes = await sentence.locator('.whole').evaluateAll((all) => all.map((n) => n.getClientRects().length));
      expect(new Set(boxes), name).toEqual(new Set([1]));
    }
    await openPlan(names[0]!);
  });
});

async function planNames(): Promise<string[]> {
  if ((await drawer().count()) === 0) await work.page.getByRole('button', { name: 'Show the notebook' }).click();
  return drawer().locator('.row .name span:first-child').allInnerTexts();
}

describe('a running rehearsal', () => {
  const first = 'Somatic step family';
  /** Changes the number of sweeps and rehearses, by keys alone. */
  async function rehearseSweeps(count: string): Promise<void> {
    await fragment('Sweeps').focus();
    await work.page.keyboard.type(count);
    await work.page.keyboard.press('Enter');
    await work.page.keyboard.press('Space');
  }
  async function otherPlan(): Promise<string> {
    return (await planNames()).find((name) => name !== first)!;
  }
  const canRehearse = () =>
    line()
      .getByRole('button', { name: /^Rehearse/ })
      .waitFor({ timeout: 30_000 });

  test('started by Space after a change, left and come back to, still runs and can be stopped', async () => {
    const second = await otherPlan();
    await openPlan(first);
    await work.show('Rehearse');
    // Far more than any machine does before the way back is gone.
    await rehearseSweeps('2000');
    await line().getByRole('button', { name: /^Stop/ }).waitFor();
    await work.page.getByRole('heading', { name: `Rehearsal of ${first}` }).waitFor();
    await work.page.getByText('figures: before the change').waitFor();
    await openPlan(second);
    await canRehearse();
    await openPlan(first);
    await work.page.getByText(/of 2000 sweeps in/).waitFor();
    await line().getByRole('button', { name: /^Stop/ }).click();
    await canRehearse();
  });

  test('left before it ends shows its result on return', async () => {
    const second = await otherPlan();
    await openPlan(first);
    await rehearseSweeps('12');
    await openPlan(second);
    await canRehearse();
    await openPlan(first);
    await canRehearse();
    // The result is of the plan as it stands, though the plan was read anew in between.
    await work.page
      .getByRole('contentinfo', { name: 'Answer' })
      .getByRole('button', { name: /reads / })
      .waitFor();
    expect(await work.page.getByText('The plan was changed since').count()).toBe(0);
    await work.page.getByRole('region', { name: 'Rehearsals kept' }).getByRole('button').nth(1).waitFor();
  });
});

describe('a list of rungs', () => {
  test('stays as it is typed, decimals and commas too', async () => {
    await openPlan('Two pulses, recovery');
    await work.page.keyboard.press('Control+3');
    const list = work.page.getByRole('textbox', { name: /^Rungs, in ms/ });
    await list.click();
    await work.page.keyboard.press('Control+a');
    await work.page.keyboard.type('1.0', { delay: 60 });
    await work.page.keyboard.type('5, 20,', { delay: 60 });
    expect(await list.inputValue()).toBe('1.05, 20,');
    expect(await fragment('Sweeps').innerText()).toBe('2 sweeps');
    while ((await undo().count()) > 0) await undo().click();
  });
});

describe('dialogs', () => {
  test('begin on their main field', async () => {
    await work.page.keyboard.press('Control+k');
    await work.page.getByRole('dialog').waitFor();
    expect(await focused()).toBe('Command');
    await work.page.keyboard.type('under another name');
    await work.page.keyboard.press('Enter');
    await work.page.getByRole('dialog', { name: /another name/ }).waitFor();
    expect(await work.page.getByRole('textbox', { name: 'Name' }).evaluate((n) => n === document.activeElement)).toBe(
      true,
    );
    await work.page.keyboard.press('Escape');
  });

  test('Enter in the name makes the notebook; its start stands beside the drawer, uncovered', async () => {
    await work.page.keyboard.press('Control+k');
    await work.page.keyboard.type('new notebook');
    await work.page.keyboard.press('Enter');
    await work.page.getByRole('dialog', { name: 'New notebook' }).waitFor();
    await work.page.keyboard.type('Fresh');
    await work.page.keyboard.press('Enter');
    const title = work.page.getByRole('heading', { name: 'No plan is open' });
    await title.waitFor();
    if ((await drawer().count()) === 0) await work.page.getByRole('button', { name: 'Show the notebook' }).click();
    const covered = (await drawer().boundingBox())!;
    expect((await title.boundingBox())!.x).toBeGreaterThanOrEqual(covered.x + covered.width);
  });
});

describe('session notes', () => {
  test('are kept when the page is left at once', async () => {
    await work.page.getByRole('button', { name: 'Make a cell', exact: true }).first().click();
    await work.page.getByRole('textbox', { name: 'Name' }).fill('Noted cell');
    await work.page.keyboard.press('Enter');
    await work.page.waitForFunction(() => document.title.includes('Noted cell'));
    await work.page.getByRole('button', { name: 'What to do with cell Noted cell' }).click();
    await work.page.getByRole('menuitemradio', { name: 'New session, today' }).click();
    const notes = work.page.getByRole('textbox', { name: 'Notes' });
    await notes.waitFor();
    await work.page.waitForFunction(() => document.activeElement?.tagName === 'TEXTAREA');
    await work.page.keyboard.type('seal 2 GΩ');
    await work.page.reload();
    await work.page.waitForFunction(() => document.title.includes('Noted cell'));
    if ((await drawer().count()) === 0) await work.page.getByRole('button', { name: 'Show the notebook' }).click();
    await drawer()
      .getByRole('region', { name: 'Noted cell' })
      .getByRole('button', { name: /^Session / })
      .click();
    await notes.waitFor();
    expect(await notes.inputValue()).toBe('seal 2 GΩ');
    await work.page.keyboard.press('Escape');
  });
});

describe('a traced cell', () => {
  test('is refused by its size before it is read, and the notice names file and limit', async () => {
    await work.page.keyboard.press('Control+b');
    await work.show('Cell');
    const [chooser] = await Promise.all([
      work.page.waitForEvent('filechooser'),
      work.page.getByRole('button', { name: 'Import a tracing (SWC)' }).click(),
    ]);
    // Nothing of it is read: an empty stand-in that only says that it is large.
    await work.page.evaluate(() => {
      Object.defineProperty(File.prototype, 'size', { configurable: true, get: () => 140e6 });
    });
    await chooser.setFiles({ name: 'huge.swc', mimeType: 'text/plain', buffer: Buffer.from('1 1 0 0 0 5 -1\n') });
    const notice = work.page.getByText(/huge\.swc is 140 MB: give a file of at most 100 MB/);
    await notice.waitFor();
  });
});
