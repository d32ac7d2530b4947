import { existsSync } from 'node:fs';
import { availableParallelism } from 'node:os';
import { inspect } from 'node:util';
import type { RefusalData } from '../contract/refusal.ts';
import type { Answer, Answers, Call, EngineEvent, Question, RequestName } from '../contract/requests.ts';
import { openNotebook } from '../notebook/open.ts';
import { Refusal } from '../units/refuse.ts';
import { workerProgram } from './beside.ts';
import { Desk } from './desk.ts';
import { makeExampleNotebook } from './examples.ts';
import { handlers } from './handlers.ts';
import { deathRefusal, Pool, WorkerDeath } from './pool.ts';
import { checkedQuestion, refuseName } from './question.ts';

export interface EngineOptions {
  /** Opened at the start; made with the examples in it when nothing is there. Absent: no notebook until one is opened. */
  readonly notebookPath?: string;
  /** Threads for sweeps; absent: one per core. */
  readonly workers?: number;
  /** Another program for the workers. */
  readonly workerProgram?: string;
  /** Where bugs are written, with their stacks. Absent: stderr. */
  readonly log?: (text: string) => void;
}

export interface Engine {
  /** Answers a call from anywhere; what came is checked. Never rejects. */
  handle(call: Call): Promise<Answer>;
  /** The same with types, for callers in this process. */
  ask<N extends RequestName>(name: N, question: Question<N>): Promise<Answer<Answers[N]>>;
  /** Calls back for every event until the returned function is called. */
  onEvent(listener: (event: EngineEvent) => void): () => void;
  /** Cancels all jobs, ends the workers and closes the notebook. */
  close(): Promise<void>;
}

/** An engine in this process, with worker threads. Opening the notebook happens behind: calls wait for it. */
export function createEngine(options: EngineOptions = {}): Engine {
  const listeners = new Set<(event: EngineEvent) => void>();
  const emit = (event: EngineEvent) => {
    for (const listener of listeners) listener(event);
  };
  const log = options.log ?? ((text: string) => console.error(text));
  const pool = new Pool({
    workers: options.workers ?? availableParallelism(),
    program: options.workerProgram ?? workerProgram(),
    onDeath: (reason) => {
      log(`a worker died: ${reason}`);
      emit({ event: 'worker restarted', reason });
    },
  });
  const desk = new Desk(pool, emit);
  const ready = openFirst(desk, options.notebookPath);

  const handle = async (call: Call): Promise<Answer> => {
    try {
      await ready;
      const { name } = call;
      return { ok: true, value: isRequest(name) ? await answer(name, call.question, desk) : refuseName(name) };
    } catch (error) {
      if (error instanceof Refusal) return { ok: false, refusals: listOf(error) };
      if (error instanceof WorkerDeath) return { ok: false, refusals: [deathRefusal(error)] };
      log(stackOf(error, (call as Call | null | undefined)?.name));
      return { ok: false, fault: error instanceof Error ? error.message : String(error) };
    }
  };
  let calls = 0;
  return {
    handle,
    ask: <N extends RequestName>(name: N, question: Question<N>) =>
      handle({ call: (calls += 1), name, question }) as Promise<Answer<Answers[N]>>,
    onEvent: (listener) => {
      listeners.add(listener);
      return () => void listeners.delete(listener);
    },
    close: async () => {
      await ready;
      await desk.close();
    },
  };
}

function isRequest(name: string): name is RequestName {
  return Object.hasOwn(handlers, name);
}

function answer<N extends RequestName>(name: N, question: unknown, desk: Desk): Answers[N] | Promise<Answers[N]> {
  return handlers[name](checkedQuestion(name, question), desk);
}

/** A notebook that cannot be opened does not end the engine: every question about it is answered with the reason. */
async function openFirst(desk: Desk, path: string | undefined): Promise<void> {
  if (path === undefined) return;
  try {
    const made = existsSync(path) ? null : await makeExampleNotebook(desk, path);
    const notebook = openNotebook(path);
    if (made) desk.finer.move(made, notebook);
    desk.takeNotebook(notebook);
  } catch (error) {
    desk.stayClosed(error);
  }
}

function listOf(error: Refusal): readonly [RefusalData, ...RefusalData[]] {
  const [first, ...others] = error.all;
  return [first ?? error.data, ...others];
}

function stackOf(error: unknown, name: unknown): string {
  return `fault while answering "${String(name)}": ${inspect(error)}`;
}
