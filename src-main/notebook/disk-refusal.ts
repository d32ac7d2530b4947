import Database from 'better-sqlite3';
import { Refusal } from '../units/refuse.ts';

const full = ['SQLITE_FULL', 'ENOSPC', 'EDQUOT', 'EFBIG'];
const unwritable = [
  'EEXIST',
  'SQLITE_IOERR',
  'SQLITE_READONLY',
  'SQLITE_CANTOPEN',
  'EACCES',
  'EPERM',
  'EROFS',
  'ENOENT',
  'EIO',
];
const damaged = ['SQLITE_CORRUPT', 'SQLITE_NOTADB'];

/**
 * Runs work on the disk; what the disk says no to becomes a Refusal, anything else passes on as it is.
 * @throws Refusal `file-exists`, `file-unwritable` (full, forbidden, failing), `file-unreadable` (damaged), `notebook-read-only` (busy).
 */
export function onDisk<T>(path: string, work: () => T): T {
  try {
    return work();
  } catch (cause) {
    throw diskRefusal(path, cause) ?? cause;
  }
}

function diskRefusal(path: string, cause: unknown): Refusal | null {
  const code = codeOf(cause);
  const says = (list: readonly string[]) => list.some((each) => code === each || code.startsWith(`${each}_`));
  const no = (
    kind: 'file-exists' | 'file-unwritable' | 'file-unreadable' | 'notebook-read-only',
    value: string,
    remedy: string,
  ) => new Refusal({ code: kind, thing: 'notebook', place: path, value, remedy }, { cause });
  if (code === 'EEXIST') return no('file-exists', 'there already', 'choose another name; nothing is overwritten');
  if (says(full)) return no('file-unwritable', 'on a full disk', 'free some space; what was saved before is whole');
  if (says(unwritable)) {
    return no('file-unwritable', `not written (${code})`, 'check the folder and its permissions, then try again');
  }
  if (says(damaged)) return no('file-unreadable', 'damaged', 'open a copy made before the damage');
  if (says(['SQLITE_BUSY']))
    return no('notebook-read-only', 'busy in another program', 'close it there, then try again');
  return null;
}

function codeOf(cause: unknown): string {
  if (cause instanceof Database.SqliteError) return cause.code;
  return cause instanceof Error ? ((cause as NodeJS.ErrnoException).code ?? '') : '';
}
