// What happens while a number is typed: valid text takes effect at once, wrong text changes nothing and says why.
import { givenNumber, parseQuantity } from '../text/quantity.ts';

export interface EntryRules {
  readonly value: number;
  readonly unit: string;
  readonly step: number;
  readonly least: number;
  readonly most: number;
  readonly isWhole: boolean;
  /** A further objection in words, or null. */
  readonly objection: (value: number) => string | null;
  /** @returns what it became: the owner may take another value, such as one at whole rungs */
  readonly change: (value: number) => number;
}

export class QuantityEntry {
  readonly #rules: () => EntryRules;
  /**
   * Text that is being typed, and the values it goes with: the one before, the one typed, the one it became (the owner's
   * value follows only after the event). A value changed from elsewhere drops the text.
   */
  #draft = $state.raw<{ readonly text: string; readonly with: readonly number[] } | null>(null);
  #before = 0;
  readonly #isLive = $derived.by(() => this.#draft?.with.includes(this.#rules().value) ?? false);

  constructor(rules: () => EntryRules) {
    this.#rules = rules;
  }

  readonly text = $derived.by(() =>
    this.#draft !== null && this.#isLive ? this.#draft.text : givenNumber(this.#rules().value),
  );
  /** Why the text is refused; null while it is fine. */
  readonly error = $derived.by(() => {
    if (this.#draft === null || !this.#isLive) return null;
    const checked = this.#check(this.#draft.text);
    return checked.ok ? null : checked.words;
  });

  begin(): void {
    this.#before = this.#rules().value;
  }

  type(text: string): void {
    const checked = this.#check(text);
    const before = this.#rules().value;
    const goesWith = checked.ok ? [before, checked.value, this.#take(checked.value)] : [before];
    this.#draft = { text, with: goesWith };
  }

  /** Arrow keys. */
  step(by: number): void {
    const { value, step, least, most } = this.#rules();
    // Twelve digits take the binary noise off 0.1 + 0.2.
    const next = Number((value + by * step).toPrecision(12));
    this.#take(Math.min(most, Math.max(least, next)));
    this.#draft = null;
  }

  /** Escape: what was there when the field was entered. */
  restore(): void {
    this.#draft = null;
    this.#take(this.#before);
  }

  /** Leaving the field: valid text is shown as the value it became; wrong text stays with its reason. */
  end(): void {
    if (this.error === null) this.#draft = null;
  }

  #take(value: number): number {
    return Object.is(value, this.#rules().value) ? value : this.#rules().change(value);
  }

  #check(text: string): ReturnType<typeof parseQuantity> {
    const { unit, least, most, isWhole, objection } = this.#rules();
    const parsed = parseQuantity(text, unit, { least, most });
    if (!parsed.ok) return parsed;
    const room = (n: number): string => (unit === '' ? givenNumber(n) : `${givenNumber(n)} ${unit}`);
    if (parsed.value < least) return { ok: false, words: `Not below ${room(least)}.` };
    if (parsed.value > most) return { ok: false, words: `Not above ${room(most)}.` };
    if (isWhole && !Number.isInteger(parsed.value)) return { ok: false, words: 'A whole number, please.' };
    const words = objection(parsed.value);
    return words === null ? parsed : { ok: false, words };
  }
}
