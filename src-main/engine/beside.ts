import { existsSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';

/** The folder of the running file: src-main/engine from source, out/main when bundled. */
const here = dirname(fileURLToPath(import.meta.url));

/** The program the pool starts its workers with: bundled beside the bundle, else the source beside this source. */
export function workerProgram(): string {
  const bundled = join(here, 'worker.cjs');
  return existsSync(bundled) ? bundled : join(here, 'worker.ts');
}

/** Where the example cells and plans lie; the same two levels up from either folder. */
export function examplesFolder(): string {
  return join(here, '..', '..', 'assets', 'examples');
}
