// Where the user put the dividing lines, in pixels.
import { recall, remember } from './remembered.ts';

class SplitsState {
  #at = $state<Record<string, number>>({});

  /** The remembered place of a split, or null when the user never moved it. */
  at(name: string): number | null {
    const set = this.#at[name];
    if (set !== undefined) return set;
    const stored = Number(recall(`split.${name}`) ?? NaN);
    return Number.isFinite(stored) && stored > 0 ? stored : null;
  }

  move(name: string, to_px: number): void {
    this.#at[name] = to_px;
    remember(`split.${name}`, String(Math.round(to_px)));
  }
}

export const splits = new SplitsState();
