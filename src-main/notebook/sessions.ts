import type { SessionEntry } from '../contract/requests.ts';
import { mustHaveCell } from './cells.ts';
import { change, type Notebook } from './open.ts';
import { missingRecord } from './written.ts';

/** A dated entry for a cell. `date` is year-month-day. @throws Refusal `notebook-record-missing`. */
export function createSession(notebook: Notebook, cellId: number, date: string, title: string): number {
  return change(notebook, (now) => {
    mustHaveCell(notebook, cellId);
    const made = notebook.db
      .prepare('INSERT INTO session (cell_id, date, title, notes, changed_at) VALUES (?, ?, ?, ?, ?)')
      .run(cellId, date, title, '', now);
    return Number(made.lastInsertRowid);
  });
}

/** Gives the time of saving. @throws Refusal `notebook-record-missing`. */
export function writeSession(notebook: Notebook, sessionId: number, title: string, notes: string): string {
  return change(notebook, (now) => {
    const done = notebook.db
      .prepare('UPDATE session SET title = ?, notes = ?, changed_at = ? WHERE session_id = ?')
      .run(title, notes, now, sessionId);
    if (done.changes === 0) missingRecord('session', sessionId);
    return now;
  });
}

interface SessionRow {
  readonly sessionId: number;
  readonly cellId: number;
  readonly date: string;
  readonly title: string;
}

/** @throws Refusal `notebook-record-missing`. */
export function readSession(notebook: Notebook, sessionId: number): SessionEntry & { readonly notes: string } {
  const row = notebook.db
    .prepare<[number], SessionRow & { notes: string }>(
      'SELECT session_id AS sessionId, cell_id AS cellId, date, title, notes FROM session WHERE session_id = ?',
    )
    .get(sessionId);
  return row ? { ...row, rehearsals: rehearsalsOf(notebook, sessionId) } : missingRecord('session', sessionId);
}

/** A cell's sessions, the newest date first. */
export function sessionsOf(notebook: Notebook, cellId: number): SessionEntry[] {
  return notebook.db
    .prepare<[number], SessionRow>(
      `SELECT session_id AS sessionId, cell_id AS cellId, date, title FROM session WHERE cell_id = ?
       ORDER BY date DESC, session_id DESC`,
    )
    .all(cellId)
    .map((row) => ({ ...row, rehearsals: rehearsalsOf(notebook, row.sessionId) }));
}

function rehearsalsOf(notebook: Notebook, sessionId: number): SessionEntry['rehearsals'] {
  return notebook.db
    .prepare<[number], SessionEntry['rehearsals'][number]>(
      `SELECT r.rehearsal_id AS rehearsalId, r.plan_id AS planId, v.name AS planName, r.rehearsed_at AS rehearsedAt
       FROM rehearsal r JOIN version v ON v.version_id = r.plan_version WHERE r.session_id = ?
       ORDER BY r.rehearsal_id DESC`,
    )
    .all(sessionId);
}
