import { resolve } from 'node:path';
import { notebookEnding } from '../home.ts';

/** The notebook that a command line names, absolute; null for none. Anything without the ending is Electron's own. */
export function notebookNamed(words: readonly string[], workingFolder: string): string | null {
  const named = words.slice(1).filter((word) => !word.startsWith('-') && word.endsWith(notebookEnding));
  const last = named.at(-1);
  return last === undefined ? null : resolve(workingFolder, last);
}
