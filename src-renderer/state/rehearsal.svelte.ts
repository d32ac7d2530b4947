// One run of the plan: started, arriving sweep by sweep, done, or why it did not get there.
import type { PlanDocument } from '../../src-main/contract/documents.ts';
import type { RefusalData } from '../../src-main/contract/refusal.ts';
import type { Answer, EngineEvent } from '../../src-main/contract/requests.ts';
import type {
  Forecast,
  RehearsalOutcome,
  RehearsalSummary,
  StoredRehearsal,
  SweepArrived,
  Trace,
} from '../../src-main/contract/results.ts';
import { ask, askOrSay } from './ask.ts';
import { jobs } from './jobs.svelte.ts';
import { notices } from './notices.svelte.ts';
import { planHash } from './plan-hash.ts';
import { plan } from './plan.svelte.ts';

export interface RunningRehearsal {
  readonly kind: 'running';
  readonly jobId: string;
  readonly plan: PlanDocument;
  /** 0 to 1. */
  readonly done: number;
  readonly left_s: number | null;
  readonly sweeps: readonly SweepArrived[];
}
export interface DoneRehearsal {
  readonly kind: 'done';
  readonly stored: StoredRehearsal;
  /** Every sweep; long traces are thinned by the engine. */
  readonly traces: readonly Trace[];
}
export type RehearsalStateKind =
  | { readonly kind: 'idle' }
  | RunningRehearsal
  | DoneRehearsal
  | { readonly kind: 'cancelled'; readonly sweepsDone: number }
  /** The physics or a worker stopped it. */
  | { readonly kind: 'stopped'; readonly refusal: RefusalData }
  | { readonly kind: 'refused'; readonly refusals: readonly RefusalData[] }
  | { readonly kind: 'failed'; readonly fault: string };

class RehearsalState {
  state = $state.raw<RehearsalStateKind>({ kind: 'idle' });
  /** The newest finished one of this plan, kept in sight while another runs. */
  last = $state.raw<DoneRehearsal | null>(null);
  list = $state.raw<readonly RehearsalSummary[]>([]);
  /** The very plan that `last` was run with; null until that is known. */
  #plan = $state.raw<PlanDocument | null>(null);

  /** What there is to draw: the arriving sweeps while running, else those of the last rehearsal. */
  readonly traces: readonly Trace[] = $derived.by(() =>
    this.state.kind === 'running' && this.state.sweeps.length > 0
      ? this.state.sweeps.flatMap((s) => s.traces)
      : (this.last?.traces ?? []),
  );
  readonly stored: StoredRehearsal | null = $derived(this.last?.stored ?? null);
  readonly forecast: Forecast | null = $derived(this.last?.stored.forecast ?? null);
  readonly isRunning = $derived(this.state.kind === 'running');
  /** The last rehearsal is of the plan as it stands now; else its figures are yesterday's. */
  readonly isCurrent = $derived(this.last !== null && plan.isOpen && this.#plan === plan.document);

  /** The session that a rehearsal of the open plan belongs to; undefined: none. */
  sessionNow: () => number | undefined = () => undefined;
  /** For other state: a rehearsal was stored. */
  whenStored: () => void = () => undefined;

  async start(): Promise<void> {
    if (plan.planId === null || this.isRunning) return;
    const document = plan.document;
    const planId = plan.planId;
    const jobId = crypto.randomUUID();
    this.state = { kind: 'running', jobId, plan: document, done: 0, left_s: null, sweeps: [] };
    jobs.begin(jobId, 'Rehearsal');
    const sessionId = this.sessionNow();
    const answer = await ask('rehearsal start', {
      jobId,
      planId,
      plan: document,
      ...(sessionId === undefined ? {} : { sessionId }),
    });
    jobs.end(jobId);
    if (!this.#isStill(jobId)) {
      this.#sayElsewhere(document.name, answer);
      return;
    }
    if (!answer.ok) {
      this.state =
        'refusals' in answer ? { kind: 'refused', refusals: answer.refusals } : { kind: 'failed', fault: answer.fault };
      return;
    }
    const outcome = answer.value;
    switch (outcome.kind) {
      case 'finished':
        await this.#fetch(outcome.rehearsalId, document, () => this.#isStill(jobId));
        this.whenStored();
        if (plan.planId === planId) this.list = (await askOrSay('rehearsal list', { planId })) ?? this.list;
        return;
      case 'cancelled':
        this.state = { kind: 'cancelled', sweepsDone: outcome.sweepsDone };
        return;
      case 'stopped':
        this.state = { kind: 'stopped', refusal: outcome.refusal };
        return;
      default:
        return outcome satisfies never;
    }
  }

  /** The window has gone on to another plan: nothing is shown, but what became of the run is said. */
  #sayElsewhere(name: string, answer: Answer<RehearsalOutcome>): void {
    if (!answer.ok) {
      if ('refusals' in answer) notices.refuse(answer.refusals);
      else notices.fault(`The rehearsal of “${name}” failed: ${answer.fault}. The notebook is whole.`);
    } else if (answer.value.kind === 'stopped') notices.refuse([answer.value.refusal]);
    else if (answer.value.kind === 'finished') {
      notices.say(`The rehearsal of “${name}” is in the notebook`);
      this.whenStored();
    }
  }

  cancel(): void {
    if (this.state.kind === 'running') void jobs.cancel(this.state.jobId);
  }

  /** After a plan was opened: shows its newest rehearsal, and finds out whether the plan was changed since. */
  async showNewest(document: PlanDocument, rehearsals: readonly RehearsalSummary[]): Promise<void> {
    this.state = { kind: 'idle' };
    this.last = null;
    this.#plan = null;
    this.list = rehearsals;
    const newest = rehearsals.reduce<RehearsalSummary | null>(
      (best, r) => (best === null || r.rehearsedAt > best.rehearsedAt ? r : best),
      null,
    );
    if (newest === null) return;
    await this.open(newest, document);
  }

  /** Shows a stored rehearsal of the open plan. */
  async open(summary: RehearsalSummary, document: PlanDocument): Promise<void> {
    const planId = plan.planId;
    const isSame = (await planHash(document)) === summary.hashes.plan;
    await this.#fetch(summary.rehearsalId, isSame ? document : null, () => plan.planId === planId && !this.isRunning);
  }

  hear(event: EngineEvent): void {
    if (event.event === 'numerical' && this.last?.stored.summary.rehearsalId === event.rehearsalId) {
      void this.#reread(event.rehearsalId);
    }
    if (this.state.kind !== 'running') return;
    if (event.event === 'progress' && event.jobId === this.state.jobId) {
      this.state = { ...this.state, done: event.done, left_s: event.left_s };
    }
    if (event.event === 'sweep' && event.jobId === this.state.jobId) {
      this.state = { ...this.state, sweeps: [...this.state.sweeps, event.arrived] };
    }
  }

  async #fetch(rehearsalId: number, document: PlanDocument | null, isWanted: () => boolean): Promise<void> {
    const [stored, traces] = await Promise.all([
      ask('rehearsal read', { rehearsalId }),
      ask('rehearsal traces', { rehearsalId }),
    ]);
    if (!isWanted()) return;
    const refused = stored.ok ? traces : stored;
    if (stored.ok && traces.ok) {
      const done: DoneRehearsal = { kind: 'done', stored: stored.value, traces: traces.value };
      this.last = done;
      this.#plan = document;
      this.state = done;
    } else if (!refused.ok) {
      this.state =
        'refusals' in refused
          ? { kind: 'refused', refusals: refused.refusals }
          : { kind: 'failed', fault: refused.fault };
    }
  }

  async #reread(rehearsalId: number): Promise<void> {
    const answer = await ask('rehearsal read', { rehearsalId });
    if (!answer.ok || this.last?.stored.summary.rehearsalId !== rehearsalId) return;
    const done = { ...this.last, stored: answer.value };
    if (this.state === this.last) this.state = done;
    this.last = done;
  }

  #isStill(jobId: string): boolean {
    return this.state.kind === 'running' && this.state.jobId === jobId;
  }
}

export const rehearsal = new RehearsalState();
