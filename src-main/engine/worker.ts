// A worker thread: takes one piece of work after another from the pool.
import { parentPort } from 'node:worker_threads';
import { Refusal } from '../units/refuse.ts';
import { arraysIn } from './arrays-in.ts';
import { doWork } from './work.ts';
import type { FromWorker, ToWorker } from './worker-messages.ts';

const port = parentPort;
if (!port) throw new Error('a worker runs as a worker thread');

const send = (message: FromWorker, give: unknown = null): void => port.postMessage(message, arraysIn(give));
/** Ten progress messages a second are enough for the eye. */
const shortest_ms = 100;

port.on('message', ({ piece, name, question, cancel }: ToWorker) => {
  let lastProgress = 0;
  try {
    const answer = doWork(name, question, {
      cancelled: () => cancel !== null && Atomics.load(cancel, 0) !== 0,
      progress: (done) => {
        const now = performance.now();
        if (now - lastProgress < shortest_ms) return;
        lastProgress = now;
        send({ piece, kind: 'progress', done });
      },
      part: (part) => send({ piece, kind: 'part', part }, part),
    });
    send({ piece, kind: 'done', answer }, answer);
  } catch (error) {
    if (error instanceof Refusal) {
      const [first, ...others] = error.all;
      send({ piece, kind: 'refused', refusals: [first ?? error.data, ...others] });
    } else {
      send({ piece, kind: 'failed', stack: error instanceof Error ? (error.stack ?? error.message) : String(error) });
    }
  }
});
