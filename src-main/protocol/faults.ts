import type { RefusalCode, RefusalData } from '../contract/refusal.ts';
import { Refusal } from '../units/refuse.ts';

/** Gathers every fault of a document before refusing it, so that the user sees all of them at once. */
export class Faults {
  readonly #found: RefusalData[] = [];

  add(code: RefusalCode, parts: Omit<RefusalData, 'code'>): void {
    this.#found.push({ code, ...parts });
  }

  addAll(found: readonly RefusalData[]): void {
    // Not push(...found): a call takes only so many arguments, and a list may hold a million faults.
    for (const fault of found) this.#found.push(fault);
  }

  /** Runs `work`; the faults of a Refusal it throws are gathered and the answer is undefined. Other errors pass on. */
  collect<T>(work: () => T): T | undefined {
    try {
      return work();
    } catch (error) {
      if (!(error instanceof Refusal)) throw error;
      this.addAll(error.all);
      return undefined;
    }
  }

  get all(): readonly RefusalData[] {
    return this.#found;
  }

  get count(): number {
    return this.#found.length;
  }

  /** @throws Refusal with all faults, when there are any. */
  settle(): void {
    const [first, ...others] = this.#found;
    if (first !== undefined) throw new Refusal([first, ...others]);
  }
}
