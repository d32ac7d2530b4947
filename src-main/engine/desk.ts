// What the handlers work with: the open notebook, the workers, the jobs in hand.
import type { EngineEvent } from '../contract/requests.ts';
import type { Notebook } from '../notebook/open.ts';
import { refuse } from '../units/refuse.ts';
import { FinerRuns } from './finer-runs.ts';
import type { Pool } from './pool.ts';

export class Desk {
  readonly pool: Pool;
  readonly emit: (event: EngineEvent) => void;
  readonly finer: FinerRuns;
  /** Cancels by job, from the asking to the answer. */
  readonly #jobs = new Map<string, () => void>();
  #notebook: Notebook | null = null;
  /** Why none is open: what opening said at the start. */
  #closedBecause: unknown = null;

  constructor(pool: Pool, emit: (event: EngineEvent) => void) {
    this.pool = pool;
    this.emit = emit;
    this.finer = new FinerRuns(pool, emit);
  }

  /** The open notebook. @throws what opening it threw, when that failed. */
  get notebook(): Notebook {
    if (this.#notebook) return this.#notebook;
    if (this.#closedBecause) throw this.#closedBecause as Error;
    return refuse('file-not-found', {
      thing: 'notebook',
      place: 'engine',
      value: 'none open',
      remedy: 'open a notebook or make a new one',
    });
  }

  get notebookPath(): string | null {
    return this.#notebook?.path ?? null;
  }

  /** Goes on with another notebook; the one before is closed after. */
  takeNotebook(next: Notebook): void {
    const before = this.#notebook;
    this.#notebook = next;
    before?.close();
  }

  /** Every question of the notebook is answered by this until one is open. */
  stayClosed(because: unknown): void {
    this.#closedBecause = because;
  }

  /** Runs a job that `cancel` can end; finer runs wait meanwhile. @throws Refusal `request-malformed` for an id in use. */
  async inJob<T>(jobId: string, cancel: () => void, work: () => Promise<T>): Promise<T> {
    if (this.#jobs.has(jobId)) {
      const remedy = 'choose another, or wait for that job to end';
      refuse('request-malformed', { thing: 'job', place: 'question.jobId', value: jobId, remedy });
    }
    this.#jobs.set(jobId, cancel);
    this.finer.pause();
    try {
      return await work();
    } finally {
      this.#jobs.delete(jobId);
      if (this.#jobs.size === 0) this.finer.resume();
    }
  }

  /** True when the job was there to be cancelled. */
  cancel(jobId: string): boolean {
    const cancel = this.#jobs.get(jobId);
    cancel?.();
    return cancel !== undefined;
  }

  async close(): Promise<void> {
    this.finer.stop();
    for (const cancel of this.#jobs.values()) cancel();
    await this.pool.close();
    this.#notebook?.close();
    this.#notebook = null;
  }
}
