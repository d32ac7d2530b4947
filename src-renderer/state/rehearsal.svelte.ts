// One run of the plan: started, arriving sweep by sweep, done, or why it did not get there.
import type { PlanDocument } from '../../src-main/contract/documents.ts';
import type { RefusalData } from '../../src-main/contract/refusal.ts';
import type { Answer, EngineEvent } from '../../src-main/contract/requests.ts';
import type {
  Forecast,
  ListedRehearsal,
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
  /** What is under way, by notebook and plan: a plan that is left goes on, and is found again on coming back. */
  #runs = $state.raw<Readonly<Record<string, RunningRehearsal>>>({});
  /** How things stand with the open plan while it does not run. */
  #atRest = $state.raw<Exclude<RehearsalStateKind, RunningRehearsal>>({ kind: 'idle' });
  /** The newest finished one of this plan, kept in sight while another runs. */
  last = $state.raw<DoneRehearsal | null>(null);
  list = $state.raw<readonly ListedRehearsal[]>([]);
  /** The very plan that `last` was run with; null until that is known. */
  #plan = $state.raw<PlanDocument | null>(null);
  /** Counts what was fetched to be shown: only the newest is. */
  #fetches = 0;

  readonly state: RehearsalStateKind = $derived.by(() => this.#runs[this.#place] ?? this.#atRest);
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
  /** What is shown of the last rehearsal is of the plan before it was changed. */
  readonly isBeforeChange = $derived(this.last !== null && !this.isCurrent);

  /** The plan that the rehearsal on show was run with. */
  readonly ran: PlanDocument | null = $derived(this.#plan);

  /** The session that a rehearsal of the open plan belongs to; undefined: none. */
  sessionNow: () => number | undefined = () => undefined;
  /** The open notebook: plan 3 of another is another plan. */
  notebookNow: () => string = () => '';
  /** For other state: a rehearsal was stored. */
  whenStored: () => void = () => undefined;
  /** For other state: a rehearsal came on show. */
  whenShown: (stored: StoredRehearsal) => void = () => undefined;

  async start(): Promise<void> {
    if (plan.planId === null || this.isRunning) return;
    const document = plan.document;
    const planId = plan.planId;
    const place = this.#place;
    const jobId = crypto.randomUUID();
    this.#setRun(place, { kind: 'running', jobId, plan: document, done: 0, left_s: null, sweeps: [] });
    jobs.begin(jobId, `Rehearsal of ${document.name}`);
    const sessionId = this.sessionNow();
    const answer = await ask('rehearsal start', {
      jobId,
      planId,
      plan: document,
      ...(sessionId === undefined ? {} : { sessionId }),
    });
    jobs.end(jobId);
    await this.#settle(place, planId, document, answer);
    this.#setRun(place, null);
  }

  async #settle(
    place: string,
    planId: number,
    document: PlanDocument,
    answer: Answer<RehearsalOutcome>,
  ): Promise<void> {
    if (place !== this.#place) {
      this.#sayElsewhere(document.name, answer);
      return;
    }
    if (!answer.ok) {
      this.#atRest =
        'refusals' in answer ? { kind: 'refused', refusals: answer.refusals } : { kind: 'failed', fault: answer.fault };
      return;
    }
    const outcome = answer.value;
    switch (outcome.kind) {
      case 'finished': {
        await this.#fetch(outcome.rehearsalId, document, () => place === this.#place, document);
        this.#setRun(place, null);
        if (place !== this.#place) {
          this.#sayElsewhere(document.name, answer);
          return;
        }
        this.whenStored();
        const list = await askOrSay('rehearsal list', { planId });
        if (place === this.#place) this.list = list ?? this.list;
        return;
      }
      case 'cancelled':
        this.#atRest = { kind: 'cancelled', sweepsDone: outcome.sweepsDone };
        return;
      case 'stopped':
        this.#atRest = { kind: 'stopped', refusal: outcome.refusal };
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

  /** No plan is open any more: nothing of the last one stays in sight. */
  forget(): void {
    this.#fetches++;
    this.#atRest = { kind: 'idle' };
    this.last = null;
    this.#plan = null;
    this.list = [];
  }

  /** After a plan was opened: shows its newest rehearsal, and finds out whether the plan was changed since. */
  async showNewest(document: PlanDocument, rehearsals: readonly ListedRehearsal[]): Promise<void> {
    this.forget();
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
    const place = this.#place;
    await this.#fetch(summary.rehearsalId, document, () => place === this.#place);
  }

  hear(event: EngineEvent): void {
    if (event.event === 'numerical' && this.last?.stored.summary.rehearsalId === event.rehearsalId) {
      void this.#reread(event.rehearsalId);
    }
    if (event.event !== 'progress' && event.event !== 'sweep') return;
    for (const [place, run] of Object.entries(this.#runs)) {
      if (run.jobId !== event.jobId) continue;
      this.#setRun(
        place,
        event.event === 'progress'
          ? { ...run, done: event.done, left_s: event.left_s }
          : { ...run, sweeps: [...run.sweeps, event.arrived] },
      );
    }
  }

  /**
   * Shows a stored rehearsal, unless something else is to be shown by then.
   *
   * @param document the plan it may belong to
   * @param ran the very plan that was run, where that is known
   */
  async #fetch(
    rehearsalId: number,
    document: PlanDocument,
    isWanted: () => boolean,
    ran: PlanDocument | null = null,
  ): Promise<void> {
    const ticket = ++this.#fetches;
    const [stored, traces] = await Promise.all([
      ask('rehearsal read', { rehearsalId }),
      ask('rehearsal traces', { rehearsalId }),
    ]);
    // Coming back to a plan gives its document anew: the digest tells whether it is still the one that was run.
    const candidates = [document, ...(plan.isOpen ? [plan.document] : [])];
    const hashes = await Promise.all(candidates.map(planHash));
    if (!isWanted() || ticket !== this.#fetches) return;
    const refused = stored.ok ? traces : stored;
    if (stored.ok && traces.ok) {
      const done: DoneRehearsal = { kind: 'done', stored: stored.value, traces: traces.value };
      const same = candidates.filter((one, i) => one === ran || hashes[i] === stored.value.summary.hashes.plan);
      this.last = done;
      this.#plan = same.find((one) => one === plan.document) ?? same.at(-1) ?? stored.value.plan;
      this.#atRest = done;
      this.whenShown(stored.value);
    } else if (!refused.ok) {
      this.#atRest =
        'refusals' in refused
          ? { kind: 'refused', refusals: refused.refusals }
          : { kind: 'failed', fault: refused.fault };
    }
  }

  async #reread(rehearsalId: number): Promise<void> {
    const answer = await ask('rehearsal read', { rehearsalId });
    if (!answer.ok || this.last?.stored.summary.rehearsalId !== rehearsalId) return;
    const done = { ...this.last, stored: answer.value };
    if (this.#atRest === this.last) this.#atRest = done;
    this.last = done;
  }

  /** The open plan's place among the runs. */
  get #place(): string {
    return `${plan.planId ?? 'none'} ${this.notebookNow()}`;
  }

  #setRun(place: string, run: RunningRehearsal | null): void {
    const others = Object.entries(this.#runs).filter(([at]) => at !== place);
    this.#runs = Object.fromEntries(run === null ? others : [...others, [place, run]]);
  }
}

export const rehearsal = new RehearsalState();
