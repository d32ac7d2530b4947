import type { Notebook } from './open.ts';
import { hashOf, type Written } from './written.ts';

/**
 * Keeps a document for good and gives its number; the same document is kept once. Runs inside the caller's `change`.
 */
export function keepVersion(notebook: Notebook, written: Written, now: string): number {
  const { kind, name } = written.document;
  const hash = hashOf(written.text);
  notebook.db
    .prepare('INSERT INTO version (kind, name, document, hash, made_at) VALUES (?, ?, ?, ?, ?) ON CONFLICT DO NOTHING')
    .run(kind, name, written.text, hash, now);
  const row = notebook.db
    .prepare<[string, string], { id: number }>('SELECT version_id AS id FROM version WHERE kind = ? AND hash = ?')
    .get(kind, hash);
  if (!row) throw new Error('a version just kept is not there');
  return row.id;
}
