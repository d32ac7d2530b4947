import { planSchema, type CellDocument, type PlanDocument } from '../contract/documents.ts';
import { mustHaveCell, updateCell } from './cells.ts';
import { change, type Notebook } from './open.ts';
import { keepSetting } from './settings.ts';
import { keepVersion } from './versions.ts';
import { hashOf, missingRecord, readBack, type Written } from './written.ts';

export interface PlanRecord {
  readonly planId: number;
  readonly cellId: number;
  readonly plan: PlanDocument;
  readonly savedAt: string;
}

/** A new plan for a cell of the notebook, which becomes the open one. @throws Refusal `notebook-record-missing`. */
export function createPlan(
  notebook: Notebook,
  cellId: number,
  plan: Written<PlanDocument>,
  cell: Written<CellDocument>,
): number {
  return change(notebook, (now) => {
    mustHaveCell(notebook, cellId);
    const { name, note } = plan.document;
    const made = notebook.db
      .prepare('INSERT INTO plan (cell_id, name, note, draft, cell_hash, changed_at) VALUES (?, ?, ?, ?, ?, ?)')
      .run(cellId, name, note, plan.text, hashOf(cell.text), now);
    const planId = Number(made.lastInsertRowid);
    keepSetting(notebook, 'open plan', String(planId));
    return planId;
  });
}

/** @throws Refusal `notebook-record-missing`. */
export function readPlan(notebook: Notebook, planId: number): PlanRecord {
  const row = notebook.db
    .prepare<[number], { cellId: number; draft: string; savedAt: string }>(
      'SELECT cell_id AS cellId, draft, changed_at AS savedAt FROM plan WHERE plan_id = ?',
    )
    .get(planId);
  if (!row) return missingRecord('plan', planId);
  return { planId, cellId: row.cellId, plan: readBack(planSchema, row.draft, `plan ${planId}`), savedAt: row.savedAt };
}

/** Remembers the plan to show first on opening; a notebook open for reading only does not. */
export function rememberOpenPlan(notebook: Notebook, planId: number): void {
  if (notebook.readOnlyReason !== null) return;
  change(notebook, () => keepSetting(notebook, 'open plan', String(planId)));
}

/**
 * Keeps the plan as edited. An edit of the plan's cell is an edit of the notebook's cell too; a plan that still holds an
 * older state of its cell does not bring that back. Gives the time of saving.
 * @throws Refusal `notebook-record-missing`.
 */
export function keepDraft(
  notebook: Notebook,
  planId: number,
  plan: Written<PlanDocument>,
  cell: Written<CellDocument>,
): string {
  return change(notebook, (now) => {
    const before = notebook.db
      .prepare<[number], { cellId: number; cellHash: string }>(
        'SELECT cell_id AS cellId, cell_hash AS cellHash FROM plan WHERE plan_id = ?',
      )
      .get(planId);
    if (!before) return missingRecord('plan', planId);
    const { name, note } = plan.document;
    const cellHash = hashOf(cell.text);
    notebook.db
      .prepare('UPDATE plan SET name = ?, note = ?, draft = ?, cell_hash = ?, changed_at = ? WHERE plan_id = ?')
      .run(name, note, plan.text, cellHash, now, planId);
    if (cellHash !== before.cellHash) updateCell(notebook, before.cellId, cell, now);
    return now;
  });
}

/** Keeps a named plan as an immutable version besides its draft. */
export function keepNamed(
  notebook: Notebook,
  planId: number,
  plan: Written<PlanDocument>,
  cell: Written<CellDocument>,
): void {
  change(notebook, (now) => {
    keepDraft(notebook, planId, plan, cell);
    keepVersion(notebook, plan, now);
  });
}

/** Hides a plan, or brings it back. @throws Refusal `notebook-record-missing`. */
export function removePlan(notebook: Notebook, planId: number, removed: boolean): void {
  change(notebook, () => {
    const done = notebook.db.prepare('UPDATE plan SET removed = ? WHERE plan_id = ?').run(removed ? 1 : 0, planId);
    if (done.changes === 0) missingRecord('plan', planId);
  });
}
