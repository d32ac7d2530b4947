import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach } from 'vitest';

/** A folder of its own for every test of the file, gone after. `folder('a.holdfast')` is a path in it. */
export function testFolder(): (name: string) => string {
  let folder = '';
  beforeEach(() => {
    folder = mkdtempSync(join(tmpdir(), 'holdfast-'));
  });
  afterEach(() => rmSync(folder, { recursive: true, force: true }));
  return (name) => join(folder, name);
}
