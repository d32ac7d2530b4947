// What the handlers work with: the open notebook, the workers, the jobs in hand.
import type { EngineEvent } from '../contract/requests.ts';
import type { Notebook } from '../notebook/open.ts';
import { refuse } from '../units/refuse.ts';
import { FinerRuns } from './finer-runs.ts';
import type { Pool } from './pool.ts';

/** A job in hand, from the asking to the answer. */
interface Job {
  readonly cancel: () => void;
  /** Where what it makes is kept: the copy, once its notebook was saved under another name. */
  notebook: Notebook;
}

export class Desk {
  readonly pool: Pool;
  readonly emit: (event: EngineEvent) => void;
  readonly finer: FinerRuns;
  readonly #jobs = new Map<string, Job>();
  #notebook: Notebook | null = null;
  /** Not the user's any more, but jobs have yet to keep in them what they make. */
  readonly #left = new Set<Notebook>();
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

  /** The open notebook, if it is the one that was meant. @throws Refusal `notebook-record-missing` when it is another. */
  notebookAt(path: string | undefined): Notebook {
    if (path === undefined || path === this.notebook.path) return this.notebook;
    const remedy = 'open that notebook again; nothing was written to this one';
    return refuse('notebook-record-missing', { thing: 'notebook', place: path, value: 'not open any more', remedy });
  }

  get notebookPath(): string | null {
    return this.#notebook?.path ?? null;
  }

  /** Goes on with another notebook; the one before is closed as soon as no job is to keep anything in it. */
  takeNotebook(next: Notebook): void {
    const before = this.#notebook;
    this.#notebook = next;
    if (!before) return;
    this.#left.add(before);
    this.#closeLeft();
  }

  /** Goes on in a copy of the open notebook, and so do its jobs and finer runs. */
  takeCopy(copy: Notebook): void {
    for (const job of this.#jobs.values()) if (job.notebook === this.#notebook) job.notebook = copy;
    this.finer.move(this.notebook, copy);
    this.takeNotebook(copy);
  }

  /** Goes back to a notebook that a job still has open; false when there is none at that real path. */
  takeBack(path: string): boolean {
    const back = [...this.#left].find((notebook) => notebook.path === path);
    if (!back) return false;
    this.#left.delete(back);
    this.takeNotebook(back);
    return true;
  }

  #closeLeft(): void {
    const inUse = new Set([...this.#jobs.values()].map((job) => job.notebook));
    for (const notebook of this.#left) {
      if (inUse.has(notebook)) continue;
      this.#left.delete(notebook);
      notebook.close();
    }
  }

  /** Every question of the notebook is answered by this until one is open. */
  stayClosed(because: unknown): void {
    this.#closedBecause = because;
  }

  /**
   * Runs a job that its `cancel` can end; finer runs wait meanwhile. What the job makes belongs into `job.notebook` as it
   * is at that moment, which stays open till the job ends.
   * @throws Refusal `request-malformed` for an id in use.
   */
  async inJob<T>(jobId: string, job: Job, work: (job: Readonly<Job>) => Promise<T>): Promise<T> {
    if (this.#jobs.has(jobId)) {
      const remedy = 'choose another, or wait for that job to end';
      refuse('request-malformed', { thing: 'job', place: 'question.jobId', value: jobId, remedy });
    }
    this.#jobs.set(jobId, job);
    this.finer.pause();
    try {
      return await work(job);
    } finally {
      this.#jobs.delete(jobId);
      this.#closeLeft();
      if (this.#jobs.size === 0) this.finer.resume();
    }
  }

  /** True when the job was there to be cancelled. */
  cancel(jobId: string): boolean {
    const job = this.#jobs.get(jobId);
    job?.cancel();
    return job !== undefined;
  }

  async close(): Promise<void> {
    this.finer.stop();
    for (const job of this.#jobs.values()) job.cancel();
    await this.pool.close();
    for (const notebook of this.#left) notebook.close();
    this.#left.clear();
    this.#notebook?.close();
    this.#notebook = null;
  }
}
