// Short messages above the jobs. A notice may offer to take back what it tells of.
import type { RefusalData } from '../../src-main/contract/refusal.ts';

export interface NoticeEntry {
  readonly id: number;
  readonly kind: 'done' | 'refused' | 'fault';
  readonly words: string;
  readonly undo: (() => void) | null;
}

class NoticesState {
  list = $state.raw<readonly NoticeEntry[]>([]);
  #next = 1;

  /** Says that something was done, with a way back where there is one. */
  say(words: string, undo: (() => void) | null = null): void {
    this.#add({ kind: 'done', words, undo });
  }

  /** Says what was refused, where, and what to do about it. */
  refuse(refusals: readonly RefusalData[]): void {
    for (const r of refusals) {
      this.#add({ kind: 'refused', words: `${r.thing} at ${r.place} is ${r.value}: ${r.remedy}`, undo: null });
    }
  }

  /** Says that the program itself failed. */
  fault(words: string): void {
    this.#add({ kind: 'fault', words, undo: null });
  }

  close(id: number): void {
    this.list = this.list.filter((notice) => notice.id !== id);
  }

  /** Something else is open now: what was refused before is no longer the matter. */
  leaveContext(): void {
    this.list = this.list.filter((notice) => notice.kind !== 'refused');
  }

  #add(notice: Omit<NoticeEntry, 'id'>): void {
    // Three at most: more would cover the work they talk about.
    this.list = [...this.list, { ...notice, id: this.#next++ }].slice(-3);
  }
}

export const notices = new NoticesState();
