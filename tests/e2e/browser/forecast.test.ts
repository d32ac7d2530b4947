// What a forecast shows and where each of its figures comes from.
import { afterAll, beforeAll, expect, test } from 'vitest';
import { openWorkWindow, seriousFindings, type WorkWindow } from '../../support/work-window.ts';

let work: WorkWindow;
beforeAll(async () => {
  work = await openWorkWindow();
});
afterAll(async () => {
  expect(work.complaints).toEqual([]);
  await work.close();
});

test('every figure leads to its formula and its source', async () => {
  const figures = work.page.locator('#work button.figure');
  const count = await figures.count();
  expect(count).toBeGreaterThan(6);
  for (let i = 0; i < count; i += 1) {
    const title = ((await figures.nth(i).getAttribute('title')) ?? '').split(':')[0] ?? '';
    await figures.nth(i).click();
    const details = work.page.getByRole('region', { name: 'Details of the selected thing' });
    await details.getByText(/^Source: /).waitFor();
    // A reading's own name stands in the place of the title.
    expect(await details.getByRole('heading').first().innerText()).toMatch(new RegExp(`^(${title}|Reading: )`));
  }
});

test('the error is shown at the window’s end, at its worst and as settling time, each with its unit', async () => {
  const what = work.page.getByRole('group', { name: 'What of the error' });
  const chart = work.page.getByRole('slider', { name: /^Clamp error along the cell/ });
  expect(await chart.getAttribute('aria-label')).toContain('clamp error (mV) against path distance from the soma (µm)');
  await what.getByRole('button', { name: 'Settling' }).click();
  expect(await chart.getAttribute('aria-label')).toContain('settling time (ms)');
  expect(await work.page.getByRole('combobox', { name: 'Which part of the error' }).isDisabled()).toBe(true);
  await what.getByRole('button', { name: 'End' }).click();
});

test('the chart is there in words: each region with its extremes, and the trust distance', async () => {
  const table = work.page.getByRole('table', { name: /^Clamp error along the cell.*extremes/ });
  expect(await table.getByRole('row').count()).toBeGreaterThan(2);
  await table.getByRole('rowheader', { name: /^trusted to/ }).waitFor({ state: 'attached' });
});

test('a region chosen in the table is the selected thing of the window', async () => {
  const table = work.page.getByRole('region', { name: 'Reach by region' });
  await table.getByRole('button', { name: 'apical' }).click();
  const row = table.getByRole('row', { name: /^apical/ });
  expect(await row.getAttribute('class')).toContain('selected');
});

test('has no serious accessibility fault', async () => {
  expect(await seriousFindings(work.page)).toEqual([]);
});
