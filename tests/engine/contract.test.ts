// The contract in this process, workers and all: what both shells are built on.
import { fileURLToPath } from 'node:url';
import { createEngine } from '../../src-main/engine/engine.ts';
import { contractSuite } from '../support/contract-suite.ts';

const dyingWorker = fileURLToPath(new URL('../support/dying-worker.ts', import.meta.url));

contractSuite(
  'in this process',
  (wishes = {}) => Promise.resolve(createEngine({ workers: 2, log: () => undefined, ...wishes })),
  dyingWorker,
);
