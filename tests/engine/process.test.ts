// The contract in a process of its own, as the shells without Electron start it.
import { fork } from 'node:child_process';
import { rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import type { Answer, EngineEvent, EngineMessage } from '../../src-main/contract/requests.ts';
import { createNotebook } from '../../src-main/notebook/open.ts';
import { contractSuite, type Opened, type OpenWishes } from '../support/contract-suite.ts';

const program = fileURLToPath(new URL('../../src-main/engine/process.ts', import.meta.url));
const dyingWorker = fileURLToPath(new URL('../support/dying-worker.ts', import.meta.url));
let started = 0;

contractSuite('in a process of its own', open, dyingWorker);

function open(wishes: OpenWishes = {}): Promise<Opened> {
  const first = join(tmpdir(), `holdfast-process-${process.pid}-${(started += 1)}.holdfast`);
  createNotebook(first).close();
  const options = wishes.workerProgram === undefined ? [] : [`--worker-program=${wishes.workerProgram}`];
  const child = fork(program, [...options, '--workers=2', first], { serialization: 'advanced', silent: true });
  const exited = new Promise<void>((resolve) => void child.once('exit', () => resolve()));
  const waiting = new Map<number, (answer: Answer) => void>();
  const listeners = new Set<(event: EngineEvent) => void>();
  child.on('message', (message) => {
    const heard = message as EngineMessage;
    if (heard.kind === 'answer') waiting.get(heard.call)?.(heard.answer);
    else for (const listener of listeners) listener(heard.event);
  });
  let calls = 0;
  const ask = (name: string, question: unknown): Promise<Answer> =>
    new Promise((resolve) => {
      const call = (calls += 1);
      waiting.set(call, resolve);
      child.send({ call, name, question });
    });
  return Promise.resolve({
    ask: ask as Opened['ask'],
    onEvent: (listener) => {
      listeners.add(listener);
      return () => void listeners.delete(listener);
    },
    close: async () => {
      // The engine ends by itself when its line is cut; a test that hangs here has found that it does not.
      child.disconnect();
      await exited;
      rmSync(first, { force: true });
    },
  });
}
