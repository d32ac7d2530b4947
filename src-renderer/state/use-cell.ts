// Puts cells into plans: a stored one, an imported one, one just made.
import type { CellDocument } from '../../src-main/contract/documents.ts';
import { askOrSay } from './ask.ts';
import { firstPlan, onCell } from './first-plan.ts';
import { notebook } from './notebook.svelte.ts';
import { notices } from './notices.svelte.ts';
import { plan } from './plan.svelte.ts';

export async function useCell(cellId: number): Promise<void> {
  const read = await askOrSay('cell read', { cellId });
  if (read !== null) changeCell(read.cell);
}

/** Keeps a new cell in the notebook and puts it into the open plan. */
export async function putIntoPlan(cell: CellDocument): Promise<void> {
  if ((await notebook.keepCell(cell)) !== null) changeCell(cell);
}

function changeCell(cell: CellDocument): void {
  plan.change(`cell ${plan.document.cell.name} → ${cell.name}`, (p) => onCell(p, cell));
  notices.say(`The plan is on “${cell.name}” now; pipettes are at its soma`, () => plan.undo());
}

/** Keeps a new cell and opens a plan on it. */
export async function startPlanOn(cell: CellDocument): Promise<void> {
  const cellId = await notebook.keepCell(cell);
  if (cellId !== null) await notebook.createPlan(firstPlan(cell), cellId);
}

/** Opens a new plan on a stored cell. */
export async function startPlanOnStored(cellId: number): Promise<void> {
  const read = await askOrSay('cell read', { cellId });
  if (read !== null) await notebook.createPlan(firstPlan(read.cell), cellId);
}
