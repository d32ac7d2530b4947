// One session: a dated page of notes for one cell. It saves itself while one writes.
import type { Answers } from '../../src-main/contract/requests.ts';
import { askOrSay } from './ask.ts';
import { notebook } from './notebook.svelte.ts';

const saveAfter_ms = 800;

class SessionState {
  shown = $state.raw<Answers['session read'] | null>(null);
  title = $state('');
  notes = $state('');
  savedAt = $state<string | null>(null);
  #timer: ReturnType<typeof setTimeout> | undefined;
  #isDirty = false;

  async open(sessionId: number): Promise<void> {
    await this.keep();
    this.shown = null;
    const read = await askOrSay('session read', { sessionId });
    if (read === null) return;
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

  async keep(): Promise<void> {
    clearTimeout(this.#timer);
    if (this.shown === null || !this.#isDirty) return;
    this.#isDirty = false;
    const { sessionId } = this.shown;
    const answer = await askOrSay('session write', { sessionId, title: this.title, notes: this.notes });
    if (answer === null) this.#isDirty = true;
    else if (this.shown.sessionId === sessionId) this.savedAt = answer.savedAt;
  }

  async close(): Promise<void> {
    await this.keep();
    this.shown = null;
    await notebook.load(false);
  }
}

export const session = new SessionState();
