import type { Database } from 'better-sqlite3';
import { begin } from './migrations/0001-begin.ts';

/** In order; migration n brings a notebook from format n − 1 to n. None is ever changed once released. */
const migrations: readonly string[] = [begin];

/** The newest notebook format this program knows; kept in SQLite's `user_version`. */
export const notebookFormat = migrations.length;

/** Brings a notebook up to `notebookFormat`, each migration in a transaction of its own with its number. */
export function migrate(db: Database): void {
  for (let from = formatOf(db); from < notebookFormat; from++) {
    const sql = migrations[from];
    if (sql === undefined) throw new Error(`no migration leads on from notebook format ${from}`);
    db.transaction(() => {
      db.exec(sql);
      db.pragma(`user_version = ${from + 1}`);
    }).exclusive();
  }
}

/** The notebook format a database says it has. */
export function formatOf(db: Database): number {
  return Number(db.pragma('user_version', { simple: true }));
}
