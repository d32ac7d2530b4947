// Reading a rehearsal in the window, and taking its numbers away.
import { readFileSync } from 'node:fs';
import type { Locator } from 'playwright-core';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { openWorkWindow, seriousFindings, type WorkWindow } from '../../support/work-window.ts';

let work: WorkWindow;
beforeAll(async () => {
  work = await openWorkWindow();
  await work.show('Rehearse');
});
afterAll(async () => {
  expect(work.complaints).toEqual([]);
  await work.close();
});

const recorded = (): Locator => work.page.getByRole('slider', { name: /^A recorded/ });
const range = async (chart: Locator): Promise<number[]> =>
  Promise.all(['aria-valuemin', 'aria-valuemax'].map(async (name) => Number(await chart.getAttribute(name))));

test('the crosshair is moved by keys and reads every trace with its unit', async () => {
  await recorded().focus();
  await work.page.keyboard.press('Shift+ArrowRight');
  const values = work.page.getByRole('region', { name: 'At the crosshair' });
  expect(await values.getByRole('row', { name: /recorded/ }).innerText()).toMatch(/pA/);
  expect(await values.getByRole('row', { name: /^ ?command/ }).innerText()).toMatch(/−?\d+\.\d\s*mV/);
  expect(await values.getByRole('row', { name: /membrane − command/ }).innerText()).toMatch(/[+−]?\d+\.\d\s*mV/);
});

test('charts on one time axis zoom together, and a double click shows the whole again', async () => {
  const voltage = work.page.getByRole('slider', { name: /^Voltage in sweep/ });
  const whole = await range(recorded());
  await recorded().hover({ position: { x: 200, y: 60 } });
  await work.page.mouse.wheel(0, -300);
  const zoomed = await range(recorded());
  expect(zoomed[1]! - zoomed[0]!).toBeLessThan(whole[1]! - whole[0]!);
  expect(await range(voltage)).toEqual(zoomed);
  await recorded().dblclick({ position: { x: 200, y: 60 } });
  expect(await range(voltage)).toEqual(whole);
});

test('a sweep chosen in the grid is the one read, drawn and described', async () => {
  await work.page.getByRole('button', { name: 'Sweep 2', exact: true }).click();
  await work.page.getByRole('heading', { name: /^Sweep 2 of/ }).waitFor();
  await work.page.getByRole('button', { name: 'Sweep 2', exact: true }).press('ArrowRight');
  await work.page.getByRole('heading', { name: /^Sweep 3 of/ }).waitFor();
  await work.page.getByRole('columnheader', { name: 'recorded', exact: true }).waitFor();
});

test('a chart gives its numbers with their units, and its drawing as a vector file', async () => {
  const keep = async (kind: string): Promise<string> => {
    await work.page.getByRole('button', { name: /^Keep the chart: A recorded/ }).click();
    const [file] = await Promise.all([
      work.page.waitForEvent('download'),
      work.page.getByRole('menuitemradio', { name: kind }).click(),
    ]);
    return readFileSync(await file.path(), 'utf8');
  };
  const numbers = (await keep('Numbers')).split('\r\n');
  expect(numbers[0]).toMatch(/^time \(ms\),.*A recorded current \([np]A\)/);
  expect(numbers[1]).toMatch(/^0,-?\d/);
  const drawing = await keep('Vector');
  expect(drawing).toMatch(/^<svg xmlns=/);
  expect(drawing.match(/<path d="M[^"]{200,}"/g)?.length).toBeGreaterThan(1);
});

test('the forecast, the figure and the plan can be taken away as files', async () => {
  for (const [item, start] of [
    ['Forecast', '{'],
    ['Figure', '<'],
    ['Plan', '{'],
  ] as const) {
    await work.page.getByRole('button', { name: 'Export' }).click();
    const [file] = await Promise.all([
      work.page.waitForEvent('download'),
      work.page.getByRole('menuitemradio', { name: new RegExp(`^${item}`) }).click(),
    ]);
    expect(
      readFileSync(await file.path(), 'utf8')
        .trimStart()
        .startsWith(start),
    ).toBe(true);
  }
});

test('has no serious accessibility fault', async () => {
  expect(await seriousFindings(work.page)).toEqual([]);
});
