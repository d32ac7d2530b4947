// Long work under way: what, how far, time left. One list for the whole window.
import type { EngineEvent } from '../../src-main/contract/requests.ts';
import { ask } from './ask.ts';

export interface Job {
  readonly jobId: string;
  readonly what: string;
  /** What of it is under way: "sweeps", "forecast". */
  readonly stage: string;
  /** 0 to 1; null before the first word from the engine. */
  readonly done: number | null;
  readonly left_s: number | null;
  readonly isCancelling: boolean;
  /** Over in seconds: it says neither how far it is nor can it be cancelled. */
  readonly isBrief: boolean;
}

class JobsState {
  list = $state.raw<readonly Job[]>([]);

  /** @param only what it is at, for work that cannot tell how far it is and cannot be cancelled */
  begin(jobId: string, what: string, only = ''): void {
    const isBrief = only !== '';
    this.list = [...this.list, { jobId, what, stage: only, done: null, left_s: null, isCancelling: false, isBrief }];
  }

  end(jobId: string): void {
    this.list = this.list.filter((job) => job.jobId !== jobId);
  }

  hear(event: EngineEvent): void {
    if (event.event !== 'progress') return;
    this.list = this.list.map((job) =>
      job.jobId === event.jobId ? { ...job, stage: event.what, done: event.done, left_s: event.left_s } : job,
    );
  }

  async cancel(jobId: string): Promise<void> {
    this.list = this.list.map((job) => (job.jobId === jobId ? { ...job, isCancelling: true } : job));
    await ask('job cancel', { jobId });
  }
}

export const jobs = new JobsState();
