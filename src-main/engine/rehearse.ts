// From the question "rehearse this plan" to a rehearsal in the notebook.
import type { CheckedQuestion } from '../contract/requests.ts';
import type { RehearsalOutcome } from '../contract/results.ts';
import { mustBeWritable, type Notebook } from '../notebook/open.ts';
import { readPlan } from '../notebook/plans.ts';
import { storeRehearsal } from '../notebook/rehearsals.ts';
import { hashOf } from '../notebook/written.ts';
import { Refusal } from '../units/refuse.ts';
import type { Desk } from './desk.ts';
import { startRun, type Run, type RunOutcome } from './run.ts';
import { thinned } from './thin.ts';
import { engineVersion } from './version.ts';
import type { SentPlan, SentSweep } from './work.ts';
import { writtenPlan, type WrittenPlan } from './written.ts';

/** Points of a trace while the job runs: what a screen is wide. The notebook keeps them all. */
const pointsOnArrival = 2000;

export interface RehearsalJob {
  readonly jobId: string;
  readonly planId: number;
  readonly sessionId: number | null;
  readonly documents: WrittenPlan;
}

/** The question as a job on the open notebook. @throws Refusal as `rehearseInto`. */
export function rehearse(desk: Desk, question: CheckedQuestion<'rehearsal start'>): Promise<RehearsalOutcome> {
  const { jobId, planId, sessionId, plan } = question;
  const documents = writtenPlan(plan);
  return rehearseInto(desk, desk.notebook, { jobId, planId, sessionId: sessionId ?? null, documents });
}

/**
 * Rehearses a plan and stores the rehearsal whole; nothing is stored of one that was cancelled or stopped. It is stored
 * where it was asked for, whatever notebook is opened meanwhile; in the copy, when that notebook is saved under another
 * name. A finer run for its numerical uncertainty follows when nothing else is to be done.
 * @throws Refusal where the plan cannot run, the notebook cannot be written, or the plan or session is not in it.
 */
export async function rehearseInto(desk: Desk, notebook: Notebook, job: RehearsalJob): Promise<RehearsalOutcome> {
  const { jobId, planId, sessionId, documents } = job;
  mustBeWritable(notebook);
  readPlan(notebook, planId);
  const plan = documents.plan.document;
  const sent: SentPlan = { key: hashOf(documents.plan.text), plan, finer: false };
  const started = performance.now();
  const running: { run: Run | null; cancelled: boolean } = { run: null, cancelled: false };
  const cancel = () => {
    running.cancelled = true;
    running.run?.cancel();
  };
  return desk.inJob(jobId, { notebook, cancel }, async (kept) => {
    const check = await desk.pool.run('short', 'check', { plan });
    const [first, ...others] = check.refusals;
    if (first) throw new Refusal([first, ...others]);
    if (running.cancelled) return { kind: 'cancelled', sweepsDone: 0 };
    running.run = startRun(desk.pool, sent, check.sweeps, {
      keepsTraces: true,
      onProgress: (done, left_s) => desk.emit({ event: 'progress', jobId, what: 'sweeps', done, left_s }),
      onSweep: (sweep) => desk.emit({ event: 'sweep', jobId, arrived: arrival(sweep, check.sweeps) }),
    });
    const outcome = await running.run.outcome;
    if (outcome.kind !== 'finished') return outcome;
    const { compartments, step_us, sweeps } = check;
    const wall_s = (performance.now() - started) / 1000;
    const facts = { planId, sessionId, ...documents, engineVersion, step_us, compartments, sweeps, wall_s };
    const rehearsalId = store(kept.notebook, facts, outcome);
    desk.finer.add({ notebook: kept.notebook, rehearsalId, sent, sweeps, forecast: outcome.forecast });
    return { kind: 'finished', rehearsalId };
  });
}

type Facts = Omit<Parameters<typeof storeRehearsal>[1], 'forecast' | 'traces'>;

function store(notebook: Notebook, facts: Facts, run: Extract<RunOutcome, { kind: 'finished' }>): number {
  const traces = run.sweeps.flatMap((sweep) => sweep.traces);
  return storeRehearsal(notebook, { ...facts, forecast: run.forecast, traces });
}

function arrival({ sweep, traces }: SentSweep, sweeps: number) {
  return { sweep, sweeps, traces: traces.map((trace) => thinned(trace, pointsOnArrival)) };
}
