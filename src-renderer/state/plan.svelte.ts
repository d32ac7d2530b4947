// The open plan: its documents, undo and redo, and the draft that saves itself.
import type { PlanDocument } from '../../src-main/contract/documents.ts';
import type { OpenedPlan } from '../../src-main/contract/requests.ts';
import { ask } from './ask.ts';
import {
  begin,
  gestureStart,
  present,
  record,
  redone,
  redoWords,
  settle,
  undone,
  undoWords,
  type History,
} from './history.ts';
import type { ChangeWords } from './edits/words.ts';
import { notices } from './notices.svelte.ts';

const saveAfter_ms = 600;

class PlanState {
  planId = $state<number | null>(null);
  cellId = $state<number | null>(null);
  savedAt = $state<string | null>(null);
  saving = $state(false);
  /** Set by the notebook: a read-only notebook keeps no drafts. */
  keepsDrafts = $state(true);
  #history = $state.raw<History<PlanDocument> | null>(null);
  /** The notebook that the open plan belongs to: a late draft must not land in another one. */
  #notebook: string | null = null;

  readonly isOpen = $derived(this.planId !== null && this.#history !== null);
  readonly undoWords = $derived(this.#history === null ? null : undoWords(this.#history));
  readonly redoWords = $derived(this.#history === null ? null : redoWords(this.#history));

  #timer: ReturnType<typeof setTimeout> | undefined;
  #keptDocument: PlanDocument | null = null;
  readonly #listeners: ((document: PlanDocument) => void)[] = [];

  /** The plan in force. Areas are shown only while a plan is open, so they may read it freely. */
  get document(): PlanDocument {
    if (this.#history === null) throw new Error('no plan is open');
    return present(this.#history);
  }

  /** Shows an opened plan of the notebook at that path; undo starts anew. */
  show(opened: OpenedPlan, notebook: string | null): void {
    this.#notebook = notebook;
    this.planId = opened.planId;
    this.cellId = opened.cellId;
    this.savedAt = opened.savedAt;
    this.#history = begin(opened.plan);
    this.#keptDocument = opened.plan;
    this.#tell();
  }

  /** The notebook goes on in another file, and the plan with it. */
  moveTo(notebook: string): void {
    this.#notebook = notebook;
  }

  /** No plan is open any more. */
  close(): void {
    this.planId = null;
    this.cellId = null;
  }

  /**
   * Changes the plan by a pure function; the words say what undo will take back ("access resistance 12 → 15 MΩ").
   * Changes that name the same gesture are undone as one, until endGesture.
   */
  change(words: ChangeWords, change: (plan: PlanDocument) => PlanDocument, gesture: string | null = null): void {
    if (this.#history === null) return;
    const next = record(this.#history, change(this.document), words, gesture);
    if (next === this.#history) return;
    this.#history = next;
    this.#changed();
  }

  /**
   * The same, but every change of the gesture is made to the plan as it stood when the gesture began: what a half-typed
   * number did ("−6" on the way to "−60") leaves no trace.
   */
  changeAnew(words: ChangeWords, change: (plan: PlanDocument) => PlanDocument, gesture: string): void {
    if (this.#history === null) return;
    const start = gestureStart(this.#history, gesture);
    this.change(words, () => change(start), gesture);
  }

  endGesture(): void {
    if (this.#history !== null) this.#history = settle(this.#history);
  }

  undo(): void {
    if (this.#history === null || this.undoWords === null) return;
    this.#history = undone(this.#history);
    this.#changed();
  }

  redo(): void {
    if (this.#history === null || this.redoWords === null) return;
    this.#history = redone(this.#history);
    this.#changed();
  }

  /** Calls back after every change and every opening. For other state, not for components. */
  whenChanged(listener: (document: PlanDocument) => void): void {
    this.#listeners.push(listener);
  }

  /** Keeps the draft now, if it is not kept yet. */
  async keep(): Promise<void> {
    clearTimeout(this.#timer);
    const planId = this.planId;
    if (planId === null || this.#history === null || !this.keepsDrafts) return;
    const document = this.document;
    if (document === this.#keptDocument) return;
    this.saving = true;
    const meant = this.#notebook === null ? {} : { notebook: this.#notebook };
    const answer = await ask('plan keep draft', { planId, plan: document, ...meant });
    this.saving = false;
    if (answer.ok) {
      if (planId !== this.planId) return;
      this.#keptDocument = document;
      this.savedAt = answer.value.savedAt;
    } else if ('refusals' in answer) notices.refuse(answer.refusals);
    else notices.fault(`The draft could not be kept: ${answer.fault}`);
  }

  #changed(): void {
    clearTimeout(this.#timer);
    this.#timer = setTimeout(() => void this.keep(), saveAfter_ms);
    this.#tell();
  }

  #tell(): void {
    for (const listener of this.#listeners) listener(this.document);
  }
}

export const plan = new PlanState();
