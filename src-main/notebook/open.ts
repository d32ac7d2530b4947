import Database from 'better-sqlite3';
import { existsSync, readFileSync, realpathSync, rmSync } from 'node:fs';
import { basename, dirname, extname, resolve } from 'node:path';
import { refuse } from '../units/refuse.ts';
import { onDisk } from './disk-refusal.ts';
import { applicationId, inspectFile, refuseNewerNotebook } from './file-header.ts';
import { lockNotebook, type Lock } from './lock.ts';
import { formatOf, migrate, notebookFormat } from './migrations.ts';
import { givePlace, spareName } from './new-file.ts';

/** An open notebook. All times in it are ISO 8601 in UTC; all functions of this folder take it first. */
export interface Notebook {
  readonly db: Database.Database;
  readonly path: string;
  /** The file's name without its ending. */
  readonly name: string;
  /** Null: writable. Else a sentence why not. */
  readonly readOnlyReason: string | null;
  /** Puts the log back into the file and lets other programs write. */
  close(): void;
}

/**
 * Opens a notebook for writing; or for reading, when another program has it or the disk forbids writing. A notebook of
 * an older format is migrated.
 * @throws Refusal `file-not-found`, `file-unreadable`, `file-not-a-notebook`, `notebook-newer-than-app`,
 *         `file-unwritable`. The file is untouched then.
 */
export function openNotebook(given: string): Notebook {
  inspectFile(resolve(given));
  const path = realpathSync(given);
  const lock = lockNotebook(path);
  try {
    return onDisk(path, () => (lock.kind === 'held' ? openToWrite(path, lock) : openToRead(path, lock.reason)));
  } catch (error) {
    if (lock.kind === 'held') lock.release();
    throw error;
  }
}

/**
 * Makes a new, empty notebook and opens it. The file appears whole or not at all.
 * @throws Refusal `file-exists`: nothing is ever overwritten; `file-unwritable`.
 */
export function createNotebook(given: string): Notebook {
  const path = resolve(given);
  refuseTaken(path);
  const spare = spareName(path);
  onDisk(path, () => {
    try {
      const db = new Database(spare);
      try {
        db.pragma(`application_id = ${applicationId}`);
        migrate(db);
      } finally {
        db.close();
      }
      givePlace(spare, path);
    } finally {
      rmSync(spare, { force: true });
    }
  });
  return openNotebook(path);
}

/** @throws Refusal `file-exists` when something is at `path`. */
export function refuseTaken(path: string): void {
  if (!existsSync(path)) return;
  const remedy = 'choose another name; nothing is overwritten';
  refuse('file-exists', { thing: 'file', place: path, value: 'there already', remedy });
}

/** @throws Refusal `notebook-read-only` when the notebook cannot be written. */
export function mustBeWritable(notebook: Notebook): void {
  if (notebook.readOnlyReason === null) return;
  const remedy = 'close it in the other program, or save this notebook under another name';
  refuse('notebook-read-only', {
    thing: 'notebook',
    place: notebook.path,
    value: `open for reading only: ${notebook.readOnlyReason}`,
    remedy,
  });
}

/** Runs one change of the notebook: all of it is kept, or none. @throws Refusal as `mustBeWritable` and `onDisk`. */
export function change<T>(notebook: Notebook, work: (now: string) => T): T {
  mustBeWritable(notebook);
  return onDisk(notebook.path, () => notebook.db.transaction(() => work(new Date().toISOString())).immediate());
}

function openToWrite(path: string, lock: Extract<Lock, { kind: 'held' }>): Notebook {
  const db = new Database(path, { fileMustExist: true, timeout: 2000 });
  try {
    refuseNewerNotebook(path, formatOf(db));
    db.pragma('journal_mode = WAL');
    db.pragma('synchronous = FULL');
    db.pragma('foreign_keys = ON');
    if (formatOf(db) < notebookFormat) {
      migrate(db);
      // The new format must stand in the file itself, where an older program looks first.
      db.pragma('wal_checkpoint(TRUNCATE)');
    }
  } catch (error) {
    db.close();
    throw error;
  }
  const close = () => {
    db.close();
    lock.release();
  };
  return { db, path, name: nameOf(path), readOnlyReason: null, close };
}

function openToRead(path: string, reason: string): Notebook {
  const db = openReadOnly(path);
  try {
    refuseNewerNotebook(path, formatOf(db));
    if (formatOf(db) < notebookFormat) {
      refuse('notebook-read-only', {
        thing: 'notebook',
        place: path,
        value: `of format ${formatOf(db)}, to be brought up to ${notebookFormat}`,
        remedy: 'open it where it can be written',
      });
    }
  } catch (error) {
    db.close();
    throw error;
  }
  return { db, path, name: nameOf(path), readOnlyReason: reason, close: () => db.close() };
}

function openReadOnly(path: string): Database.Database {
  const db = new Database(path, { readonly: true, fileMustExist: true, timeout: 2000 });
  try {
    formatOf(db);
    return db;
  } catch (cause) {
    db.close();
    if (!(cause instanceof Database.SqliteError && cause.code.startsWith('SQLITE_CANTOPEN'))) throw cause;
    return copyInMemory(path);
  }
}

/**
 * Reading with a log needs a place for its index, which a folder that cannot be written does not give. The file alone is
 * whole after a clean end, so it is read into memory; bytes 18 and 19 set to 1 say "without a log".
 * @source SQLite, "Write-Ahead Logging", section 5, and "Database File Format", section 1.3.3.
 */
function copyInMemory(path: string): Database.Database {
  const bytes = readFileSync(path);
  bytes[18] = 1;
  bytes[19] = 1;
  return new Database(bytes, { readonly: true });
}

function nameOf(path: string): string {
  const ending = extname(path);
  return basename(path, ending === '' ? undefined : ending) || basename(dirname(path));
}
