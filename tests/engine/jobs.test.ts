// Jobs beyond the contract suite: sweeps that carry over, membranes looked at later, workers that die for good, imports.
import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { afterEach, describe, expect, it } from 'vitest';
import type { EngineEvent } from '../../src-main/contract/requests.ts';
import { createEngine, type Engine, type EngineOptions } from '../../src-main/engine/engine.ts';
import { openNotebook } from '../../src-main/notebook/open.ts';
import { rehearsalsOfPlan } from '../../src-main/notebook/rehearsals.ts';
import { rehearsed, refusals, value } from '../support/contract-suite.ts';
import { testFolder } from '../support/folder.ts';
import { longPlan, smallPlan } from '../support/small-plans.ts';

const at = testFolder();
let engine: Engine | null = null;
afterEach(async () => {
  await engine?.close();
  engine = null;
});

async function inNotebook(options: EngineOptions = {}): Promise<Engine> {
  engine = createEngine({ workers: 2, log: () => undefined, ...options });
  value(await engine.ask('notebook create', { path: at('a.holdfast') }));
  return engine;
}

describe('a rehearsal', () => {
  it('gives the same bits however many workers run it', async () => {
    const traces = [];
    for (const workers of [1, 3]) {
      const own = createEngine({ workers, log: () => undefined });
      value(await own.ask('notebook create', { path: at(`${workers}.holdfast`) }));
      traces.push(value(await own.ask('rehearsal traces', { rehearsalId: await rehearsed(own, smallPlan()) })));
      await own.close();
    }
    expect(traces[0]).toEqual(traces[1]);
  });

  it('runs sweeps that carry over in order, each from where the one before ended', async () => {
    const own = await inNotebook();
    const plan = smallPlan();
    const carrying = { ...plan, protocol: { ...plan.protocol, carryOver: true, sweepInterval_ms: 31 } };
    const arrived: number[] = [];
    own.onEvent((event) => {
      if (event.event === 'sweep') arrived.push(event.arrived.sweep);
    });
    const rehearsalId = await rehearsed(own, carrying);
    expect(arrived).toEqual([0, 1, 2]);
    const traces = value(await own.ask('rehearsal traces', { rehearsalId }));
    const starts = traces.filter(({ key }) => key === 'membrane:tip').map(({ values }) => values[0]);
    // The tip has not come back from the step 6 ms after its end: later sweeps start off the operating point.
    expect(Math.abs((starts[1] ?? 0) - (starts[0] ?? 0))).toBeGreaterThan(0.1);
  });

  it.each([false, true])('shows the membrane at any compartment later; sweeps carry over: %s', async (carryOver) => {
    const own = await inNotebook();
    const plan = smallPlan();
    const changed = { ...plan, protocol: { ...plan.protocol, carryOver, sweepInterval_ms: 31 } };
    const rehearsalId = await rehearsed(own, changed);
    const stored = value(await own.ask('rehearsal traces', { rehearsalId, sweeps: [2] }));
    // Compartment 2 is "far", where the plan's own probe is: the run is made again and must agree to the last bit.
    const again = value(await own.ask('rehearsal membrane', { rehearsalId, compartment: 2, sweep: 2 }));
    expect(again.values).toEqual(stored.find(({ key }) => key === 'membrane:tip')?.values);
    const beyond = await own.ask('rehearsal membrane', { rehearsalId, compartment: 3, sweep: 0 });
    expect(refusals(beyond)[0]).toMatchObject({ code: 'quantity-out-of-range', value: '3' });
  });

  it('may be run again as it is, under one version of its plan', async () => {
    const own = await inNotebook();
    const plan = smallPlan();
    const { planId } = value(await own.ask('plan create', { plan }));
    for (const jobId of ['one', 'two']) value(await own.ask('rehearsal start', { jobId, planId, plan }));
    const list = value(await own.ask('rehearsal list', { planId }));
    expect(list.map(({ rehearsalId }) => rehearsalId)).toEqual([2, 1]);
    expect(list[0]?.hashes).toEqual(list[1]?.hashes);
  });

  it('stops with a refusal when a worker dies twice over it, and stores nothing', async () => {
    writeFileSync(
      at('mortal.mjs'),
      "import { parentPort } from 'node:worker_threads'; parentPort.on('message', () => process.exit(3));",
    );
    const own = await inNotebook({ workerProgram: at('mortal.mjs') });
    const deaths: EngineEvent[] = [];
    own.onEvent((event) => {
      if (event.event === 'worker restarted') deaths.push(event);
    });
    const { planId } = value(await own.ask('plan create', { plan: smallPlan() }));
    const answer = await own.ask('rehearsal start', { jobId: 'job', planId, plan: smallPlan() });
    expect(refusals(answer)[0]?.code).toBe('worker-stopped');
    expect(deaths).toHaveLength(2);
    expect(value(await own.ask('rehearsal list', { planId }))).toEqual([]);
  });

  it('answers short questions while every worker is busy', async () => {
    const own = await inNotebook();
    const plan = longPlan(1000);
    const { planId } = value(await own.ask('plan create', { plan }));
    const running = own.ask('rehearsal start', { jobId: 'job', planId, plan });
    // The job takes minutes: an answer before its end is an answer beside it.
    const estimate = value(await own.ask('estimate passive', { plan: smallPlan() }));
    expect(estimate.inputResistance_MOhm).toBeGreaterThan(0);
    const twice = await own.ask('rehearsal start', { jobId: 'job', planId, plan });
    expect(refusals(twice)[0]).toMatchObject({ code: 'request-malformed', place: 'question.jobId' });
    value(await own.ask('job cancel', { jobId: 'job' }));
    expect(value(await running)).toMatchObject({ kind: 'cancelled' });
  });
});

describe('a rehearsal that is running while the notebook is changed', () => {
  /** Started, and its sweeps under way: most of its time is still to come. */
  async function running(own: Engine) {
    const plan = longPlan(5);
    const { planId } = value(await own.ask('plan create', { plan }));
    const underWay = new Promise<void>((resolve) => {
      own.onEvent((event) => {
        if (event.event === 'progress' && event.jobId === 'job' && event.done > 0) resolve();
      });
    });
    const outcome = own.ask('rehearsal start', { jobId: 'job', planId, plan });
    await underWay;
    return { planId, outcome };
  }

  it('is kept in the copy when the notebook is saved under another name', async () => {
    const own = await inNotebook();
    const { planId, outcome } = await running(own);
    value(await own.ask('notebook save as', { path: at('b.holdfast') }));
    expect(value(await outcome)).toMatchObject({ kind: 'finished' });
    expect(value(await own.ask('rehearsal list', { planId }))).toHaveLength(1);
    const first = openNotebook(at('a.holdfast'));
    expect(first.readOnlyReason).toBeNull(); // closed, and nobody's
    expect(rehearsalsOfPlan(first, planId)).toEqual([]);
    first.close();
  });

  it('is kept where it was asked for when another notebook is opened, which is then closed', async () => {
    const own = await inNotebook();
    const { planId, outcome } = await running(own);
    value(await own.ask('notebook create', { path: at('b.holdfast') }));
    expect(value(await outcome)).toMatchObject({ kind: 'finished' });
    expect(value(await own.ask('notebook overview', {})).cells).toEqual([]);
    const first = openNotebook(at('a.holdfast'));
    expect(first.readOnlyReason).toBeNull();
    expect(rehearsalsOfPlan(first, planId)).toHaveLength(1);
    first.close();
  });

  it('does not keep its notebook from being written when one goes back to it', async () => {
    const own = await inNotebook();
    const { planId, outcome } = await running(own);
    value(await own.ask('notebook create', { path: at('b.holdfast') }));
    expect(value(await own.ask('notebook open', { path: at('a.holdfast') })).readOnly).toBe(false);
    expect(value(await outcome)).toMatchObject({ kind: 'finished' });
    expect(value(await own.ask('rehearsal list', { planId }))).toHaveLength(1);
    expect(existsSync(at('b.holdfast-lock'))).toBe(false);
  });
});

it.each([[null], [undefined], [{}], [{ call: 1, name: 3, question: null }]])(
  'answers what is no call at all: %j',
  async (call) => {
    engine = createEngine({ workers: 1, log: () => undefined });
    expect((await engine.handle(call as never)).ok).toBe(false);
  },
);

describe('what saves itself', () => {
  it('is not written into another notebook that was opened meanwhile', async () => {
    const own = await inNotebook();
    const { planId, cellId } = value(await own.ask('plan create', { plan: smallPlan() }));
    const { sessionId } = value(await own.ask('session create', { cellId, date: '2026-03-14' }));
    value(await own.ask('notebook create', { path: at('b.holdfast') }));
    const other = value(await own.ask('plan create', { plan: smallPlan({ name: 'Another' }) }));
    value(await own.ask('session create', { cellId: other.cellId, date: '2026-03-15' }));
    expect(other.planId).toBe(planId); // the numbers begin anew in each notebook

    const notebook = at('a.holdfast');
    const late = await own.ask('plan keep draft', { planId, plan: smallPlan({ name: 'Late' }), notebook });
    expect(refusals(late)[0]).toMatchObject({ code: 'notebook-record-missing', place: notebook });
    const notes = await own.ask('session write', { sessionId, title: 'Late', notes: '', notebook });
    expect(refusals(notes)[0]).toMatchObject({ code: 'notebook-record-missing', place: notebook });
    expect(value(await own.ask('plan open', { planId })).plan.name).toBe('Another');
    expect(value(await own.ask('session read', { sessionId })).title).toBe('');

    value(await own.ask('notebook open', { path: notebook }));
    value(await own.ask('plan keep draft', { planId, plan: smallPlan({ name: 'Late' }), notebook }));
    expect(value(await own.ask('plan open', { planId })).plan.name).toBe('Late');
  });
});

describe('cells and plans from outside', () => {
  it('makes a cell around a shape file, its membrane assumed and said so', async () => {
    const own = await inNotebook();
    const swc = '1 1 0 0 0 10 -1\n2 3 10 0 0 1 1\n3 3 110 0 0 1 2\n';
    const bytes = new TextEncoder().encode(swc);
    const { cell, report } = value(await own.ask('cell import', { name: 'ball.swc', bytes }));
    expect(report.outcome).not.toBe('refuse');
    expect(cell).toMatchObject({ name: 'ball', regions: [{ name: 'soma' }, { name: 'basal' }] });
    expect(cell?.note).toContain('assumed');
    if (!cell) throw new Error('no cell');
    const drawing = value(await own.ask('cell drawing', { cell, sites: [{ branch: 0, at_um: 0 }] }));
    expect(drawing.inputResistance_MOhm).toBeGreaterThan(0);
    const none = value(await own.ask('cell import', { name: 'x.swc', bytes: new TextEncoder().encode('no shape\n') }));
    expect(none).toMatchObject({ cell: null, report: { outcome: 'refuse' } });
  });

  it.each(['12_utf16.swc', '13_latin1_comment.swc'])('can cut the cell that it imports from %s', async (name) => {
    const own = await inNotebook();
    const bytes = new Uint8Array(readFileSync(fileURLToPath(new URL(`../support/swc-cases/${name}`, import.meta.url))));
    const { cell } = value(await own.ask('cell import', { name, bytes }));
    if (!cell) throw new Error('no cell');
    expect(value(await own.ask('cell drawing', { cell, sites: [] })).compartments.count).toBeGreaterThan(1);
    expect(JSON.stringify(cell)).not.toContain('\ufffd');
  });

  it('imports the plan that it exports, and no plan that names files', async () => {
    const own = await inNotebook();
    const plan = smallPlan();
    const file = value(await own.ask('export plan', { plan }));
    expect(value(await own.ask('import plan', file)).plan).toEqual(plan);
    const text = JSON.stringify({ ...plan, rig: { file: '../../etc/rig.json' } });
    const refused = await own.ask('import plan', { name: 'p.json', text });
    expect(refusals(refused)[0]?.code).toBe('file-outside-folder');
  });

  it('exports traces, forecast and figure of a stored rehearsal', async () => {
    const own = await inNotebook();
    const rehearsalId = await rehearsed(own, smallPlan());
    expect(value(await own.ask('export traces', { rehearsalId }))).toHaveLength(3);
    expect(value(await own.ask('export forecast', { rehearsalId })).text).toContain('"kind": "forecast"');
    expect(value(await own.ask('export figure', { rehearsalId })).text).toMatch(/^<svg /);
    expect(refusals(await own.ask('export figure', { rehearsalId: 99 }))[0]?.code).toBe('notebook-record-missing');
  });
});

describe('the first start', () => {
  it('makes a notebook of example cells and plans, one rehearsed and shown first', async () => {
    engine = createEngine({ workers: 2, notebookPath: at('new/Notebook.holdfast'), log: () => undefined });
    const overview = value(await engine.ask('notebook overview', {}));
    expect(overview.status).toMatchObject({ name: 'Notebook', readOnly: false });
    expect(overview.cells.length).toBeGreaterThan(1);
    const plans = overview.cells.flatMap((cell) => cell.plans);
    const rehearsedPlans = plans.filter((plan) => plan.rehearsedAt !== null);
    expect(rehearsedPlans.map((plan) => plan.planId)).toEqual([overview.openPlanId]);
    for (const cell of overview.cells) {
      expect(cell.sessions).toHaveLength(1);
      const sessionId = cell.sessions[0]?.sessionId ?? 0;
      expect(value(await engine.ask('session read', { sessionId })).notes).toContain('invented');
    }
    for (const { planId } of plans) {
      const { plan } = value(await engine.ask('plan open', { planId }));
      expect(value(await engine.ask('plan check', { plan })).refusals).toEqual([]);
    }
  });

  it('answers with the reason while its notebook cannot be opened, and goes on with another', async () => {
    writeFileSync(at('letter.holdfast'), 'dear reader');
    engine = createEngine({ workers: 1, notebookPath: at('letter.holdfast'), log: () => undefined });
    expect(refusals(await engine.ask('notebook overview', {}))[0]?.code).toBe('file-not-a-notebook');
    expect(value(await engine.ask('engine about', {})).program).toBe('Holdfast');
    value(await engine.ask('notebook create', { path: at('b.holdfast') }));
    expect(value(await engine.ask('notebook overview', {})).cells).toEqual([]);
  });
});
