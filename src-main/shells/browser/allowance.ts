/** So many at once, and so many more with every second that passes. */
export class Allowance {
  readonly #atOnce: number;
  readonly #perSecond: number;
  readonly #now: () => number;
  #left: number;
  #counted: number;

  constructor(rate: { readonly atOnce: number; readonly perSecond: number }, now: () => number = Date.now) {
    this.#atOnce = rate.atOnce;
    this.#perSecond = rate.perSecond;
    this.#now = now;
    this.#left = rate.atOnce;
    this.#counted = now();
  }

  /** Takes one; false when there is none left. */
  take(): boolean {
    const now = this.#now();
    this.#left = Math.min(this.#atOnce, this.#left + ((now - this.#counted) / 1000) * this.#perSecond);
    this.#counted = now;
    if (this.#left < 1) return false;
    this.#left -= 1;
    return true;
  }
}
