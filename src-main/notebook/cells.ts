import { cellSchema, type CellDocument } from '../contract/documents.ts';
import { change, type Notebook } from './open.ts';
import { hashOf, missingRecord, readBack, type Written } from './written.ts';

/** Keeps a cell; one that is there already, letter for letter, is not doubled, and comes back when it was removed. */
export function keepCell(notebook: Notebook, cell: Written<CellDocument>): number {
  const hash = hashOf(cell.text);
  return change(notebook, (now) => {
    const there = notebook.db
      .prepare<[string], { id: number }>('SELECT cell_id AS id FROM cell WHERE hash = ? ORDER BY removed, cell_id')
      .get(hash);
    if (there) {
      notebook.db.prepare('UPDATE cell SET removed = 0 WHERE cell_id = ?').run(there.id);
      return there.id;
    }
    const { name, note } = cell.document;
    const made = notebook.db
      .prepare('INSERT INTO cell (name, note, draft, hash, changed_at) VALUES (?, ?, ?, ?, ?)')
      .run(name, note, cell.text, hash, now);
    return Number(made.lastInsertRowid);
  });
}

/** The cell as last edited. @throws Refusal `notebook-record-missing`. */
export function readCell(notebook: Notebook, cellId: number): CellDocument {
  const row = notebook.db.prepare<[number], { draft: string }>('SELECT draft FROM cell WHERE cell_id = ?').get(cellId);
  return row ? readBack(cellSchema, row.draft, `cell ${cellId}`) : missingRecord('cell', cellId);
}

/** An edit of the cell made in one of its plans. Runs inside the caller's `change`. */
export function updateCell(notebook: Notebook, cellId: number, cell: Written<CellDocument>, now: string): void {
  const { name, note } = cell.document;
  notebook.db
    .prepare('UPDATE cell SET name = ?, note = ?, draft = ?, hash = ?, changed_at = ? WHERE cell_id = ?')
    .run(name, note, cell.text, hashOf(cell.text), now, cellId);
}

/** Hides a cell with its plans, or brings it back. @throws Refusal `notebook-record-missing`. */
export function removeCell(notebook: Notebook, cellId: number, removed: boolean): void {
  change(notebook, () => {
    const done = notebook.db.prepare('UPDATE cell SET removed = ? WHERE cell_id = ?').run(removed ? 1 : 0, cellId);
    if (done.changes === 0) missingRecord('cell', cellId);
  });
}

/** @throws Refusal `notebook-record-missing`. */
export function mustHaveCell(notebook: Notebook, cellId: number): void {
  const row = notebook.db.prepare<[number]>('SELECT 1 FROM cell WHERE cell_id = ?').get(cellId);
  if (row === undefined) missingRecord('cell', cellId);
}
