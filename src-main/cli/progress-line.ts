/** Progress on one line of a terminal, written over as it goes; into a file, a line whenever another tenth is done. */
export class ProgressLine {
  readonly #stream: NodeJS.WriteStream;
  #last = '';
  #tenth = -1;
  #what = '';

  constructor(stream: NodeJS.WriteStream) {
    this.#stream = stream;
  }

  /** `done` from 0 to 1; `left_s` null while it cannot be told. */
  show(what: string, done: number, left_s: number | null): void {
    const left = left_s === null ? '' : `, ${seconds(left_s)} left`;
    const words = `${what}: ${Math.floor(done * 100)} %${left}`;
    if (this.#stream.isTTY) {
      this.#stream.write(`\r${words.padEnd(this.#last.length)}`);
      this.#last = words;
      return;
    }
    const tenth = Math.floor(done * 10);
    if (what === this.#what && tenth === this.#tenth) return;
    this.#what = what;
    this.#tenth = tenth;
    this.#stream.write(`${words}\n`);
  }

  /** Clears the line. */
  end(): void {
    if (this.#stream.isTTY && this.#last !== '') this.#stream.write(`\r${' '.repeat(this.#last.length)}\r`);
  }
}

function seconds(left: number): string {
  if (left >= 90) return `${Math.round(left / 60)} min`;
  return left >= 10 ? `${Math.round(left)} s` : `${left.toFixed(1)} s`;
}
