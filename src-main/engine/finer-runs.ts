// After a rehearsal the same plan runs again, twice as finely, to tell how far its figures can be trusted. Such runs wait
// while any job is in hand, and start afresh when one cut in.
import type { EngineEvent } from '../contract/requests.ts';
import type { Forecast } from '../contract/results.ts';
import { numericalUncertainty } from './numerical.ts';
import type { Notebook } from '../notebook/open.ts';
import { storeNumerical } from '../notebook/rehearsals.ts';
import type { Pool } from './pool.ts';
import { startRun, type Run } from './run.ts';
import type { SentPlan } from './work.ts';

export interface FinerRun {
  readonly notebook: Notebook;
  readonly rehearsalId: number;
  /** Of the rehearsal as it ran. */
  readonly sent: SentPlan;
  readonly sweeps: number;
  readonly forecast: Forecast;
}

type Place = Pick<FinerRun, 'notebook' | 'rehearsalId'>;

/** Tells by a `numerical` event that a rehearsal's uncertainty is settled: read it again, it may have stayed pending. */
export class FinerRuns {
  readonly #pool: Pool;
  readonly #emit: (event: EngineEvent) => void;
  readonly #waiting: FinerRun[] = [];
  /** Failed ones among them: asked for again, they would only fail again. */
  readonly #settled: Place[] = [];
  #running: Run | null = null;
  #paused = false;
  #stopped = false;

  constructor(pool: Pool, emit: (event: EngineEvent) => void) {
    this.#pool = pool;
    this.#emit = emit;
  }

  /** Runs still to come go on in a copy of their notebook, where their rehearsals have the same numbers. */
  move(from: Notebook, to: Notebook): void {
    this.#waiting.forEach((run, at) => {
      if (run.notebook === from) this.#waiting[at] = { ...run, notebook: to };
    });
  }

  /** Adds a run, unless the same waits, runs, or has come to its end before. */
  add(run: FinerRun): void {
    const isSame = ({ notebook, rehearsalId }: Place) => notebook === run.notebook && rehearsalId === run.rehearsalId;
    if (this.#waiting.some(isSame) || this.#settled.some(isSame)) return;
    this.#waiting.push(run);
    this.#next();
  }

  pause(): void {
    this.#paused = true;
    this.#running?.cancel();
  }

  resume(): void {
    this.#paused = false;
    this.#next();
  }

  stop(): void {
    this.#stopped = true;
    this.#running?.cancel();
  }

  #next(): void {
    const [run] = this.#waiting;
    if (!run || this.#paused || this.#stopped || this.#running) return;
    const sent = { ...run.sent, finer: true };
    const jobId = `finer-${run.rehearsalId}`;
    const running = startRun(this.#pool, sent, run.sweeps, {
      keepsTraces: false,
      onProgress: (done, left_s) =>
        this.#emit({ event: 'progress', jobId, what: 'numerical uncertainty', done, left_s }),
      onSweep: () => undefined,
    });
    this.#running = running;
    void this.#finish(running).finally(() => {
      this.#running = null;
      this.#next();
    });
  }

  /** Keeps what the first waiting run found, unless it was cut short: then it waits on. */
  async #finish(running: Run): Promise<void> {
    try {
      const outcome = await running.outcome;
      if (outcome.kind === 'cancelled' || this.#stopped) return;
      const [run] = this.#waiting;
      if (run && outcome.kind === 'finished') this.#keep(run, outcome.forecast);
    } catch (cause) {
      // The rehearsal stands without it; its uncertainty stays pending. The log keeps the reason.
      if (!this.#stopped) console.error('finer run:', cause);
    }
    const settled = this.#waiting.shift();
    if (!settled) return;
    const { notebook, rehearsalId } = settled;
    this.#settled.push({ notebook, rehearsalId });
    this.#emit({ event: 'numerical', rehearsalId });
  }

  #keep(run: FinerRun, fine: Forecast): void {
    // The user may have gone on with another notebook meanwhile.
    if (!run.notebook.db.open) return;
    storeNumerical(run.notebook, run.rehearsalId, numericalUncertainty(run.forecast, fine));
  }
}
