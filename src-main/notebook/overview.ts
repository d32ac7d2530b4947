import type { CellEntry, NotebookOverview, NotebookStatus, PlanEntry } from '../contract/requests.ts';
import type { Notebook } from './open.ts';
import { sessionsOf } from './sessions.ts';
import { setting } from './settings.ts';

/** What the window's foot shows of the notebook. */
export function notebookStatus(notebook: Notebook): NotebookStatus {
  const saved = notebook.db
    .prepare<[], { at: string | null }>(
      `SELECT max(at) AS at FROM (
         SELECT max(changed_at) AS at FROM cell UNION ALL SELECT max(changed_at) FROM plan
         UNION ALL SELECT max(changed_at) FROM session UNION ALL SELECT max(rehearsed_at) FROM rehearsal)`,
    )
    .get();
  return {
    path: notebook.path,
    name: notebook.name,
    readOnly: notebook.readOnlyReason !== null,
    readOnlyReason: notebook.readOnlyReason,
    savedAt: saved?.at ?? null,
  };
}

/** All that is not removed: cells by name, each with its plans by name and its sessions by date. */
export function notebookOverview(notebook: Notebook): NotebookOverview {
  const cells = notebook.db
    .prepare<[], { cellId: number; name: string }>(
      'SELECT cell_id AS cellId, name FROM cell WHERE removed = 0 ORDER BY name, cell_id',
    )
    .all()
    .map((cell): CellEntry => ({
      ...cell,
      plans: plansOf(notebook, cell.cellId),
      sessions: sessionsOf(notebook, cell.cellId),
    }));
  return { status: notebookStatus(notebook), cells, openPlanId: openPlanId(notebook, cells) };
}

function plansOf(notebook: Notebook, cellId: number): PlanEntry[] {
  return notebook.db
    .prepare<[number], PlanEntry>(
      `SELECT plan_id AS planId, name, changed_at AS changedAt,
         (SELECT max(rehearsed_at) FROM rehearsal r WHERE r.plan_id = plan.plan_id) AS rehearsedAt
       FROM plan WHERE cell_id = ? AND removed = 0 ORDER BY name, plan_id`,
    )
    .all(cellId);
}

/** The plan open last; else the newest rehearsed; else the newest. */
function openPlanId(notebook: Notebook, cells: readonly CellEntry[]): number | null {
  const plans = cells.flatMap((cell) => cell.plans);
  const last = Number(setting(notebook, 'open plan'));
  if (plans.some((plan) => plan.planId === last)) return last;
  const newestFirst = plans.toSorted(
    (a, b) => (b.rehearsedAt ?? '').localeCompare(a.rehearsedAt ?? '') || b.changedAt.localeCompare(a.changedAt),
  );
  return newestFirst[0]?.planId ?? null;
}
