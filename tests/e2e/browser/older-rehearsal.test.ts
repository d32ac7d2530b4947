// A rehearsal whose plan has been changed since: shown as what it was, and led back to.
import { readFileSync } from 'node:fs';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { openWorkWindow, type WorkWindow } from '../../support/work-window.ts';

let work: WorkWindow;
beforeAll(async () => {
  work = await openWorkWindow();
});
afterAll(async () => {
  expect(work.complaints).toEqual([]);
  await work.close();
});

const regions = () => work.page.getByRole('region', { name: 'Reach by region' });

test('the worst sweep is chosen, named so, and all of the table is of the chosen sweep', async () => {
  const chosen = work.page.getByRole('combobox', { name: 'Sweep', exact: true });
  const worst = await chosen.inputValue();
  expect(await chosen.locator('option:checked').innerText()).toMatch(/worst/);
  await regions()
    .getByText(`sweep ${Number(worst) + 1}, the worst of all`)
    .waitFor();
  const row = regions().getByRole('row', { name: /^basal/ });
  // The cell's own compartments arrive after the figures.
  await expect.poll(() => row.innerText(), { timeout: 30_000 }).not.toMatch(/–/);
  const ofWorst = await row.innerText();
  await work.page.getByRole('button', { name: 'Next sweep' }).click();
  await regions()
    .getByText(`sweep ${Number(worst) + 2}`, { exact: true })
    .waitFor();
  expect(await row.innerText()).not.toBe(ofWorst);
});

test('bias is said by size', async () => {
  const panel = work.page.getByRole('region', { name: 'Recorded against true' });
  expect(await panel.innerText()).toMatch(/% too (small|large)/);
  expect(await work.page.getByRole('contentinfo', { name: 'Answer' }).innerText()).toMatch(/% too (small|large)/);
});

test('a second pipette has the input resistance of its own site in the circuit', async () => {
  await work.show('Rig');
  const circuit = work.page.getByRole('region', { name: 'Circuit' });
  const shown = circuit.getByText(/^input resistance here/);
  await expect.poll(() => shown.textContent(), { timeout: 30_000 }).toMatch(/\d\s*MΩ, estimate$/);
  const ofA = await shown.textContent();
  await work.page.getByRole('button', { name: 'Add a second pipette' }).click();
  await circuit.getByRole('heading', { name: /^Pipette B/ }).waitFor();
  await expect.poll(() => shown.textContent(), { timeout: 30_000 }).toMatch(/\d\s*MΩ, estimate$/);
  expect(await shown.textContent()).not.toBe(ofA);
});

test('distances stay those of the cell as it was cut for the rehearsal', async () => {
  await work.show('Forecast');
  await work.page.getByText(/Shown as rehearsed \d\d:\d\d, .*MΩ/).waitFor();
  const row = regions().getByRole('row', { name: /^basal/ });
  await expect.poll(() => row.innerText(), { timeout: 30_000 }).not.toMatch(/–/);
  await work.page
    .getByLabel('The cell', { exact: true })
    .getByText(/as rehearsed \d\d:\d\d/)
    .waitFor();
});

test('the list says what each was run with, and one change goes back to that plan', async () => {
  await work.show('Rehearse');
  const kept = work.page.getByRole('region', { name: 'Rehearsals kept' });
  expect(await kept.getByRole('button').first().innerText()).toMatch(/\d\d:\d\d\s+5\sMΩ\s+−100…−70\smV · 7 sweeps/);
  await work.page.getByRole('button', { name: 'Go back to this plan' }).click();
  await work.page.getByText(/Shown as rehearsed/).waitFor({ state: 'detached' });
  await work.show('Rig');
  await work.page.getByRole('button', { name: 'Add a second pipette' }).waitFor();
  await work.page.keyboard.press('Control+z');
  await work.page.getByRole('button', { name: 'Remove pipette B and its lane' }).waitFor();
  await work.page.keyboard.press('Control+Shift+z');
});

test('the traces of all sweeps leave as one file', async () => {
  await work.show('Rehearse');
  await work.page.getByRole('button', { name: 'Export' }).click();
  const [file] = await Promise.all([
    work.page.waitForEvent('download'),
    work.page.getByRole('menuitemradio', { name: /^Traces/ }).click(),
  ]);
  expect(file.suggestedFilename()).toMatch(/-traces\.csv$/);
  const lines = readFileSync(await file.path(), 'utf8')
    .trimEnd()
    .split('\r\n');
  expect(lines[0]).toMatch(/^sweep,time_ms,recording:A \(pA\)/);
  expect(new Set(lines.slice(1).map((line) => line.split(',')[0]))).toEqual(
    new Set(['1', '2', '3', '4', '5', '6', '7']),
  );
});
