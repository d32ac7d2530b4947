// One program writes a notebook, others read. The lock is the operating system's, held through SQLite on a small file
// beside the notebook: it goes with the process, however that ends. The file also says who holds it.
import Database from 'better-sqlite3';
import { rmSync, statSync } from 'node:fs';
import { hostname } from 'node:os';

export type Lock =
  | { readonly kind: 'held'; readonly release: () => void }
  /** `reason` is a sentence for the user. */
  | { readonly kind: 'elsewhere'; readonly reason: string };

/** Takes the notebook for writing, or says who has it. Does not wait. */
export function lockNotebook(path: string): Lock {
  const file = `${path}-lock`;
  for (let attempt = 0; attempt < 8; attempt++) {
    const before = fileNumber(file);
    const db = openLockFile(file);
    if (!db) {
      return { kind: 'elsewhere', reason: 'The folder cannot be written, so the notebook is open for reading only.' };
    }
    const refused = take(db);
    // A closing program deletes the file it held. Whoever had opened that one holds nothing and must look again; so must
    // one who cannot tell, having made the file itself.
    if (before !== null && before === fileNumber(file)) {
      if (refused === null) return { kind: 'held', release: () => release(db, file) };
      db.close();
      return { kind: 'elsewhere', reason: refused };
    }
    db.close();
  }
  return { kind: 'elsewhere', reason: 'Another program is opening the notebook; it is open for reading only.' };
}

/** Null when taken, else why not. */
function take(db: Database.Database): string | null {
  try {
    db.exec('BEGIN IMMEDIATE');
    db.exec('CREATE TABLE IF NOT EXISTS holder (words TEXT NOT NULL) STRICT; DELETE FROM holder');
    const words = `process ${process.pid} on ${hostname()}, since ${new Date().toISOString()}`;
    db.prepare('INSERT INTO holder (words) VALUES (?)').run(words);
    db.exec('COMMIT');
    // Reserved from here on: others may read who holds it, none may write.
    db.exec('BEGIN IMMEDIATE');
    return null;
  } catch (cause) {
    const code = cause instanceof Database.SqliteError ? cause.code : null;
    if (code === null) throw cause;
    if (code.startsWith('SQLITE_BUSY')) {
      return `Open in another program (${holder(db)}), so here it is open for reading only.`;
    }
    return `The lock beside the notebook cannot be written (${code}), so the notebook is open for reading only.`;
  }
}

function holder(db: Database.Database): string {
  try {
    return db.prepare<[], { words: string }>('SELECT words FROM holder').get()?.words ?? 'just started';
  } catch {
    // Being written this moment, or for the first time.
    return 'just started';
  }
}

function release(db: Database.Database, file: string): void {
  if (!db.open) return;
  // Deleted while held, or another could take it in between. Windows deletes no open file, and so none that another holds.
  if (process.platform === 'win32') db.close();
  try {
    rmSync(file, { force: true });
  } catch (cause) {
    if (process.platform !== 'win32') throw cause;
  } finally {
    db.close();
  }
}

function openLockFile(file: string): Database.Database | null {
  try {
    const db = new Database(file, { timeout: 0 });
    db.pragma('synchronous = OFF');
    return db;
  } catch (cause) {
    if (cause instanceof Database.SqliteError || cause instanceof TypeError) return null;
    throw cause;
  }
}

function fileNumber(file: string): bigint | null {
  return statSync(file, { throwIfNoEntry: false, bigint: true })?.ino ?? null;
}
