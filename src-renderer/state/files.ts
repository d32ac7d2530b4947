// Choosing notebooks: the platform's dialog where the shell has one, our own list of folders where it has none.
import { bridge } from '../bridge.ts';
import type { FolderListing } from '../../src-main/contract/bridge.ts';
import { notebook } from './notebook.svelte.ts';
import { overlays } from './overlays.svelte.ts';

export type NotebookChoice = 'new' | 'open' | 'save as';

/** Asks for a notebook file and does with it what was wanted. */
export async function chooseNotebook(what: NotebookChoice): Promise<void> {
  if (bridge.shell === 'browser') {
    overlays.show({ kind: 'choose notebook', what });
    return;
  }
  const suggestion = what === 'save as' ? `${notebook.overview?.status.name ?? 'Notebook'}, copy` : 'Notebook';
  const path = await bridge.chooseNotebook(what === 'open' ? 'open' : 'save', suggestion);
  if (path !== null) await takeNotebook(what, path);
}

export async function takeNotebook(what: NotebookChoice, path: string): Promise<void> {
  overlays.close();
  if (what === 'new') await notebook.createNotebook(path);
  else if (what === 'open') await notebook.openNotebook(path);
  else await notebook.saveNotebookAs(path);
}

type Listed = { readonly ok: true; readonly value: FolderListing } | { readonly ok: false; readonly words: string };

export async function listFolder(folder: string): Promise<Listed> {
  const answer = await bridge.listFolder(folder);
  if (answer.ok) return answer;
  if (!('refusals' in answer)) return { ok: false, words: answer.fault };
  const [first] = answer.refusals;
  return { ok: false, words: `${first.thing} ${first.value}: ${first.remedy}` };
}
