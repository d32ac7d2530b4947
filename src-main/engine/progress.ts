/** A report at most ten times a second: what a screen can show. */
const shortest_ms = 100;
/** Before this long a rate is guesswork. */
const earliest_ms = 300;

/** How far a job is, from pieces that report for themselves. */
export class Progress {
  readonly #total: number;
  readonly #say: (done: number, left_s: number | null) => void;
  readonly #started = performance.now();
  readonly #pieces: number[] = [];
  #said = -Infinity;
  #ended = false;

  /** `total` is in the unit the pieces report in: sweeps. */
  constructor(total: number, say: (done: number, left_s: number | null) => void) {
    this.#total = total;
    this.#say = say;
    this.#tell();
  }

  /** Piece `piece` has done this much. */
  report(piece: number, done: number): void {
    this.#pieces[piece] = Math.max(this.#pieces[piece] ?? 0, done);
    if (performance.now() - this.#said >= shortest_ms) this.#tell();
  }

  /** Nothing is said any more. */
  end(): void {
    this.#ended = true;
  }

  #tell(): void {
    if (this.#ended) return;
    const now = performance.now();
    this.#said = now;
    const done = Math.min(1, this.#pieces.reduce((sum, piece) => sum + piece, 0) / this.#total);
    const passed = now - this.#started;
    const left_s = done > 0 && passed > earliest_ms ? (passed * (1 - done)) / done / 1000 : null;
    this.#say(done, left_s);
  }
}
