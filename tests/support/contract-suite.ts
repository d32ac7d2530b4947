// What every shell promises of the engine behind it. Each shell's test opens the engine its own way and runs these.
import { copyFileSync, existsSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { planSchema, type PlanDocument } from '../../src-main/contract/documents.ts';
import type { Answer, Answers, EngineEvent, Question, RequestName } from '../../src-main/contract/requests.ts';
import { testFolder } from './folder.ts';
import { longPlan, smallPlan } from './small-plans.ts';

/** A line to an engine that has a notebook open at `path`, or opens one there when asked. */
export interface Opened {
  ask<N extends RequestName>(name: N, question: Question<N>): Promise<Answer<Answers[N]>>;
  onEvent(listener: (event: EngineEvent) => void): () => void;
  close(): Promise<void>;
}
export interface OpenWishes {
  /** Another program for the workers; shells that cannot pass it on leave that test out. */
  readonly workerProgram?: string;
}
export type Open = (wishes?: OpenWishes) => Promise<Opened>;

/** Generous for a machine shared by others: the promise to a user is 100 ms on one that is not; the time is printed. */
const cancelBound_ms = 1000;

/**
 * @param open gives an engine of its own for each test; whatever notebook it starts with is not used.
 * @param dyingWorker a worker program that ends its process at its first sweep ever; absent where none can be passed.
 */
export function contractSuite(shell: string, open: Open, dyingWorker?: string): void {
  const at = testFolder();

  async function inNotebook<T>(work: (engine: Opened) => Promise<T>, wishes?: OpenWishes): Promise<T> {
    const engine = await open(wishes);
    try {
      value(await engine.ask('notebook create', { path: at('a.holdfast') }));
      return await work(engine);
    } finally {
      await engine.close();
    }
  }

  describe(`contract, ${shell}`, () => {
    it('makes, opens and saves notebooks as, and goes on in the copy', async () => {
      await inNotebook(async (engine) => {
        value(await engine.ask('plan create', { plan: smallPlan() }));
        const status = value(await engine.ask('notebook save as', { path: at('b.holdfast') }));
        expect(status).toMatchObject({ path: at('b.holdfast'), name: 'b', readOnly: false });
        expect(existsSync(at('a.holdfast'))).toBe(true);
        value(await engine.ask('notebook open', { path: at('a.holdfast') }));
        const overview = value(await engine.ask('notebook overview', {}));
        expect(overview.status.path).toBe(at('a.holdfast'));
        expect(overview.cells[0]?.plans[0]?.name).toBe('Three steps');
      });
    });

    it('keeps a draft and shows its plan first on the next opening', async () => {
      const planId = await inNotebook(async (engine) => {
        const first = value(await engine.ask('plan create', { plan: smallPlan() }));
        value(await engine.ask('plan create', { plan: smallPlan({ name: 'Another' }), cellId: first.cellId }));
        value(await engine.ask('plan open', { planId: first.planId }));
        const edited = smallPlan({ note: 'edited' });
        value(await engine.ask('plan keep draft', { planId: first.planId, plan: edited }));
        return first.planId;
      });
      const engine = await open();
      value(await engine.ask('notebook open', { path: at('a.holdfast') }));
      expect(value(await engine.ask('notebook overview', {})).openPlanId).toBe(planId);
      expect(value(await engine.ask('plan open', { planId })).plan.note).toBe('edited');
      await engine.close();
    });

    it('rehearses: sweeps and progress as events, then a forecast and traces in typed arrays', async () => {
      await inNotebook(async (engine) => {
        const events: EngineEvent[] = [];
        engine.onEvent((event) => events.push(event));
        const rehearsalId = await rehearsed(engine, smallPlan());
        const arrived = events.flatMap((each) => (each.event === 'sweep' ? [each] : []));
        expect(arrived.map((each) => each.arrived.sweep).toSorted()).toEqual([0, 1, 2]);
        expect(arrived.every((each) => each.jobId === 'job' && each.arrived.sweeps === 3)).toBe(true);
        expect(arrived[0]?.arrived.traces[0]?.values).toBeInstanceOf(Float64Array);
        const progress = events.flatMap((each) =>
          each.event === 'progress' && each.jobId === 'job' ? [each.done] : [],
        );
        expect(progress[0]).toBe(0);
        expect(progress).toEqual(progress.toSorted((a, b) => a - b));

        const { forecast, summary, plan } = value(await engine.ask('rehearsal read', { rehearsalId }));
        expect(summary).toMatchObject({ planName: 'Three steps', sweeps: 3, compartments: 3 });
        expect(plan).toEqual(planSchema.parse(smallPlan()));
        const [listed] = value(await engine.ask('rehearsal list', { planId: summary.planId }));
        expect(listed).toEqual({ ...summary, rig: plan.rig, protocol: plan.protocol });
        expect(value(await engine.ask('export traces', { rehearsalId, asOne: true }))).toHaveLength(1);
        expect(summary.hashes.plan).toMatch(/^[0-9a-f]{64}$/);
        expect(forecast.clamp?.sweeps[0]?.steady_mV).toBeInstanceOf(Float64Array);
        expect(forecast.clamp?.sweeps[0]?.steady_mV).toHaveLength(3);
        const ofWorst = forecast.clamp?.sweeps.find(({ sweep }) => sweep === forecast.clamp?.worstSweep)?.reachByRegion;
        expect(ofWorst).toEqual(forecast.clamp?.reachByRegion.map(({ region, reach }) => ({ region, reach })));
        expect(forecast.readings[0]?.recorded).toBeInstanceOf(Float64Array);
        const traces = value(await engine.ask('rehearsal traces', { rehearsalId, sweeps: [2] }));
        expect(traces.map((trace) => trace.key)).toEqual(
          expect.arrayContaining(['recording:A', 'command:A', 'membrane:A', 'membrane:tip']),
        );
        // 30 ms at 50 µs: samples 0 to 600.
        for (const trace of traces) expect(trace.values).toHaveLength(601);
      });
    });

    it('says how far numerics can be trusted, some time after', async () => {
      await inNotebook(async (engine) => {
        const numerical = new Promise<number>((resolve) => {
          engine.onEvent((event) => {
            if (event.event === 'numerical') resolve(event.rehearsalId);
          });
        });
        const rehearsalId = await rehearsed(engine, smallPlan());
        expect(await numerical).toBe(rehearsalId);
        const { forecast } = value(await engine.ask('rehearsal read', { rehearsalId }));
        expect(forecast.numerical.state).toBe('computed');
        expect(forecast.numerical.clampError_mV).toBeGreaterThanOrEqual(0);
      });
    });

    it('cancels at once, stores nothing and is free for the next job', async () => {
      await inNotebook(async (engine) => {
        const { planId } = value(await engine.ask('plan create', { plan: longPlan(1000) }));
        const started = firstEvent(engine, 'progress');
        const outcome = engine.ask('rehearsal start', { jobId: 'job', planId, plan: longPlan(1000) });
        await started;
        const asked = performance.now();
        expect(value(await engine.ask('job cancel', { jobId: 'job' })).wasRunning).toBe(true);
        expect(value(await outcome)).toMatchObject({ kind: 'cancelled' });
        const took = performance.now() - asked;
        console.log(`${shell}: cancelled after ${took.toFixed(1)} ms`);
        expect(took).toBeLessThan(cancelBound_ms);
        expect(value(await engine.ask('rehearsal list', { planId }))).toEqual([]);
        expect(value(await engine.ask('job cancel', { jobId: 'job' })).wasRunning).toBe(false);
        await rehearsed(engine, smallPlan());
      });
    });

    it('answers faults of a question with their paths, and of a plan with their places', async () => {
      await inNotebook(async (engine) => {
        const odd = engine.ask('plan open', { planId: -1, zeal: 1 } as unknown as { planId: number });
        expect(refusals(await odd)).toEqual([
          expect.objectContaining({ code: 'request-malformed', place: expect.stringContaining('planId') }),
          expect.objectContaining({ code: 'request-malformed', place: expect.stringContaining('zeal') }),
        ]);
        const unknown = engine.ask('plan bake' as 'plan open', { planId: 1 });
        expect(refusals(await unknown)[0]?.code).toBe('request-malformed');

        const plan = smallPlan();
        const pipettes = plan.rig.pipettes.map((pipette) => ({ ...pipette, site: { compartment: 'nowhere' } }));
        const lost = { ...plan, rig: { ...plan.rig, pipettes } };
        const { planId } = value(await engine.ask('plan create', { plan: lost }));
        const check = value(await engine.ask('plan check', { plan: lost }));
        expect(check.refusals[0]).toMatchObject({
          code: 'site-off-the-cell',
          place: expect.stringContaining('rig.pipettes[0].site'),
        });
        const started = await engine.ask('rehearsal start', { jobId: 'job', planId, plan: lost });
        expect(refusals(started)).toEqual(check.refusals);
      });
    });

    it.skipIf(dyingWorker === undefined)('reports a worker that dies, and finishes the job all the same', async () => {
      await inNotebook(
        async (engine) => {
          const restarted = firstEvent(engine, 'worker restarted');
          await rehearsed(engine, smallPlan());
          await restarted;
        },
        dyingWorker === undefined ? {} : { workerProgram: dyingWorker },
      );
    });

    it('shows rehearsals again as they were stored, without running anything', async () => {
      const before = await inNotebook(async (engine) => {
        const rehearsalId = await rehearsed(engine, smallPlan());
        return {
          rehearsalId,
          read: value(await engine.ask('rehearsal read', { rehearsalId })),
          traces: value(await engine.ask('rehearsal traces', { rehearsalId })),
        };
      });
      // Workers that cannot even start: whatever is answered now was not computed.
      const engine = await open({ workerProgram: at('no-such-worker.cjs') });
      value(await engine.ask('notebook open', { path: at('a.holdfast') }));
      const { rehearsalId } = before;
      const after = value(await engine.ask('rehearsal read', { rehearsalId }));
      expect({ ...after.forecast, numerical: null }).toEqual({ ...before.read.forecast, numerical: null });
      expect(after.summary).toEqual(before.read.summary);
      expect(value(await engine.ask('rehearsal traces', { rehearsalId }))).toEqual(before.traces);
      await engine.close();
    });

    it('lets a second program read but not write', async () => {
      await inNotebook(async (engine) => {
        const { planId } = value(await engine.ask('plan create', { plan: smallPlan() }));
        const second = await open();
        const status = value(await second.ask('notebook open', { path: at('a.holdfast') }));
        expect(status.readOnly).toBe(true);
        expect(status.readOnlyReason).toContain('another program');
        expect(value(await second.ask('plan open', { planId })).plan).toEqual(smallPlan());
        const draft = await second.ask('plan keep draft', { planId, plan: smallPlan({ note: 'mine' }) });
        expect(refusals(draft)[0]?.code).toBe('notebook-read-only');
        const job = await second.ask('rehearsal start', { jobId: 'job', planId, plan: smallPlan() });
        expect(refusals(job)[0]?.code).toBe('notebook-read-only');
        await second.close();
      });
    });

    it('leaves files alone that are no notebooks', async () => {
      await inNotebook(async (engine) => {
        copyFileSync(new URL(import.meta.url), at('suite.ts'));
        expect(refusals(await engine.ask('notebook open', { path: at('suite.ts') }))[0]?.code).toBe(
          'file-not-a-notebook',
        );
        expect(refusals(await engine.ask('notebook open', { path: at('none') }))[0]?.code).toBe('file-not-found');
        expect(refusals(await engine.ask('notebook create', { path: at('suite.ts') }))[0]?.code).toBe('file-exists');
        expect(value(await engine.ask('notebook status', {})).path).toBe(at('a.holdfast'));
      });
    });
  });
}

/** The answer's value; fails the test when it was refused. */
export function value<T>(answer: Answer<T>): T {
  if (answer.ok) return answer.value;
  return expect.fail('fault' in answer ? `fault: ${answer.fault}` : JSON.stringify(answer.refusals, null, 1));
}

/** What an answer refuses; fails the test when it does not. */
export function refusals(answer: Answer) {
  if (!answer.ok && 'refusals' in answer) return answer.refusals;
  return expect.fail(answer.ok ? 'nothing was refused' : `fault: ${answer.fault}`);
}

/** Keeps a plan and rehearses it as job "job"; its number once it is finished. */
export async function rehearsed(engine: Opened, plan: PlanDocument): Promise<number> {
  const { planId } = value(await engine.ask('plan create', { plan }));
  const outcome = value(await engine.ask('rehearsal start', { jobId: 'job', planId, plan }));
  return outcome.kind === 'finished' ? outcome.rehearsalId : expect.fail(JSON.stringify(outcome));
}

function firstEvent(engine: Opened, name: EngineEvent['event']): Promise<void> {
  return new Promise((resolve) => {
    const stop = engine.onEvent((event) => {
      if (event.event !== name) return;
      stop();
      resolve();
    });
  });
}
