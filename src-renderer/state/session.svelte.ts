// One session: a dated page of notes for one cell. It saves itself while one writes.
import type { Answers } from '../../src-main/contract/requests.ts';
import { askOrSay } from './ask.ts';
import { notebook } from './notebook.svelte.ts';

const saveAfter_ms = 800;

class SessionState {
  shown = $state.raw<Answers['session read'] | null>(null);
  title = $state('');
  notes = $state('');
  /** When notes of the one shown were saved last; null: not since it was opened. */
  savedAt = $state<string | null>(null);
  /** When notes of any were. */
  lastSavedAt = $state<string | null>(null);
  #timer: ReturnType<typeof setTimeout> | undefined;
  #isDirty = false;
  /** The notebook that the shown session belongs to. */
  #notebook = '';

  async open(sessionId: number): Promise<void> {
    await this.keep();
    this.shown = null;
    const read = await askOrSay('session read', { sessionId });
    if (read === null) return;
    this.#notebook = notebook.overview?.status.path ?? '';
    this.shown = read;
    this.title = read.title;
    this.notes = read.notes;
    this.savedAt = null;
  }

  write(what: { readonly title?: string; readonly notes?: string }): void {
    this.title = what.title ?? this.title;
    this.notes = what.notes ?? this.notes;
    this.#isDirty = true;
    clearTimeout(this.#timer);
    this.#timer = setTimeout(() => void this.keep(), saveAfter_ms);
  }

  /** Saves now what was written and is not saved yet. */
  async keep(): Promise<void> {
    clearTimeout(this.#timer);
    if (this.shown === null || !this.#isDirty) return;
    this.#isDirty = false;
    const { sessionId } = this.shown;
    const written = { title: this.title, notes: this.notes };
    const meant = this.#notebook === '' ? {} : { notebook: this.#notebook };
    const answer = await askOrSay('session write', { sessionId, ...written, ...meant });
    if (answer === null) {
      if (this.#isShown(sessionId)) this.#isDirty = true;
      return;
    }
    this.lastSavedAt = answer.savedAt;
    if (this.#isShown(sessionId)) this.savedAt = answer.savedAt;
  }

  /** Reads its rehearsals anew; what is being written stays. */
  async refresh(): Promise<void> {
    const sessionId = this.shown?.sessionId;
    if (sessionId === undefined) return;
    const read = await askOrSay('session read', { sessionId });
    if (read !== null && this.#isShown(sessionId)) this.shown = read;
  }

  /** Asked after waiting, when another may have been opened or none. */
  #isShown(sessionId: number): boolean {
    return this.shown?.sessionId === sessionId;
  }

  async close(): Promise<void> {
    await this.keep();
    this.shown = null;
    await notebook.load(false);
  }
}

export const session = new SessionState();
