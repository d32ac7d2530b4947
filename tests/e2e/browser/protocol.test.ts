// Designing a protocol in the window, by keyboard.
import type { Locator } from 'playwright-core';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { openWorkWindow, seriousFindings, type WorkWindow } from '../../support/work-window.ts';

let work: WorkWindow;
beforeAll(async () => {
  work = await openWorkWindow();
  await work.show('Protocol');
});
afterAll(async () => {
  expect(work.complaints).toEqual([]);
  await work.close();
});

const blocks = (): Locator => work.page.getByRole('group', { name: 'Blocks of lane A' }).getByRole('button');
const field = (name: string): Locator => work.page.getByRole('textbox', { name, exact: true });
const undo = (): Promise<void> => work.page.keyboard.press('Control+z');

test('a block is stretched, moved, deleted by keys, and every change can be undone', async () => {
  const count = await blocks().count();
  await blocks().nth(1).click();
  await field('Lasts').waitFor();
  const before = await field('Lasts').inputValue();
  await blocks().nth(1).press('Shift+ArrowRight');
  expect(Number(await field('Lasts').inputValue())).toBe(Number(before) + 1);
  await undo();
  expect(await field('Lasts').inputValue()).toBe(before);

  const name = await blocks().nth(1).getAttribute('aria-label');
  await blocks().nth(1).press('Alt+ArrowLeft');
  expect(await blocks().nth(0).getAttribute('aria-label')).toContain(name?.split(': ')[0]);
  await undo();

  await blocks().nth(1).press('Delete');
  expect(await blocks().count()).toBe(count - 1);
  await undo();
  expect(await blocks().count()).toBe(count);
});

test('a ladder takes its start in another unit, and the table of sweeps follows', async () => {
  await blocks().nth(1).click();
  await field('First, dial').fill('-0.11 V');
  await field('First, dial').press('Enter');
  const first = work.page.getByRole('region', { name: 'Sweeps, arrow keys move along' }).getByRole('row').nth(1);
  expect(await first.innerText()).toContain('−110');
  // In a field the keys undo typing; outside it they undo the change.
  await blocks().nth(1).focus();
  await undo();
  expect(await first.innerText()).not.toContain('−110');
});

test('a wrong entry says why under the field and changes nothing', async () => {
  await blocks().nth(1).click();
  const before = await work.page.getByRole('row').nth(1).innerText();
  await field('First, dial').fill('-100 pA');
  await work.page.getByText(/Refused: pA is a unit of current/).waitFor();
  expect(await work.page.getByRole('row').nth(1).innerText()).toBe(before);
  await field('First, dial').press('Escape');
});

test('a block and a reading are added where the hand is, and the new one is selected', async () => {
  const count = await blocks().count();
  await blocks().nth(0).click();
  await work.page.getByRole('button', { name: 'Add a block' }).click();
  await work.page.getByRole('menuitemradio', { name: /^ramp/ }).click();
  expect(await blocks().count()).toBe(count + 1);
  expect(await blocks().nth(1).getAttribute('aria-pressed')).toBe('true');
  await work.page.getByRole('heading', { name: `Block 2 of ${count + 1}: ramp` }).waitFor();
  await undo();

  await work.page.getByRole('button', { name: 'Add a reading' }).click();
  await work.page.getByRole('menuitemradio', { name: 'Current of pipette A' }).click();
  await work.page.getByRole('heading', { name: 'Reading: peak current' }).waitFor();
  await undo();
});

test('has no serious accessibility fault, whatever is selected', async () => {
  await blocks().nth(1).click();
  expect(await seriousFindings(work.page)).toEqual([]);
  await work.page.getByRole('button', { name: 'Timing and tolerance' }).click();
  expect(await seriousFindings(work.page)).toEqual([]);
  await work.page
    .getByRole('button', { name: /^Reading / })
    .first()
    .click();
  expect(await seriousFindings(work.page)).toEqual([]);
});
