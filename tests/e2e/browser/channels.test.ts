// The channel browser in a real window, by keyboard: from the make-up table to a channel in a region and back.
import { AxeBuilder } from '@axe-core/playwright';
import type { Locator } from 'playwright-core';
import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import { openWorkWindow, type WorkWindow } from '../../support/work-window.ts';

let window: WorkWindow;

const dialog = (): Locator => window.page.getByRole('dialog', { name: 'Add a channel' });
const list = (): Locator => dialog().getByRole('listbox', { name: 'Channels' });
const chosen = (): Promise<string> => list().getByRole('option', { selected: true }).innerText();
const undo = (): Locator => window.page.getByRole('button', { name: /^Undo: / });

beforeAll(async () => {
  window = await openWorkWindow();
  await window.show('Cell');
});
afterAll(async () => {
  await window?.close();
});
beforeEach(async () => {
  await window.page.keyboard.press('Escape');
  await window.page.getByRole('button', { name: 'Add a channel', exact: true }).click();
  await list().waitFor();
});

describe('adding a channel', () => {
  test('lists every published channel by what carries its current, and marks what the region has', async () => {
    expect(await list().getByRole('option').count()).toBe(27);
    const groups = await list().getByRole('group').all();
    const sizes = await Promise.all(groups.map(async (group) => group.getByRole('option').count()));
    expect(sizes).toEqual([8, 12, 4, 3]);
    // The example's soma has both of Hodgkin and Huxley.
    expect(
      await list()
        .getByRole('option', { name: / there$/ })
        .count(),
    ).toBe(2);
    await window.page.keyboard.press('Escape');
    await dialog().waitFor({ state: 'detached' });
  });

  test('shows facts, cautions, source and both curves of the one the arrow keys are on', async () => {
    await window.page.keyboard.press('Home');
    expect(await chosen()).toContain('Na, Hodgkin & Huxley 1952');
    expect(
      await dialog()
        .getByRole('button', { name: /^Add to / })
        .isDisabled(),
    ).toBe(true);
    await window.page.keyboard.press('ArrowDown');
    await window.page.keyboard.press('ArrowDown');
    expect(await chosen()).toBe('Na, Wang & Buzsáki 1996');
    const words = await dialog().innerText();
    expect(words).toContain('g·m³·h·(V − E)');
    expect(words).toContain('none stated');
    expect(words).toContain('from memory');
    expect(words).toContain('m follows the voltage at once');
    expect(words).toContain('J Neurosci 16:6402–6413');
    expect(
      await dialog()
        .getByRole('slider', { name: /^Steady state, Na, Wang/ })
        .count(),
    ).toBe(1);
    expect(
      await dialog()
        .getByRole('slider', { name: /^Time constant, Na, Wang.*ms/ })
        .count(),
    ).toBe(1);
  });

  test('puts it into the region with a density of 0, under words that undo takes back', async () => {
    await window.page.keyboard.press('End');
    expect(await chosen()).toBe('h, Kole 2006');
    await window.page.keyboard.press('Enter');
    await dialog().waitFor({ state: 'detached' });
    const field = window.page.getByRole('textbox', { name: 'h, Kole 2006, soma' });
    expect(await field.or(window.page.getByLabel('h, Kole 2006, soma')).first().inputValue()).toMatch(/^0\b/);
    expect(await undo().innerText()).toBe('Undo: add h, Kole 2006 to soma');
    await undo().click();
    expect(await window.page.getByRole('rowheader', { name: 'h, Kole 2006' }).count()).toBe(0);
  });

  test('has no serious finding in either theme, and the page says nothing on its console', async () => {
    for (const colorScheme of ['light', 'dark'] as const) {
      await window.page.emulateMedia({ colorScheme });
      const found = await new AxeBuilder({ page: window.page }).setLegacyMode(true).include('dialog').analyze();
      const serious = found.violations.filter(({ impact }) => impact === 'serious' || impact === 'critical');
      expect(serious.map(({ id, nodes }) => `${id}: ${nodes[0]?.html}`)).toEqual([]);
    }
    expect(window.complaints).toEqual([]);
  });
});
