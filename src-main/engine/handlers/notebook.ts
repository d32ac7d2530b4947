import { realpathSync } from 'node:fs';
import { resolve } from 'node:path';
import { createNotebook, openNotebook } from '../../notebook/open.ts';
import { notebookOverview, notebookStatus } from '../../notebook/overview.ts';
import { saveAs } from '../../notebook/save-as.ts';
import { searchNotebook } from '../../notebook/search.ts';
import type { Desk } from '../desk.ts';
import type { Handlers } from '../handlers.ts';
import { engineVersion, programVersion } from '../version.ts';

export const notebookHandlers = {
  'engine about': (_, desk) => ({
    program: 'Holdfast',
    version: programVersion,
    engineVersion,
    workers: desk.pool.workers,
  }),
  'notebook status': (_, desk) => notebookStatus(desk.notebook),
  'notebook create': ({ path }, desk) => {
    desk.takeNotebook(createNotebook(path));
    return notebookStatus(desk.notebook);
  },
  'notebook open': ({ path }, desk) => {
    // Its lock is ours already: opened a second time it would be for reading only.
    if (!isOpen(desk, path) && !desk.takeBack(realPath(path))) desk.takeNotebook(openNotebook(path));
    return notebookStatus(desk.notebook);
  },
  'notebook save as': ({ path }, desk) => {
    const copy = saveAs(desk.notebook, path);
    desk.takeCopy(copy);
    return notebookStatus(desk.notebook);
  },
  'notebook overview': (_, desk) => notebookOverview(desk.notebook),
  'notebook search': ({ words }, desk) => searchNotebook(desk.notebook, words),
} satisfies Partial<Handlers>;

/** A notebook open for reading only is opened again: the other program may be gone. */
function isOpen(desk: Desk, path: string): boolean {
  if (desk.notebookPath === null || desk.notebook.readOnlyReason !== null) return false;
  return desk.notebookPath === realPath(path);
}

function realPath(path: string): string {
  try {
    return realpathSync(path);
  } catch {
    // Not there: opening it will say so in words.
    return resolve(path);
  }
}
