import { statSync } from 'node:fs';
import { refuse } from '../units/refuse.ts';

/**
 * Passes a file that may be read whole: a pipe or a device would never end, a huge file would fill the memory first.
 *
 * @param thing in the user's words, such as "SWC file".
 * @throws Refusal `file-not-found`, `file-unreadable` for what is no file, `too-large` above `most_bytes`.
 */
export function mustBeReadable(path: string, thing: string, most_bytes: number): void {
  const found = statOf(path, thing);
  if (!found.isFile()) {
    const value = found.isDirectory() ? 'a folder' : 'no file';
    refuse('file-unreadable', { thing, place: path, value, remedy: 'name a file' });
  }
  if (found.size > most_bytes) {
    const value = `${Math.round(found.size / 1e6)} MB`;
    refuse('too-large', { thing, place: path, value, remedy: `give a file of at most ${most_bytes / 1e6} MB` });
  }
}

function statOf(path: string, thing: string) {
  try {
    return statSync(path);
  } catch (cause) {
    return refuseUnread(path, thing, cause);
  }
}

/** @throws Refusal `file-not-found` or `file-unreadable`, by what the file system said. */
export function refuseUnread(path: string, thing: string, cause: unknown): never {
  const code = (cause as NodeJS.ErrnoException).code ?? 'unreadable';
  return code === 'ENOENT' || code === 'ENOTDIR'
    ? refuse('file-not-found', { thing, place: path, value: 'missing', remedy: 'check the path' })
    : refuse('file-unreadable', { thing, place: path, value: code, remedy: 'check that you may read it' });
}
