// A worker that ends when it is first given sweep 0, and lets whoever takes its place get on with it.
import { rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { parentPort } from 'node:worker_threads';
import type { ToWorker } from '../../src-main/engine/worker-messages.ts';

/** Threads of one process share little else that outlives them. */
const mark = join(tmpdir(), `holdfast-worker-died-${process.pid}`);

parentPort?.on('message', ({ name, question }: ToWorker) => {
  if (name !== 'sweeps' || !(question as { sweeps: readonly number[] }).sweeps.includes(0)) return;
  if (!hasDied()) process.exit(7);
  rmSync(mark);
});
await import('../../src-main/engine/worker.ts');

function hasDied(): boolean {
  try {
    writeFileSync(mark, '', { flag: 'wx' });
    return false;
  } catch {
    return true;
  }
}
