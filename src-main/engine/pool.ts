// Worker threads and what is waiting for them. A worker that dies is replaced and its piece of work done once more.
import { Worker } from 'node:worker_threads';
import type { RefusalData } from '../contract/refusal.ts';
import { Refusal } from '../units/refuse.ts';
import type { FromWorker, ToWorker } from './worker-messages.ts';
import type { WorkAnswer, WorkName, WorkPart, WorkQuestion } from './work.ts';

export interface PoolOptions {
  /** Threads for sweeps; one more, for short questions, comes on top. */
  readonly workers: number;
  readonly program: string;
  readonly onDeath: (reason: string) => void;
}

export interface Wishes<N extends WorkName> {
  /** Shared with the worker; 1 asks it to end. */
  readonly cancel?: Int32Array<SharedArrayBuffer>;
  /** 0 to 1, at most ten times a second. */
  readonly onProgress?: (done: number) => void;
  readonly onPart?: (part: WorkPart<N>) => void;
}

/** A worker died twice over the same piece of work. */
export class WorkerDeath extends Error {
  override readonly name = 'WorkerDeath';
}

/** What a person is told of it. */
export function deathRefusal(cause: WorkerDeath): RefusalData {
  return {
    code: 'worker-stopped',
    thing: 'worker',
    place: 'engine',
    value: `stopped twice over the same work: ${cause.message}`,
    remedy: 'try again with fewer compartments or shorter sweeps; the notebook is whole',
  };
}

interface Piece {
  readonly message: ToWorker;
  readonly onProgress: ((done: number) => void) | undefined;
  readonly onPart: ((part: unknown) => void) | undefined;
  readonly resolve: (value: unknown) => void;
  readonly reject: (cause: Error) => void;
  deaths: number;
}

interface Seat {
  worker: Worker | null;
  piece: Piece | null;
}

/** Long pieces of work share `workers` threads in order of arrival; short ones have a thread to themselves. */
export class Pool {
  readonly #options: PoolOptions;
  readonly #long: Seat[];
  readonly #short: Seat = { worker: null, piece: null };
  readonly #waiting: { long: Piece[]; short: Piece[] } = { long: [], short: [] };
  #nextPiece = 1;
  #closed = false;

  constructor(options: PoolOptions) {
    this.#options = options;
    this.#long = Array.from({ length: options.workers }, () => ({ worker: null, piece: null }));
  }

  get workers(): number {
    return this.#long.length;
  }

  /**
   * Has a piece of work done.
   * @throws Refusal when the work refuses; WorkerDeath; Error for a bug in the work, its stack as the cause's text.
   */
  run<N extends WorkName>(
    length: 'long' | 'short',
    name: N,
    question: WorkQuestion<N>,
    wishes: Wishes<N> = {},
  ): Promise<WorkAnswer<N>> {
    const { cancel, onProgress, onPart } = wishes;
    return new Promise((resolve, reject) => {
      const message: ToWorker = { piece: this.#nextPiece++, name, question, cancel: cancel ?? null };
      this.#waiting[length].push({
        message,
        onProgress,
        onPart: onPart as Piece['onPart'],
        resolve: resolve as Piece['resolve'],
        reject,
        deaths: 0,
      });
      this.#deal();
    });
  }

  /** Starts all threads now, so that the first question does not wait for them. */
  warm(): void {
    for (const seat of [this.#short, ...this.#long]) seat.worker ??= this.#hire(seat);
  }

  /** Ends all threads; work in hand is rejected. */
  async close(): Promise<void> {
    this.#closed = true;
    const gone = new WorkerDeath('the engine is closing');
    const seats = [this.#short, ...this.#long];
    const pieces = [...this.#waiting.long, ...this.#waiting.short, ...seats.flatMap((seat) => seat.piece ?? [])];
    this.#waiting.long = [];
    this.#waiting.short = [];
    for (const piece of pieces) piece.reject(gone);
    await Promise.all(seats.flatMap((seat) => (seat.worker ? [seat.worker.terminate()] : [])));
  }

  #deal(): void {
    if (this.#closed) return;
    for (const seat of this.#long) this.#seatNext(seat, this.#waiting.long);
    this.#seatNext(this.#short, this.#waiting.short);
  }

  #seatNext(seat: Seat, waiting: Piece[]): void {
    if (seat.piece !== null) return;
    const piece = waiting.shift();
    if (!piece) return;
    seat.piece = piece;
    seat.worker ??= this.#hire(seat);
    seat.worker.postMessage(piece.message);
  }

  #hire(seat: Seat): Worker {
    // Without the options of this process: one that runs a program from its command line would run that again.
    const worker = new Worker(this.#options.program, { execArgv: [] });
    let last = 'it ended by itself';
    worker.on('message', (message: FromWorker) => this.#hear(seat, message));
    worker.on('error', (cause) => {
      last = cause instanceof Error ? cause.message : String(cause);
    });
    worker.on('exit', (code) => this.#lose(seat, worker, `${last} (exit code ${code})`));
    return worker;
  }

  #hear(seat: Seat, message: FromWorker): void {
    const { piece } = seat;
    if (piece?.message.piece !== message.piece) return;
    if (message.kind === 'progress') return piece.onProgress?.(message.done);
    if (message.kind === 'part') return piece.onPart?.(message.part);
    seat.piece = null;
    if (message.kind === 'done') piece.resolve(message.answer);
    else if (message.kind === 'refused') piece.reject(new Refusal(message.refusals));
    else piece.reject(new Error(`a worker failed at ${piece.message.name}`, { cause: message.stack }));
    this.#deal();
  }

  #lose(seat: Seat, worker: Worker, reason: string): void {
    if (this.#closed || seat.worker !== worker) return;
    const { piece } = seat;
    seat.worker = null;
    seat.piece = null;
    if (piece) {
      piece.deaths += 1;
      if (piece.deaths > 1) piece.reject(new WorkerDeath(reason));
      else (seat === this.#short ? this.#waiting.short : this.#waiting.long).unshift(piece);
    }
    this.#options.onDeath(reason);
    this.#deal();
  }
}
