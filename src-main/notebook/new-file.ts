import { closeSync, copyFileSync, constants, fsyncSync, linkSync, mkdirSync, openSync, rmSync } from 'node:fs';
import { basename, dirname, join } from 'node:path';

/** A name in the same folder for a file that is still being made. */
export function spareName(path: string): string {
  return join(dirname(path), `.${basename(path)}.${process.pid}-${Date.now()}.part`);
}

/** Makes the folder a file is to lie in, where there is none. */
export function makeFolder(path: string): void {
  mkdirSync(dirname(path), { recursive: true });
}

/**
 * Gives a finished file its place: flushed to the disk first, and never over another file. The spare is gone after.
 * A link fails when the name is taken, where a rename would overwrite; file systems without links get a copy that fails
 * likewise.
 * @throws Error of the file system, `EEXIST` when the place is taken.
 */
export function givePlace(spare: string, path: string): void {
  flush(spare);
  try {
    linkSync(spare, path);
  } catch (cause) {
    const { code } = cause as NodeJS.ErrnoException;
    if (code !== 'EPERM' && code !== 'ENOTSUP' && code !== 'ENOSYS' && code !== 'EOPNOTSUPP') throw cause;
    copyFileSync(spare, path, constants.COPYFILE_EXCL);
    flush(path);
  }
  rmSync(spare);
  flushFolder(dirname(path));
}

function flush(path: string): void {
  const file = openSync(path, 'r+');
  try {
    fsyncSync(file);
  } finally {
    closeSync(file);
  }
}

/** The new name itself must survive a power cut. Windows opens no folder and keeps its names without. */
function flushFolder(folder: string): void {
  if (process.platform === 'win32') return;
  const file = openSync(folder, 'r');
  try {
    fsyncSync(file);
  } finally {
    closeSync(file);
  }
}
