import type { RefusalData } from '../contract/refusal.ts';
import type { Answer, Answers, Call, EngineEvent, EngineMessage, Question, RequestName } from '../contract/requests.ts';

/** A started engine process, however it was started. */
export interface EngineProcess {
  send(call: Call): void;
  onMessage(listener: (message: EngineMessage) => void): void;
  /** `how` is for people: "exit code 1". Each listener is called once. */
  onExit(listener: (how: string) => void): void;
  stop(): void;
}

/** Starts an engine on a notebook file. */
export type StartEngine = (notebookPath: string) => EngineProcess;

/** More restarts than this within a minute mean that restarting does not help. */
const mostRestarts = 3;
const minute_ms = 60_000;
const patience_ms = 4000;

const changesNotebook: ReadonlySet<string> = new Set<RequestName>([
  'notebook create',
  'notebook open',
  'notebook save as',
]);

/**
 * A shell's line to the engine: matches answers to calls, and starts the engine again, on the notebook it had open, when
 * it dies. Calls in flight are then answered with an `engine-stopped` refusal: the shell never waits for a dead process.
 */
export class EngineClient {
  readonly #start: StartEngine;
  readonly #now: () => number;
  readonly #waiting = new Map<number, { name: string; resolve: (answer: Answer) => void }>();
  readonly #listeners = new Set<(event: EngineEvent) => void>();
  #engine: EngineProcess | null = null;
  #notebookPath: string;
  #restarts: number[] = [];
  #nextCall = 1;
  #stopped = false;

  constructor(start: StartEngine, notebookPath: string, now: () => number = Date.now) {
    this.#start = start;
    this.#now = now;
    this.#notebookPath = notebookPath;
    this.#launch();
  }

  /** The notebook the engine has open, and would open again after a restart. */
  get notebookPath(): string {
    return this.#notebookPath;
  }

  /** Typed call, for code of the shell itself. */
  ask<N extends RequestName>(name: N, question: Question<N>): Promise<Answer<Answers[N]>> {
    return this.relay(name, question) as Promise<Answer<Answers[N]>>;
  }

  /** Passes on what a window sent; the engine checks it. Never rejects. */
  relay(name: string, question: unknown): Promise<Answer> {
    if (!this.#engine && !this.#stopped && this.#mayRestart()) this.#launch();
    const engine = this.#engine;
    if (!engine) return Promise.resolve(stopped(name));
    const call = this.#nextCall++;
    return new Promise((resolve) => {
      this.#waiting.set(call, { name, resolve });
      engine.send({ call, name, question });
    });
  }

  /** Calls back for every event until the returned function is called. */
  onEvent(listener: (event: EngineEvent) => void): () => void {
    this.#listeners.add(listener);
    return () => void this.#listeners.delete(listener);
  }

  /** Settles when no call is in flight any more, or after the given time. */
  async quiet(most_ms: number): Promise<void> {
    const end = this.#now() + most_ms;
    while (this.#waiting.size > 0 && this.#now() < end) await new Promise((resolve) => setTimeout(resolve, 20));
  }

  /** Ends the engine for good; settles when it has gone, so that its notebook is free, or after a few seconds. */
  async stop(): Promise<void> {
    this.#stopped = true;
    const engine = this.#engine;
    this.#lose();
    if (!engine) return;
    const gone = new Promise<void>((done) => {
      engine.onExit(() => done());
      setTimeout(done, patience_ms).unref();
    });
    engine.stop();
    await gone;
  }

  #launch(): void {
    const engine = this.#start(this.#notebookPath);
    this.#engine = engine;
    engine.onMessage((message) => {
      if (message.kind === 'event') this.#emit(message.event);
      else this.#settle(message.call, message.answer);
    });
    engine.onExit((how) => {
      if (this.#engine !== engine) return;
      this.#lose();
      if (this.#stopped || !this.#mayRestart()) return;
      this.#restarts.push(this.#now());
      this.#launch();
      this.#emit({ event: 'engine restarted', reason: `the engine stopped unexpectedly (${how})` });
    });
  }

  #settle(call: number, answer: Answer): void {
    const waiter = this.#waiting.get(call);
    if (!waiter) return;
    this.#waiting.delete(call);
    if (answer.ok && changesNotebook.has(waiter.name)) {
      this.#notebookPath = (answer.value as Answers['notebook open']).path;
    }
    waiter.resolve(answer);
  }

  #lose(): void {
    this.#engine = null;
    const waiting = [...this.#waiting.values()];
    this.#waiting.clear();
    for (const { name, resolve } of waiting) resolve(stopped(name));
  }

  #mayRestart(): boolean {
    this.#restarts = this.#restarts.filter((at) => this.#now() - at < minute_ms);
    return this.#restarts.length < mostRestarts;
  }

  #emit(event: EngineEvent): void {
    for (const listener of this.#listeners) listener(event);
  }
}

function stopped(name: string): Answer {
  const refusal: RefusalData = {
    code: 'engine-stopped',
    thing: 'engine',
    place: name,
    value: 'stopped',
    remedy: 'try again; if it keeps stopping, close Holdfast and open it again',
  };
  return { ok: false, refusals: [refusal] };
}
