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

export class FinerRuns {
  readonly #pool: Pool;
  readonly #emit: (event: EngineEvent) => void;
  readonly #waiting: FinerRun[] = [];
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

  add(run: FinerRun): void {
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
    const nothing = () => undefined;
    const sent = { ...run.sent, finer: true };
    const running = startRun(this.#pool, sent, run.sweeps, { onProgress: nothing, onSweep: nothing });
    this.#running = running;
    running.outcome
      .then((outcome) => {
        if (outcome.kind === 'cancelled') return;
        const done = this.#waiting.shift();
        if (outcome.kind === 'finished') this.#keep(done ?? run, outcome.forecast);
      })
      .catch((cause: unknown) => {
        // The rehearsal stands without it; its uncertainty stays pending. The log keeps the reason.
        this.#waiting.shift();
        if (!this.#stopped) console.error(`finer run of rehearsal ${run.rehearsalId}:`, cause);
      })
      .finally(() => {
        this.#running = null;
        this.#next();
      });
  }

  #keep(run: FinerRun, fine: Forecast): void {
    // The user may have gone on with another notebook meanwhile.
    if (!run.notebook.db.open) return;
    storeNumerical(run.notebook, run.rehearsalId, numericalUncertainty(run.forecast, fine));
    this.#emit({ event: 'numerical', rehearsalId: run.rehearsalId });
  }
}
