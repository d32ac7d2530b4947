// The notebook a first start opens: example cells and plans, one of them rehearsed.
import { readdirSync, rmSync } from 'node:fs';
import { join, resolve } from 'node:path';
import type { PlanDocument } from '../contract/documents.ts';
import { keepCell } from '../notebook/cells.ts';
import { onDisk } from '../notebook/disk-refusal.ts';
import { givePlace, makeFolder, spareName } from '../notebook/new-file.ts';
import { change, createNotebook, type Notebook } from '../notebook/open.ts';
import { createPlan } from '../notebook/plans.ts';
import { createSession, writeSession } from '../notebook/sessions.ts';
import { keepSetting } from '../notebook/settings.ts';
import { examplesFolder } from './beside.ts';
import type { Desk } from './desk.ts';
import { readPlanWhole } from './read-plan.ts';
import { rehearseInto } from './rehearse.ts';
import { written, writtenPlan } from './written.ts';

/** Shown first, and rehearsed already: quick, and it shows a clamp that fails with distance. */
const firstShown = 'somatic-step-family.plan.json';

const sessionNote =
  'An example. The lab, the animal and the cell are invented for this notebook; nothing here was recorded.\n\n' +
  'Look at the forecast first: how far from the soma does the clamp hold? Then change one thing and rehearse again.';

/**
 * Makes the example notebook at `path`, complete or not at all. Gives it as it was while being made, closed by now: what
 * is still to come for it is to be moved to the opened one.
 * @throws Refusal `file-exists`, `file-unwritable`; as `readPlanWhole` for an example that is not as it should be.
 */
export async function makeExampleNotebook(desk: Desk, given: string): Promise<Notebook> {
  const path = resolve(given);
  onDisk(path, () => makeFolder(path));
  const spare = spareName(path);
  try {
    const notebook = createNotebook(spare);
    try {
      await fill(desk, notebook);
    } finally {
      notebook.close();
    }
    onDisk(path, () => givePlace(spare, path));
    return notebook;
  } finally {
    rmSync(spare, { force: true });
  }
}

async function fill(desk: Desk, notebook: Notebook): Promise<void> {
  const folder = examplesFolder();
  const files = readdirSync(folder)
    .filter((name) => name.endsWith('.plan.json'))
    .toSorted();
  const sessions = new Map<number, number>();
  let shown: FirstShown | null = null;
  for (const file of files) {
    const plan = readPlanWhole(join(folder, file));
    const cellId = keepCell(notebook, written(plan.cell));
    const planId = createPlan(notebook, cellId, written(plan), written(plan.cell));
    const sessionId = sessions.get(cellId) ?? exampleSession(notebook, cellId);
    sessions.set(cellId, sessionId);
    if (file === firstShown) shown = { planId, sessionId, plan };
  }
  if (shown) await rehearseFirst(desk, notebook, shown);
}

interface FirstShown {
  readonly planId: number;
  readonly sessionId: number;
  readonly plan: PlanDocument;
}

function exampleSession(notebook: Notebook, cellId: number): number {
  const today = new Date().toISOString().slice(0, 10);
  const sessionId = createSession(notebook, cellId, today, 'Planning');
  writeSession(notebook, sessionId, 'Planning', sessionNote);
  return sessionId;
}

async function rehearseFirst(desk: Desk, notebook: Notebook, { planId, sessionId, plan }: FirstShown): Promise<void> {
  const documents = writtenPlan(plan);
  await rehearseInto(desk, notebook, { jobId: 'example', planId, sessionId, documents });
  change(notebook, () => keepSetting(notebook, 'open plan', String(planId)));
}
