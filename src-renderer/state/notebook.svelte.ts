// The notebook: which file, what is in it, and which plan of it is open.
import type { CellDocument, PlanDocument } from '../../src-main/contract/documents.ts';
import type { NotebookOverview, OpenedPlan, SearchHit } from '../../src-main/contract/requests.ts';
import { ask, askOrSay } from './ask.ts';
import { cursor } from './cursor.svelte.ts';
import { newestOnly } from './late.ts';
import { notices } from './notices.svelte.ts';
import { plan } from './plan.svelte.ts';
import { rehearsal } from './rehearsal.svelte.ts';
import { selection } from './selection.svelte.ts';

class NotebookState {
  overview = $state.raw<NotebookOverview | null>(null);
  /** Null until something is searched for. */
  hits = $state.raw<readonly SearchHit[] | null>(null);
  isLoading = $state(true);
  /** Counts what was asked to be opened, so that a late answer is known. */
  #openings = 0;

  /** For other state: a plan was opened, with nothing of it selected yet. */
  whenPlanShown: () => void = () => undefined;
  /** For other state: the notebook is about to be left; what is not saved yet must be. */
  beforeLeaving: () => Promise<void> = () => Promise.resolve();

  readonly isReadOnly = $derived(this.overview?.status.readOnly ?? false);
  readonly cells = $derived(this.overview?.cells ?? []);
  readonly openCell = $derived(this.cells.find((c) => c.cellId === plan.cellId) ?? null);

  /** Reads the overview; at the start also opens the plan that was open last. */
  async load(openLast: boolean): Promise<void> {
    const overview = await askOrSay('notebook overview', {});
    this.isLoading = false;
    if (overview === null) return;
    this.overview = overview;
    plan.keepsDrafts = !overview.status.readOnly;
    if (!openLast) return;
    const first = overview.openPlanId ?? overview.cells.flatMap((c) => c.plans)[0]?.planId ?? null;
    if (first === null) {
      plan.close();
      rehearsal.forget();
    } else await this.#open(first);
  }

  async openPlan(planId: number): Promise<void> {
    notices.leaveContext();
    await this.#open(planId);
  }

  async #open(planId: number): Promise<void> {
    const ticket = ++this.#openings;
    await plan.keep();
    const opened = await askOrSay('plan open', { planId });
    // The user may have chosen another plan meanwhile: the last choice counts.
    if (opened !== null && ticket === this.#openings) await this.#show(opened);
  }

  /** Keeps a plan as a new one, of the given cell or of a new one, and opens it. */
  async createPlan(document: PlanDocument, cellId?: number): Promise<void> {
    await plan.keep();
    const opened = await askOrSay(
      'plan create',
      cellId === undefined ? { plan: document } : { plan: document, cellId },
    );
    if (opened === null) return;
    this.#openings++;
    await this.#show(opened);
    await this.load(false);
  }

  /** A copy of the open plan under a name of its own. */
  async duplicatePlan(): Promise<void> {
    if (!plan.isOpen || plan.cellId === null) return;
    await this.createPlan({ ...plan.document, name: `${plan.document.name}, copy` }, plan.cellId);
  }

  /** Gives a plan another name; of the open one it can be undone like any change. */
  async renamePlan(planId: number, name: string): Promise<void> {
    if (planId === plan.planId) {
      plan.change(`name ${plan.document.name} → ${name}`, (p) => ({ ...p, name }));
      await plan.keep();
    }
    await askOrSay('plan name', { planId, name });
    await this.load(false);
  }

  async removePlan(planId: number, name: string): Promise<void> {
    if ((await askOrSay('plan remove', { planId, removed: true })) === null) return;
    await this.load(plan.planId === planId);
    notices.say(`Plan “${name}” removed`, () => void this.#bringBackPlan(planId));
  }

  async #bringBackPlan(planId: number): Promise<void> {
    await askOrSay('plan remove', { planId, removed: false });
    await this.load(false);
    await this.openPlan(planId);
  }

  async removeCell(cellId: number, name: string): Promise<void> {
    if ((await askOrSay('cell remove', { cellId, removed: true })) === null) return;
    await this.load(plan.cellId === cellId);
    notices.say(`Cell “${name}” removed`, () => void this.#bringBackCell(cellId));
  }

  async #bringBackCell(cellId: number): Promise<void> {
    await askOrSay('cell remove', { cellId, removed: false });
    await this.load(false);
  }

  async keepCell(cell: CellDocument): Promise<number | null> {
    const kept = await askOrSay('cell keep', { cell });
    if (kept === null) return null;
    await this.load(false);
    return kept.cellId;
  }

  async createNotebook(path: string): Promise<void> {
    notices.leaveContext();
    await this.#keepAll();
    if ((await askOrSay('notebook create', { path })) !== null) await this.load(true);
  }

  async openNotebook(path: string): Promise<void> {
    notices.leaveContext();
    await this.#keepAll();
    if ((await askOrSay('notebook open', { path })) !== null) await this.load(true);
  }

  async #keepAll(): Promise<void> {
    await plan.keep();
    await this.beforeLeaving();
  }

  async saveNotebookAs(path: string): Promise<void> {
    await this.#keepAll();
    const status = await askOrSay('notebook save as', { path });
    if (status === null) return;
    plan.moveTo(status.path);
    await this.load(false);
    notices.say(`The notebook goes on in “${status.name}”`);
  }

  /** The open cell's session of that day, if it has one: rehearsals of the day go there. */
  sessionOf(day: string): number | undefined {
    return this.openCell?.sessions.find((s) => s.date === day)?.sessionId;
  }

  async createSession(cellId: number, date: string): Promise<number | null> {
    const session = await askOrSay('session create', { cellId, date, title: '' });
    await this.load(false);
    return session?.sessionId ?? null;
  }

  readonly search = newestOnly(200, async (words: string, isNewest) => {
    if (words.trim() === '') {
      this.hits = null;
      return;
    }
    const answer = await ask('notebook search', { words: words.trim().slice(0, 200) });
    if (isNewest() && answer.ok) this.hits = answer.value;
  });

  async #show(opened: OpenedPlan): Promise<void> {
    plan.show(opened, this.overview?.status.path ?? null);
    selection.clear();
    cursor.sweep = 0;
    cursor.time_ms = null;
    await rehearsal.showNewest(opened.plan, opened.rehearsals);
    if (plan.planId !== opened.planId) return;
    const clamp = rehearsal.forecast?.clamp;
    if (clamp) cursor.sweep = clamp.worstSweep;
    if (selection.current.kind === 'nothing') this.whenPlanShown();
  }
}

export const notebook = new NotebookState();
