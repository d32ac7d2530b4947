import { resolve } from 'node:path';
import { rmSync } from 'node:fs';
import { onDisk } from './disk-refusal.ts';
import { givePlace, spareName } from './new-file.ts';
import { openNotebook, refuseTaken, type Notebook } from './open.ts';

/**
 * Copies the whole notebook to a new file and opens the copy; the first stays open and as it was. Works from a notebook
 * that is open for reading only. The copy appears whole or not at all.
 * @throws Refusal `file-exists`: nothing is ever overwritten; `file-unwritable`.
 */
export function saveAs(notebook: Notebook, given: string): Notebook {
  const path = resolve(given);
  refuseTaken(path);
  const spare = spareName(path);
  onDisk(path, () => {
    try {
      notebook.db.prepare('VACUUM INTO ?').run(spare);
      givePlace(spare, path);
    } finally {
      rmSync(spare, { force: true });
    }
  });
  return openNotebook(path);
}
