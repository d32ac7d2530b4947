// A numerical uncertainty that the end of the program cut off is taken up when its rehearsal is looked at again.
import { expect, it } from 'vitest';
import { createEngine, type Engine } from '../../src-main/engine/engine.ts';
import { openNotebook } from '../../src-main/notebook/open.ts';
import { readRehearsal } from '../../src-main/notebook/rehearsals.ts';
import { rehearsed, value } from '../support/contract-suite.ts';
import { testFolder } from '../support/folder.ts';
import { longPlan } from '../support/small-plans.ts';

const at = testFolder();
const open = (notebookPath?: string): Engine =>
  createEngine({ workers: 1, log: () => undefined, ...(notebookPath === undefined ? {} : { notebookPath }) });

it('a rehearsal left pending is computed once, after it is read in the next run of the program', async () => {
  const path = at('a.holdfast');
  const first = open();
  value(await first.ask('notebook create', { path }));
  const rehearsalId = await rehearsed(first, longPlan(0.3));
  // Before the finer run, which takes four times as long, can end.
  await first.close();
  const between = openNotebook(path);
  expect(readRehearsal(between, rehearsalId).forecast.numerical.state).toBe('pending');
  between.close();

  const second = open(path);
  const settled: number[] = [];
  const numerical = new Promise<void>((resolve) => {
    second.onEvent((event) => {
      if (event.event === 'numerical') resolve(void settled.push(event.rehearsalId));
    });
  });
  const read = async () => value(await second.ask('rehearsal read', { rehearsalId })).forecast.numerical;
  expect((await read()).state).toBe('pending');
  await read();
  await numerical;
  expect((await read()).state).toBe('computed');
  await second.close();
  expect(settled).toEqual([rehearsalId]);
});
