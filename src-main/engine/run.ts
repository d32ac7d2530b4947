// A rehearsal as a job: its sweeps spread over the workers, progress with time left, cancel at once, one answer.
import type { PlanDocument } from '../contract/documents.ts';
import type { RefusalData } from '../contract/refusal.ts';
import type { Forecast } from '../contract/results.ts';
import { deathRefusal, WorkerDeath, type Pool } from './pool.ts';
import { Progress } from './progress.ts';
import type { SentPlan, SentSweep, WorkAnswer } from './work.ts';

export interface RunWishes {
  /** False: only the forecast is wanted, and traces are let go as they arrive. */
  readonly keepsTraces: boolean;
  readonly onProgress: (done: number, left_s: number | null) => void;
  readonly onSweep: (sweep: SentSweep) => void;
}

export type RunOutcome =
  | { readonly kind: 'finished'; readonly sweeps: readonly SentSweep[]; readonly forecast: Forecast }
  | { readonly kind: 'cancelled'; readonly sweepsDone: number }
  | { readonly kind: 'stopped'; readonly refusal: RefusalData };

/** One run of all sweeps of a plan. `outcome` settles at once when cancelled; the workers follow within a few steps. */
export interface Run {
  readonly outcome: Promise<RunOutcome>;
  readonly cancel: () => void;
}

/**
 * Starts a run. Sweeps that start afresh go to whichever worker is free; sweeps that carry over go to one worker in order.
 * The outcome rejects with a Refusal where the plan cannot run, with an Error for a bug.
 */
export function startRun(pool: Pool, sent: SentPlan, count: number, wishes: RunWishes): Run {
  const flag = new Int32Array(new SharedArrayBuffer(4));
  const arrived = new Map<number, SentSweep>();
  const progress = new Progress(count, wishes.onProgress);
  let settle: (outcome: RunOutcome) => void = () => undefined;
  const cancelled = new Promise<RunOutcome>((resolve) => (settle = resolve));

  const pieces = batches(sent.plan, count).map((sweeps, piece) =>
    pool
      .run(
        'long',
        'sweeps',
        { sent, sweeps },
        {
          cancel: flag,
          onProgress: (done) => progress.report(piece, done * sweeps.length),
          onPart: (sweep) => {
            if (Atomics.load(flag, 0) !== 0) return;
            arrived.set(sweep.sweep, wishes.keepsTraces ? sweep : { ...sweep, traces: [] });
            wishes.onSweep(sweep);
          },
        },
      )
      .then((answer) => {
        if (answer.kind === 'done') progress.report(piece, sweeps.length);
        else Atomics.store(flag, 0, 1);
        return answer;
      }),
  );
  const swept = Promise.all(pieces)
    .then(async (answers): Promise<RunOutcome> => {
      const ending = worstOf(answers);
      if (ending.kind === 'stopped') return ending;
      if (ending.kind === 'cancelled') return { kind: 'cancelled', sweepsDone: arrived.size };
      const sweeps = [...arrived.values()].toSorted((a, b) => a.sweep - b.sweep);
      const forecast = await pool.run('long', 'gather', { sent, sweeps: sweeps.map(withoutTraces) });
      return { kind: 'finished', sweeps, forecast };
    })
    .catch((cause: unknown): RunOutcome => {
      Atomics.store(flag, 0, 1);
      if (cause instanceof WorkerDeath) return { kind: 'stopped', refusal: deathRefusal(cause) };
      throw cause;
    });
  return {
    outcome: Promise.race([cancelled, swept]).finally(() => progress.end()),
    cancel: () => {
      Atomics.store(flag, 0, 1);
      settle({ kind: 'cancelled', sweepsDone: arrived.size });
    },
  };
}

function withoutTraces(sweep: SentSweep): Omit<SentSweep, 'traces'> {
  const { kind, clamp, readings, largestCurrent_pA } = sweep;
  return { kind, sweep: sweep.sweep, clamp, readings, largestCurrent_pA };
}

function batches(plan: PlanDocument, count: number): number[][] {
  const all = Array.from({ length: count }, (_, sweep) => sweep);
  return plan.protocol.carryOver ? [all] : all.map((sweep) => [sweep]);
}

function worstOf(answers: readonly WorkAnswer<'sweeps'>[]): WorkAnswer<'sweeps'> {
  return (
    answers.find(({ kind }) => kind === 'stopped') ??
    answers.find(({ kind }) => kind === 'cancelled') ?? { kind: 'done' }
  );
}
